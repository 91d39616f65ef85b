/** The rotations of the selected block, or all of them, with the computed row of this age between its neighbours. */
import { useCallback, useEffect, useMemo, useState, type ReactNode } from 'react';
import { poseAt, toPole } from '../../../../kernel/rotations';
import type { CompiledRow, Link, Model } from '../../../../kernel/rotations/types';
import { toVector } from '../../../../kernel/sphere';
import { pointEllipse, poseUncertainty } from '../../../../kernel/uncertainty';
import { Grid } from '../../../ledger/components/Grid';
import type { Editing, GridRow, ShownColumn } from '../../../ledger/components/grid-props';
import type { Column } from '../../../ledger/grid/column';
import { BLANK_ROTATION, rotationColumns } from '../../../ledger/grid/columns';
import { ageValue, number } from '../../format';
import { ownPoint, type NamedPoint } from '../../scene/points';
import { findSceneBlock } from '../../scene/scene';
import { previewModel } from '../../store/actions';
import { useBench, useCalmAge, useWorkbench } from '../bench';
import { EvidenceSwatch } from '../globe/Legend';
import { useNames } from '../use-names';
import { Foot } from './Foot';
import { movedKm, previewOf } from './preview';
import type { Draft } from './use-draft';

interface Props {
  readonly draft: Draft;
  readonly readOnly: string | null;
}

const ONE_BLOCK = new Set(['block']);

export function RotationsLedger({ draft, readOnly }: Props) {
  const { store, scene } = useBench();
  const code = useWorkbench((state) => state.block);
  const nameOf = useNames();
  const [editing, setEditing] = useState<Editing | null>(null);
  const [start, setStart] = useState<string | null>(null);
  const block = findSceneBlock(scene, code);
  const codes = useMemo(() => scene.blocks.map((b) => b.code), [scene.blocks]);
  const columns = useMemo(
    () => rotationColumns(codes).filter(({ key }) => !(block && ONE_BLOCK.has(key))),
    [codes, block],
  );
  const rows = useRows(draft, code);
  const shown = useUncertaintyColumn(code);

  useEffect(() => {
    previewModel(store, editing ? previewOf(editing, draft.blocks, draft.rotations) : null);
    return () => previewModel(store, null);
  }, [store, editing, draft.blocks, draft.rotations]);

  const add = useCallback(
    (after: string | null) => {
      const like =
        draft.rotations.find((row) => row.id === after) ??
        draft.rotations.filter((row) => row.block === code).at(-1);
      const id = crypto.randomUUID();
      const base = {
        ...BLANK_ROTATION,
        block: code ?? like?.block ?? '',
        relative_to: like?.relative_to ?? '',
        evidence: like?.evidence ?? 'unconstrained',
      };
      draft.change({ table: 'rotations', columns, changes: [], made: [{ id, base }] });
      setStart(id);
    },
    [draft, code, columns],
  );

  const display = (column: Column, value: unknown, row: GridRow): ReactNode => {
    if (row.computed && column.key === 'evidence') return 'between the rows around it';
    if (value === null || value === undefined || value === '') return '';
    if (column.key === 'age_ma') {
      const used = row.tone === 'in use' || row.computed;
      return (
        <span className={used ? 'font-semibold' : ''}>
          {row.ruled && <span className="sr-only">hand-over, </span>}
          {ageValue(value as number)}
        </span>
      );
    }
    if (column.numeric)
      return number(
        value as number,
        column.key === 'age_two_sigma_ma' ? 1 : decimals(value as number, row.computed),
      );
    if (column.key === 'relative_to' || column.key === 'block') return nameOf(value as string);
    if (column.key !== 'evidence') return value as string;
    return (
      <span className="inline-flex items-center gap-2">
        <EvidenceSwatch evidence={value as string} />
        {value as string}
      </span>
    );
  };

  return (
    <>
      <Grid
        label={block ? `Rotations of ${block.name}` : 'Rotations'}
        columns={columns}
        shown={shown}
        rows={rows}
        pending={draft.pending}
        readOnly={readOnly !== null}
        display={display}
        start={start}
        inSight={
          rows.find((row) => row.computed)?.id ?? rows.find((row) => row.tone === 'in use')?.id ?? null
        }
        empty={<Empty name={block?.name ?? null} canAdd={readOnly === null} onAdd={() => add(null)} />}
        onChanges={(changes, made) =>
          draft.change({
            table: 'rotations',
            columns,
            changes,
            made: made.map((id) => ({ id, base: { ...BLANK_ROTATION, block: code ?? '' } })),
          })
        }
        onEditing={(cell) => {
          draft.onCell(cell !== null);
          setEditing(cell);
        }}
        onDelete={(ids) => draft.remove('rotations', ids)}
        onAdd={add}
        onRow={() => undefined}
      />
      <Foot
        draft={draft}
        readOnly={readOnly}
        editing={editing !== null}
        add={() => add(null)}
        addLabel="Add a row"
      >
        {editing && <EditingWords editing={editing} draft={draft} />}
      </Foot>
    </>
  );
}

/** Two decimals, or as many as the row was entered with. */
function decimals(value: number, computed = false): number {
  if (computed) return 2;
  const entered = /\.(\d+)/.exec(String(value))?.[1]?.length ?? 0;
  return Math.min(6, Math.max(2, entered));
}

function Empty({ name, canAdd, onAdd }: { name: string | null; canAdd: boolean; onAdd: () => void }) {
  return (
    <>
      No rotations {name ? `of ${name} ` : ''}yet.{' '}
      {canAdd && (
        <>
          <button className="link" onClick={onAdd}>
            Add one
          </button>{' '}
          or{' '}
          <a className="link" href="import">
            import
          </a>
          , or paste rows from a spreadsheet.
        </>
      )}
    </>
  );
}

/** Saved and new rows, in age order, the computed row among them, those in use bold. */
function useRows(draft: Draft, code: string | null): readonly GridRow[] {
  const { model } = useBench();
  const age = useCalmAge();
  return useMemo(() => {
    const link = code === null ? null : linkAt(model, code, age);
    const used = new Set(link ? [link.younger.id, link.older.id] : []);
    const handOvers = firstRowsOfLegs(model, code);
    const saved = draft.rotations
      .filter((row) => code === null || row.block === code)
      .map((row): GridRow => ({
        id: row.id,
        fields: row,
        ruled: handOvers.has(row.id),
        ...(draft.conflict?.rows.has(row.id)
          ? { tone: 'conflict' }
          : used.has(row.id)
            ? { tone: 'in use' }
            : {}),
        ...(handOvers.has(row.id) ? { mark: <HandOverMark /> } : {}),
      }));
    const known = new Set(draft.rotations.map((row) => row.id));
    const made = [...draft.pending]
      .filter(([id, row]) => row.isNew && !known.has(id) && 'relative_to' in row.base)
      .map(([id, row]): GridRow => ({ id, fields: row.base }));
    const ordered = [...saved].sort((a, b) => order(model, code, a, b));
    if (link && link.younger.id !== link.older.id) {
      const pole = toPole(link.quaternion, link.older);
      const fields = {
        block: code,
        relative_to: link.relative_to,
        age_ma: age,
        ...pole,
        source: null,
      };
      const at = ordered.findIndex((row) => row.id === link.older.id);
      ordered.splice(at < 0 ? ordered.length : at, 0, { id: 'computed', fields, computed: true });
    }
    return [...ordered, ...made];
  }, [draft.rotations, draft.pending, draft.conflict, code, model, age]);
}

const HandOverMark = () => (
  <svg viewBox="0 0 8 8" className="fill-ochre mt-1.5 size-2" aria-hidden="true">
    <path d="M4 0 8 4 4 8 0 4Z" />
  </svg>
);

function linkAt(model: Model, code: string, age: number): Link | null {
  const block = model.blocks.find((b) => b.code === code);
  const leg = block?.legs.find(({ younger_ma, older_ma }) => age >= younger_ma && age <= older_ma);
  if (!leg) return null;
  try {
    const pose = poseAt(model, code, age, leg.relative_to);
    return pose.status === 'placed' && pose.links.length === 1 ? pose.links[0]! : null;
  } catch {
    return null;
  }
}

function firstRowsOfLegs(model: Model, code: string | null): ReadonlySet<string> {
  const block = model.blocks.find((b) => b.code === code);
  return new Set((block?.legs ?? []).slice(1).flatMap((leg) => leg.rows[0]?.id ?? []));
}

/** Blocks by code, then ages, then the order of the legs at a hand-over. */
function order(model: Model, code: string | null, a: GridRow, b: GridRow): number {
  const [x, y] = [a.fields, b.fields] as { block: string; age_ma: number }[];
  if (x!.block !== y!.block) return x!.block < y!.block ? -1 : 1;
  if (x!.age_ma !== y!.age_ma) return x!.age_ma - y!.age_ma;
  const legs = model.blocks.find((block) => block.code === (code ?? x!.block))?.legs ?? [];
  const leg = (row: GridRow): number => legs.findIndex((l) => l.rows.some(({ id }) => id === row.id));
  return leg(a) - leg(b);
}

/** How far the row's own covariance reaches at the block's point: semi-major axis of its 95 % ellipse. */
function useUncertaintyColumn(code: string | null): readonly ShownColumn[] {
  const { scene, model } = useBench();
  return useMemo(() => {
    const block = findSceneBlock(scene, code);
    const point = block && ownPoint(scene, block);
    if (!point) return [];
    const compiled = new Map<string, { row: CompiledRow; relative_to: string }>();
    for (const leg of model.blocks.find((b) => b.code === code)?.legs ?? [])
      for (const row of leg.rows) compiled.set(row.id, { row, relative_to: leg.relative_to });
    const show = ({ id, computed, fields }: GridRow): ReactNode => {
      const found = compiled.get(id);
      const reach = found
        ? rowReach(model, point, found.row, found.relative_to)
        : computed
          ? linkReach(model, point, fields)
          : undefined;
      return (
        <span className="tabular block text-right">
          {reach === undefined ? '' : reach === null ? 'none' : number(reach)}
        </span>
      );
    };
    return [{ key: 'reach', heading: '95 %', unit: 'km', width: '48px', after: 'angle_deg', show }];
  }, [scene, model, code]);
}

function rowReach(model: Model, point: NamedPoint, row: CompiledRow, relative_to: string): number | null {
  const link: Link = {
    block: point.block,
    relative_to,
    direction: 'up',
    quaternion: row.quaternion,
    younger: row,
    older: row,
    fraction: 0,
    stage: null,
    extrapolated: false,
  };
  return reachOf(model, point, { status: 'placed', quaternion: row.quaternion, links: [link] });
}

function linkReach(model: Model, point: NamedPoint, fields: GridRow['fields']): number | null {
  const pose = poseAt(model, point.block, fields['age_ma'] as number, fields['relative_to'] as string);
  return pose.status === 'placed' ? reachOf(model, point, pose) : null;
}

function reachOf(model: Model, point: NamedPoint, pose: Parameters<typeof pointEllipse>[0]): number | null {
  return (
    pointEllipse(pose, poseUncertainty(model, pose), toVector(point.lat, point.lon))?.semi_major_km ?? null
  );
}

interface WordsProps {
  readonly editing: Editing;
  readonly draft: Draft;
}

/** "Angle at 66.0 Ma: was 9.64. Moves Sable 23 km at 66.0 Ma." */
function EditingWords({ editing, draft }: WordsProps) {
  const { scene } = useBench();
  const preview = useWorkbench((state) => state.draftModel);
  const heldStill = useWorkbench((state) => state.heldStill);
  const nameOf = useNames();
  const { column } = editing;
  const row = draft.rotations.find(({ id }) => id === editing.row);
  const typed = column.read(editing.text);
  if (!typed.ok) return <span className="text-madder">{`${column.heading}: ${typed.problem}.`}</span>;
  if (!row) return <>A new row.</>;
  const block = findSceneBlock(scene, row.block);
  const point = block && ownPoint(scene, block);
  const km =
    preview && draft.model && point ? movedKm(draft.model, preview, point, row.age_ma, heldStill) : null;
  const was = (row as unknown as Record<string, unknown>)[editing.key];
  const before =
    was === null || was === ''
      ? 'was blank'
      : `was ${typeof was === 'number' ? number(was, decimals(was)) : String(was)}`;
  return (
    <>
      {column.heading} at {ageValue(row.age_ma)} Ma: {before}.{' '}
      {km !== null && (
        <>
          Moves {nameOf(row.block)} <strong className="font-semibold">{number(km)} km</strong> at{' '}
          {ageValue(row.age_ma)} Ma.
        </>
      )}
    </>
  );
}

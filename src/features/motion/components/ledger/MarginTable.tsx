/** Relative motion across a margin: how fast two blocks close on one another, slip, and at which angle, age by age. */
import { useMemo, useState } from 'react';
import type { ConvergencePoint } from '../../../../kernel/kinematics';
import { number, shortAge } from '../../format';
import { acrossMargin, marginAt, type Margin } from '../../scene/margin';
import type { NamedPoint } from '../../scene/points';
import { select, setAge } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';
import { useNames } from '../use-names';
import { NumberField } from './NumberField';

interface Props {
  readonly slug: string;
  readonly version: 'draft' | number;
}

export function MarginTable({ slug, version }: Props) {
  const { scene, point } = useBench();
  const others = scene.blocks.filter(({ code, outlines }) => outlines.length > 0 && code !== point?.block);
  if (!point || others.length === 0) {
    return (
      <p className="t-body text-ink-2 grow px-3.5 py-3">
        Click a block on the globe, or pick one with <kbd>/</kbd>: a margin lies between it and another.
      </p>
    );
  }
  return (
    <Table
      key={point.block}
      slug={slug}
      version={version}
      point={point}
      others={others.map(({ code }) => code)}
    />
  );
}

interface TableProps extends Props {
  readonly point: NamedPoint;
  readonly others: readonly string[];
}

function Table({ slug, version, point, others }: TableProps) {
  const { store, model } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const span = useWorkbench((state) => state.path);
  const [margin, setMargin] = useState<Margin>(() =>
    marginAt(model, point, others.includes(heldStill) ? heldStill : others[0]!, store.getState().age),
  );
  const older = span.older_ma ?? model.oldest_ma;
  const younger = Math.min(span.younger_ma ?? 0, older);
  const points = useMemo(
    () =>
      acrossMargin(model, {
        block: point.block,
        relative_to: margin.relative_to,
        lat: margin.lat,
        lon: margin.lon,
        margin_azimuth_deg: margin.azimuth,
        older_ma: older,
        younger_ma: younger,
        step_ma: span.step_ma,
      }),
    [model, point.block, margin, older, younger, span.step_ma],
  );
  const query = new URLSearchParams({
    version: String(version),
    block: point.block,
    relative_to: margin.relative_to,
    lat: String(margin.lat),
    lon: String(margin.lon),
    margin_azimuth: String(margin.azimuth),
    older_ma: String(older),
    younger_ma: String(younger),
    step_ma: String(span.step_ma),
    format: 'csv',
  });
  const nameOf = useNames();
  return (
    <>
      <MarginForm point={point} others={others} margin={margin} onChange={setMargin} />
      <div className="min-h-0 grow overflow-auto" tabIndex={0} role="region" aria-label="Across the margin">
        <Rows points={points} />
      </div>
      <div className="border-frame t-body flex min-h-8 flex-wrap items-center gap-x-4 border-t px-3.5 py-1">
        <p className="text-ink-2 grow">
          {nameOf(point.block)} lies left of the margin, looking along it, {nameOf(margin.relative_to)} right.
          Closing is positive.
        </p>
        <a
          className="button min-h-6 px-2"
          href={`/api/projects/${encodeURIComponent(slug)}/convergence?${query}`}
          download
        >
          CSV
        </a>
      </div>
    </>
  );
}

interface FormProps extends Pick<TableProps, 'point' | 'others'> {
  readonly margin: Margin;
  readonly onChange: (margin: Margin) => void;
}

function MarginForm({ point, others, margin, onChange }: FormProps) {
  const { store, model, scene } = useBench();
  const nameOf = useNames();
  const set = (change: Partial<Margin>): void => onChange({ ...margin, ...change });
  const choice = 'border-edge bg-sheet h-7 rounded-[3px] border px-1';
  return (
    <form
      className="border-rule t-body flex flex-wrap items-end gap-x-3 gap-y-1 border-b px-3.5 py-1.5"
      onSubmit={(event) => event.preventDefault()}
    >
      <label>
        <span className="t-label text-ink-2 block">Left, moving</span>
        <select
          className={choice}
          value={point.block}
          onChange={(event) => select(store, event.target.value)}
        >
          {scene.blocks
            .filter(({ outlines }) => outlines.length > 0)
            .map(({ code, name }) => (
              <option key={code} value={code}>
                {name}
              </option>
            ))}
        </select>
      </label>
      <label>
        <span className="t-label text-ink-2 block">Right, held still</span>
        <select
          className={choice}
          value={margin.relative_to}
          onChange={(event) =>
            onChange({
              ...marginAt(model, point, event.target.value, store.getState().age),
              azimuth: margin.azimuth,
            })
          }
        >
          {others.map((code) => (
            <option key={code} value={code}>
              {nameOf(code)}
            </option>
          ))}
        </select>
      </label>
      <NumberField label="At, °N" value={margin.lat} least={-90} most={90} onKeep={(lat) => set({ lat })} />
      <NumberField label="°E" value={margin.lon} least={-360} most={360} onKeep={(lon) => set({ lon })} />
      <NumberField
        label="Margin’s azimuth, °"
        value={margin.azimuth}
        least={-360}
        most={360}
        onKeep={(azimuth) => set({ azimuth })}
      />
    </form>
  );
}

const HEAD = [
  ['Age', 'Ma'],
  ['Closing', 'mm/yr'],
  ['Slip', 'mm/yr'],
  ['Speed', 'mm/yr'],
  ['Azimuth', '°'],
  ['Obliquity', '°'],
] as const;

function Rows({ points }: { readonly points: readonly ConvergencePoint[] }) {
  const { store, scene } = useBench();
  const age = useWorkbench((state) => state.age);
  const cell = (value: number | null, digits: number): string =>
    value === null ? '' : number(value, digits);
  if (points.length === 0)
    return (
      <p className="t-body text-ink-2 px-3.5 py-3">
        Not computed: the circuit between the two runs in a loop.
      </p>
    );
  return (
    <table className="t-table w-full border-collapse">
      <thead className="bg-paper sticky top-0">
        <tr className="border-frame border-b [&>th]:px-2 [&>th]:py-1 [&>th]:text-right [&>th]:font-medium">
          {HEAD.map(([name, unit]) => (
            <th key={name} scope="col">
              {name} <span className="text-ink-2 block font-normal">{unit}</span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {points.map((point) => (
          <tr
            key={point.age_ma}
            className={`border-rule tabular h-[21px] border-b text-right [&>td]:px-2 ${Math.abs(point.age_ma - age) < 0.05 ? 'bg-ochre-wash' : ''}`}
          >
            <td>
              <button
                className={`hover:underline ${point.at_row ? 'font-semibold' : ''}`}
                onClick={() => setAge(store, point.age_ma, scene.oldest)}
                title={point.at_row ? 'age of a row' : 'between rows'}
              >
                {point.at_row && <span aria-hidden="true">▏</span>}
                {shortAge(point.age_ma)}
              </button>
            </td>
            {point.status === 'placed' ? (
              <>
                <td>{cell(point.normal_mm_yr, 1)}</td>
                <td>{cell(point.tangential_mm_yr, 1)}</td>
                <td>{cell(point.speed_mm_yr, 1)}</td>
                <td>{cell(point.azimuth_deg, 0).padStart(3, '0')}</td>
                <td>{cell(point.obliquity_deg, 0)}</td>
              </>
            ) : (
              <td colSpan={5} className="text-ink-2 text-left">
                {point.status}
              </td>
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

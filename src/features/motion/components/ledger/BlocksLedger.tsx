/** All blocks and frames; the row under the cursor is the selected block. */
import { useState, type ReactNode } from 'react';
import { Grid } from '../../../ledger/components/Grid';
import type { GridRow, ShownColumn } from '../../../ledger/components/grid-props';
import type { Column } from '../../../ledger/grid/column';
import { BLANK_BLOCK, BLOCK_COLUMNS } from '../../../ledger/grid/columns';
import { number } from '../../format';
import { select } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';
import { EvidenceSwatch } from '../globe/Legend';
import { Foot } from './Foot';
import type { Draft } from './use-draft';

interface Props {
  readonly draft: Draft;
  readonly readOnly: string | null;
}

export function BlocksLedger({ draft, readOnly }: Props) {
  const { store } = useBench();
  const code = useWorkbench((state) => state.block);
  const [editing, setEditing] = useState(false);
  const [start, setStart] = useState<string | null>(null);
  const known = new Set(draft.blocks.map(({ id }) => id));
  const made = [...draft.pending].filter(([id, row]) => row.isNew && !known.has(id) && 'kind' in row.base);
  const rows: GridRow[] = [
    ...draft.blocks.map((block): GridRow => ({
      id: block.id,
      fields: block,
      ...(draft.conflict?.rows.has(block.id)
        ? { tone: 'conflict' }
        : block.code === code
          ? { tone: 'in use' }
          : {}),
    })),
    ...made.map(([id, row]): GridRow => ({ id, fields: row.base })),
  ];
  const byId = new Map(draft.blocks.map((block) => [block.id, block]));
  const outlines: ShownColumn = {
    key: 'outlines',
    heading: 'Outline',
    unit: 'vertices',
    width: '76px',
    show: ({ id }) => {
      const block = byId.get(id);
      const vertices = block?.outlines.reduce((sum, o) => sum + o.vertices, 0) ?? 0;
      return <span className="tabular block text-right">{vertices > 0 ? number(vertices) : 'none'}</span>;
    },
  };
  const add = (): void => {
    const id = crypto.randomUUID();
    draft.change({ table: 'blocks', columns: BLOCK_COLUMNS, changes: [], made: [{ id, base: BLANK_BLOCK }] });
    setStart(id);
  };
  const display = (column: Column, value: unknown): ReactNode => {
    if (value === null || value === undefined) {
      return column.key === 'appears_ma' ? (
        <span className="text-ink-3">no known start</span>
      ) : column.key === 'disappears_ma' ? (
        <span className="text-ink-3">still present</span>
      ) : (
        ''
      );
    }
    if (column.key !== 'evidence') return column.numeric ? number(value as number, 1) : (value as string);
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
        label="Blocks and frames"
        columns={BLOCK_COLUMNS}
        shown={[outlines]}
        rows={rows}
        pending={draft.pending}
        readOnly={readOnly !== null}
        display={display}
        start={start}
        empty={
          <>
            No blocks yet.{' '}
            <a className="link" href="import">
              Import outlines
            </a>
            , or draw one on the globe.
          </>
        }
        onChanges={(changes, ids) =>
          draft.change({
            table: 'blocks',
            columns: BLOCK_COLUMNS,
            changes,
            made: ids.map((id) => ({ id, base: BLANK_BLOCK })),
          })
        }
        onEditing={(cell) => {
          draft.onCell(cell !== null);
          setEditing(cell !== null);
        }}
        onDelete={(ids) => draft.remove('blocks', ids)}
        onAdd={add}
        onRow={(id) => {
          const block = byId.get(id);
          if (block && block.code !== code && block.outlines.length > 0) select(store, block.code);
        }}
      />
      <Foot draft={draft} readOnly={readOnly} editing={editing} add={add} addLabel="Add a block">
        {editing ? 'A code is what rotations name: changing it carries them along.' : null}
      </Foot>
    </>
  );
}

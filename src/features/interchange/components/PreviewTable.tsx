import type { PreviewRow } from '../contract';

interface Props {
  readonly rows: readonly PreviewRow[];
  readonly accepted: number;
}

const CHANGES = {
  new: 'new',
  replaces: 'replaces',
  unchanged: 'as it is',
  kept: 'draft stays',
  removed: 'goes from the draft',
} as const;

/** The first rows as they would stand in the ledger. */
export function PreviewTable({ rows, accepted }: Props) {
  const columns = Object.keys(rows[0]?.cells ?? {});
  return (
    <div>
      <h3 className="t-head">
        As it would stand{' '}
        {rows.length < accepted && (
          <span className="text-ink-2 font-normal">
            first {rows.length} of {accepted}
          </span>
        )}
      </h3>
      <div
        className="mt-1 max-h-96 overflow-auto"
        tabIndex={0}
        role="region"
        aria-label="Preview of the rows"
      >
        <table className="ruled">
          <thead>
            <tr>
              <th className="number">Line</th>
              <th>Change</th>
              {columns.map((column) => (
                <th key={column}>{column}</th>
              ))}
            </tr>
          </thead>
          <tbody>
            {rows.map((row, i) => (
              <tr key={i}>
                <td className="number text-ink-2">{row.line ?? ''}</td>
                <td
                  className={
                    row.change === 'replaces' || row.change === 'removed' ? 'text-ochre-ink' : 'text-ink-2'
                  }
                >
                  {CHANGES[row.change]}
                </td>
                {columns.map((column) => (
                  <td key={column} className={typeof row.cells[column] === 'number' ? 'number' : ''}>
                    {row.cells[column] ?? ''}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </div>
  );
}

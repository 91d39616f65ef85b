import type { RejectedRow } from '../contract';

interface Props {
  readonly rows: readonly RejectedRow[];
  readonly beyond: number;
  readonly file: string;
}

/** Every rejected row by line and column: what was read, what is wrong, how to mend it. */
export function RejectedTable({ rows, beyond, file }: Props) {
  return (
    <div>
      <h3 className="t-head">Rejected in {file}</h3>
      <div className="mt-1 max-h-96 overflow-auto" tabIndex={0} role="region" aria-label="Rejected rows">
        <table className="ruled">
          <thead>
            <tr>
              <th className="number">Line</th>
              <th>Column</th>
              <th>Read</th>
              <th>Problem</th>
              <th>To mend it</th>
            </tr>
          </thead>
          <tbody>
            {rows.map((row, i) => (
              <tr key={i}>
                <td className="number">
                  {row.line ?? ''}
                  {row.entry && (
                    <span className="text-ink-2 block whitespace-nowrap">feature {row.entry}</span>
                  )}
                </td>
                <td>{row.column ?? ''}</td>
                <td className="text-madder max-w-56 break-words">{row.read === '' ? 'nothing' : row.read}</td>
                <td>{row.problem}</td>
                <td className="text-ink-2">{row.hint}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {beyond > 0 && <p className="t-body text-ink-2 mt-2">and {beyond} more</p>}
    </div>
  );
}

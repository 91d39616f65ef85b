import { useState } from 'react';
import type { ColumnMapping, ImportReport } from '../contract';

interface Props {
  readonly table: NonNullable<ImportReport['table']>;
  readonly mapping: ColumnMapping;
  readonly onChange: (mapping: ColumnMapping) => void;
}

/** For a table with headings of its own: which of them holds what. */
export function ColumnChoice({ table, mapping, onChange }: Props) {
  const [chosen, setChosen] = useState<ColumnMapping>(mapping);
  const headingOf = (column: string): string =>
    Object.keys(chosen).find((heading) => chosen[heading] === column) ?? '';
  const choose = (column: string, heading: string): void => {
    const rest = Object.entries(chosen).filter(([h, c]) => c !== column && h !== heading);
    setChosen(Object.fromEntries(heading === '' ? rest : [...rest, [heading, column]]));
  };
  return (
    <form
      className="border-edge border p-4"
      onSubmit={(e) => {
        e.preventDefault();
        onChange(chosen);
      }}
    >
      <h3 className="t-head">Which of your columns holds what?</h3>
      <div className="mt-3 grid grid-cols-3 gap-x-6 gap-y-2 max-md:grid-cols-1">
        {table.columns.map((column) => (
          <label key={column} className="t-body flex items-center justify-between gap-3">
            <span className={table.required.includes(column) ? 'font-medium' : 'text-ink-2'}>{column}</span>
            <select
              className="border-edge bg-sheet min-h-7 w-40 border px-1"
              value={headingOf(column)}
              onChange={(e) => choose(column, e.target.value)}
            >
              <option value="">by its name</option>
              {table.headings.map((heading) => (
                <option key={heading} value={heading}>
                  {heading}
                </option>
              ))}
            </select>
          </label>
        ))}
      </div>
      <button className="button mt-4">Read again with these columns</button>
    </form>
  );
}

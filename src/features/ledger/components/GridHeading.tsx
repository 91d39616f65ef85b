/** The headings of a grid, and the order in which edited and shown columns stand. */
import type { Column } from '../grid/column';
import type { ShownColumn } from './grid-props';

export type Slot =
  | { readonly of: Column; readonly column: Column; readonly index: number; readonly shown: null }
  | { readonly of: ShownColumn; readonly column: null; readonly index: -1; readonly shown: ShownColumn };

/** Edited and shown columns in the order in which they stand. */
export function slotsOf(columns: readonly Column[], shown: readonly ShownColumn[]): readonly Slot[] {
  const behind = (key: string | undefined): Slot[] =>
    shown.filter((c) => c.after === key).map((c) => ({ of: c, column: null, index: -1, shown: c }));
  return [
    ...columns.flatMap((c, index): Slot[] => [{ of: c, column: c, index, shown: null }, ...behind(c.key)]),
    ...behind(undefined),
  ];
}

export function GridHeading({ slots }: { readonly slots: readonly Slot[] }) {
  return (
    <div role="rowgroup" className="bg-paper sticky top-0 z-10">
      <div role="row" aria-rowindex={1} className="border-frame grid grid-cols-(--columns) border-b">
        {slots.map(({ of, column }, i) => (
          <div
            key={of.key}
            role="columnheader"
            aria-colindex={i + 1}
            className={`px-2 py-1 font-medium ${!column || column.numeric ? 'text-right' : ''}`}
          >
            {of.heading}
            <span className="text-ink-2 block font-normal">{of.unit ?? '\u00a0'}</span>
          </div>
        ))}
      </div>
    </div>
  );
}

/**
 * A ledger as a grid of cells (WAI-ARIA grid pattern): arrows move, typing or Enter edits, Enter keeps, Escape puts back,
 * Shift with arrows takes a block of cells, copy and paste work as in a spreadsheet. Only the rows in sight are drawn.
 */
import { useVirtualizer } from '@tanstack/react-virtual';
import { useCallback, useId, useLayoutEffect, useMemo, useRef } from 'react';
import { cellAt, within } from '../grid/selection';
import type { GridProps, GridRow } from './grid-props';
import { GridCell } from './GridCell';
import { GridHeading, slotsOf, type Slot } from './GridHeading';
import { useGrid } from './use-grid';

const ROW = 21;

export function Grid(props: GridProps) {
  const { label, columns, shown = NO_COLUMNS, rows, pending, readOnly } = props;
  const scroller = useRef<HTMLDivElement>(null);
  const grid = useRef<HTMLDivElement>(null);
  const id = useId();
  const slots = useMemo(() => slotsOf(columns, shown), [columns, shown]);
  const template = useMemo(() => templateOf(slots, rows), [slots, rows]);
  const virtual = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW,
    overscan: 12,
  });
  const height = virtual.getTotalSize();
  // Set by script: the policy for styles refuses style attributes in what the server sends.
  useLayoutEffect(() => {
    grid.current?.style.setProperty('--columns', template);
    grid.current?.style.setProperty('--rows', `${height}px`);
  }, [template, height]);
  const scrollTo = useCallback(
    (row: number, align?: 'center') => virtual.scrollToIndex(row, align ? { align } : {}),
    [virtual],
  );
  const work = useGrid(props, { grid, scrollTo });
  const { selection, edit, textAt, goTo, begin, type, keep, putBack } = work;

  const items = virtual.getVirtualItems();
  const active = `${id}-${selection.at.row}-${selection.at.column}`;
  return (
    <div ref={scroller} className="min-h-0 grow overflow-auto">
      <div
        ref={grid}
        role="grid"
        aria-label={label}
        aria-rowcount={rows.length + 1}
        aria-colcount={columns.length + shown.length}
        aria-readonly={readOnly}
        aria-multiselectable
        aria-activedescendant={rows.length > 0 ? active : undefined}
        tabIndex={0}
        className="t-table group relative min-w-max outline-offset-[-2px]"
        onKeyDown={work.onKey}
        onCopy={work.onCopy}
        onPaste={work.onPaste}
      >
        <GridHeading slots={slots} />
        {rows.length === 0 ? (
          <div className="t-body text-ink-2 px-3.5 py-3">{props.empty}</div>
        ) : (
          <div role="rowgroup" className="relative h-(--rows)">
            {items.map((item) => {
              const row = rows[item.index]!;
              return (
                <div
                  key={row.id}
                  role="row"
                  aria-rowindex={item.index + 2}
                  className={rowClass(row)}
                  style={{
                    height: item.size,
                    transform: `translateY(${item.start}px)`,
                  }}
                >
                  {row.mark && (
                    <span aria-hidden="true" className="absolute left-0.5">
                      {row.mark}
                    </span>
                  )}
                  {slots.map((slot) => {
                    if (slot.shown) {
                      return (
                        <div
                          key={slot.of.key}
                          role="gridcell"
                          className="truncate px-2 leading-[20px]"
                          // What is typed after a press here must not land in the cell chosen before.
                          onPointerDown={(event) => {
                            event.preventDefault();
                            grid.current?.blur();
                          }}
                        >
                          {slot.shown.show(row)}
                        </div>
                      );
                    }
                    const { column, index: j } = slot;
                    const place = { row: item.index, column: j };
                    const waiting = pending.get(row.id)?.cells[column.key];
                    return (
                      <GridCell
                        key={column.key}
                        id={`${id}-${item.index}-${j}`}
                        column={column}
                        index={j + 1}
                        text={textAt(place)}
                        shown={waiting ? waiting.text : props.display(column, row.fields[column.key], row)}
                        problem={waiting?.problem ?? null}
                        pending={waiting !== undefined}
                        computed={row.computed ?? false}
                        readOnly={readOnly}
                        selected={within(selection, place)}
                        active={cellAt(selection, place)}
                        editing={
                          edit !== null && cellAt({ at: edit.place, from: edit.place }, place)
                            ? edit.text
                            : null
                        }
                        onPress={(extend) => goTo({ at: place, from: extend ? selection.from : place })}
                        onBegin={() => begin(place)}
                        onType={type}
                        onKeep={keep}
                        onPutBack={putBack}
                        onSpread={work.spread}
                      />
                    );
                  })}
                </div>
              );
            })}
          </div>
        )}
      </div>
    </div>
  );
}

/** Pixels that a digit and the padding of a cell take. */
const DIGIT = 7;
const PADDING = 16;
/** Rows that are measured: a longer table repeats itself. */
const MEASURED = 2000;

/** Tracks of the grid: the columns' own widths, numbers as wide as the longest of them needs. */
function templateOf(slots: readonly Slot[], rows: readonly GridRow[]): string {
  return slots
    .map(({ of, column }) => {
      if (!column?.numeric) return of.width;
      const longest = rows
        .slice(0, MEASURED)
        .reduce((most, row) => Math.max(most, shownLength(row, column.key)), 0);
      return `max(${of.width}, ${Math.ceil(longest * DIGIT + PADDING)}px)`;
    })
    .join(' ');
}

/** A computed value is shown rounded, an entered one as it was entered. */
function shownLength({ fields, computed }: GridRow, key: string): number {
  const value = fields[key];
  if (typeof value !== 'number') return 0;
  const rounded = value.toFixed(/age|_ma$/.test(key) ? 1 : 2).length;
  return computed ? rounded : Math.max(String(value).length, rounded);
}

function rowClass(row: GridRow): string {
  const base = 'absolute inset-x-0 top-0 grid grid-cols-(--columns) border-b border-rule';
  const tone = row.computed
    ? ' bg-ochre-wash text-ochre-ink font-medium'
    : row.tone === 'conflict'
      ? ' bg-madder-wash'
      : '';
  return `${base}${tone}${row.ruled ? ' border-t border-t-frame' : ''}`;
}

const NO_COLUMNS: NonNullable<GridProps['shown']> = [];

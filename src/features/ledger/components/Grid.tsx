/**
 * A ledger as a grid of cells (WAI-ARIA grid pattern): arrows move, typing or Enter edits, Enter keeps, Escape puts back,
 * Shift with arrows takes a block of cells, copy and paste work as in a spreadsheet. Only the rows in sight are drawn.
 */
import { useVirtualizer } from '@tanstack/react-virtual';
import {
  useCallback,
  useEffect,
  useId,
  useLayoutEffect,
  useMemo,
  useRef,
  useState,
  type ClipboardEvent,
  type KeyboardEvent,
  type ReactNode,
} from 'react';
import { readCells, writeCells } from '../grid/clipboard';
import type { Column } from '../grid/column';
import { pasteAt, type CellChange, type Pending } from '../grid/pending';
import { cellAt, move, START, within, type Place, type Selection } from '../grid/selection';
import { GridCell } from './GridCell';

export interface GridRow {
  readonly id: string;
  readonly fields: Readonly<Record<string, unknown>>;
  /** A row that is worked out rather than entered: shown between its neighbours, never edited. */
  readonly computed?: boolean;
  readonly tone?: 'in use' | 'conflict';
  /** Drawn before the first cell, as a mark of a finding. */
  readonly mark?: ReactNode;
  /** A heavier line above: a hand-over. */
  readonly ruled?: boolean;
}

/** A column that is shown and not edited. */
export interface ShownColumn {
  readonly key: string;
  readonly heading: string;
  readonly unit?: string;
  readonly width: string;
  /** Key of the column that it stands behind; at the end where there is none. */
  readonly after?: string;
  readonly show: (row: GridRow) => ReactNode;
}

export interface Editing extends CellChange {
  readonly column: Column;
}

interface Props {
  readonly label: string;
  readonly columns: readonly Column[];
  readonly shown?: readonly ShownColumn[];
  readonly rows: readonly GridRow[];
  readonly pending: Pending;
  readonly readOnly: boolean;
  readonly empty: ReactNode;
  readonly display: (column: Column, value: unknown, row: GridRow) => ReactNode;
  readonly onChanges: (changes: readonly CellChange[], newRows: readonly string[]) => void;
  readonly onEditing: (editing: Editing | null) => void;
  readonly onDelete: (rows: readonly string[]) => void;
  readonly onAdd: (after: string | null) => void;
  readonly onRow: (row: string) => void;
  /** Puts the focus into this row's first empty cell, and edits it, when it changes. */
  readonly start?: string | null;
  /** A row to bring into sight when it changes, while the grid is not being worked in. */
  readonly inSight?: string | null;
}

const ROW = 21;

export function Grid(props: Props) {
  const {
    label,
    columns,
    shown = [],
    rows,
    pending,
    readOnly,
    onChanges,
    onEditing,
    onDelete,
    onAdd,
    onRow,
    start = null,
  } = props;
  const [selection, setSelection] = useState<Selection>(START);
  const [edit, setEdit] = useState<{ place: Place; text: string } | null>(null);
  // Moving the focus away blurs the field, which keeps the cell: this says that it has been dealt with.
  const open = useRef(false);
  const scroller = useRef<HTMLDivElement>(null);
  const grid = useRef<HTMLDivElement>(null);
  const id = useId();
  const slots = useMemo(() => slotsOf(columns, shown), [columns, shown]);
  const template = useMemo(() => slots.map((slot) => slot.of.width).join(' '), [slots]);
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
  const size = { rows: rows.length, columns: columns.length };
  const ids = useMemo(() => rows.filter((row) => !row.computed).map((row) => row.id), [rows]);

  const goTo = useCallback(
    (next: Selection) => {
      setSelection(next);
      virtual.scrollToIndex(next.at.row);
      const row = rows[next.at.row];
      if (row && !row.computed) onRow(row.id);
    },
    [rows, virtual, onRow],
  );
  const textAt = (place: Place): string => {
    const row = rows[place.row];
    const column = columns[place.column];
    if (!row || !column) return '';
    return pending.get(row.id)?.cells[column.key]?.text ?? column.write(row.fields[column.key]);
  };
  const begin = (place: Place, text = textAt(place)): void => {
    const row = rows[place.row];
    const column = columns[place.column];
    if (readOnly || !row || row.computed || !column) return;
    open.current = true;
    setEdit({ place, text });
    onEditing({ row: row.id, key: column.key, text, column });
  };
  const type = (text: string): void => {
    if (!edit) return;
    setEdit({ ...edit, text });
    const column = columns[edit.place.column]!;
    onEditing({ row: rows[edit.place.row]!.id, key: column.key, text, column });
  };
  const putBack = (): void => {
    open.current = false;
    setEdit(null);
    onEditing(null);
    grid.current?.focus();
  };
  const keep = (then: (from: Place) => Place = (from) => from): void => {
    if (!edit || !open.current) return;
    open.current = false;
    const { place, text } = edit;
    const changed = text !== textAt(place);
    setEdit(null);
    onEditing(null);
    if (changed) onChanges([{ row: rows[place.row]!.id, key: columns[place.column]!.key, text }], []);
    const at = then(place);
    goTo({ at, from: at });
    grid.current?.focus();
  };

  const { inSight = null } = props;
  useEffect(() => {
    if (inSight === null || grid.current?.contains(document.activeElement)) return;
    const index = rows.findIndex((row) => row.id === inSight);
    if (index >= 0) virtual.scrollToIndex(index, { align: 'center' });
    // Only where the row changes its place: scrolling by hand stays as it is.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [inSight, rows.findIndex((row) => row.id === inSight)]);

  // A new row is edited at once, in its first cell without a value.
  const started = useRef<string | null>(null);
  useEffect(() => {
    if (start === null || started.current === start) return;
    const index = rows.findIndex((row) => row.id === start);
    if (index < 0) return;
    started.current = start;
    const first = columns.findIndex((c) => !c.read(c.write(rows[index]!.fields[c.key])).ok);
    const at = { row: index, column: Math.max(0, first) };
    goTo({ at, from: at });
    begin(at);
  });

  const chosenRows = (): string[] =>
    rows
      .filter((row, i) => !row.computed && within(selection, { row: i, column: selection.at.column }))
      .map((row) => row.id);

  function onKey(event: KeyboardEvent): void {
    if (edit) return;
    const { key, shiftKey, ctrlKey, metaKey, altKey } = event;
    const command = ctrlKey || metaKey;
    const done = (): void => event.preventDefault();
    const next = move(selection, { key, shiftKey, command }, size);
    if (next && !altKey) {
      done();
      goTo(next);
    } else if ((key === 'Enter' || key === 'F2') && !command) {
      done();
      begin(selection.at);
    } else if (key === 'Enter' && command) {
      done();
      if (!readOnly) onAdd(rows[selection.at.row]?.id ?? null);
    } else if ((key === 'Delete' || key === 'Backspace') && !readOnly) {
      done();
      if (command) onDelete(chosenRows());
      else clear();
    } else if (key.length === 1 && !command && !altKey) {
      done();
      begin(selection.at, key);
    }
  }

  function clear(): void {
    const changes = rows.flatMap((row, i) =>
      row.computed
        ? []
        : columns.flatMap((c, j) =>
            within(selection, { row: i, column: j }) ? [{ row: row.id, key: c.key, text: '' }] : [],
          ),
    );
    onChanges(changes, []);
  }

  function onCopy(event: ClipboardEvent): void {
    if (edit) return;
    const cells = rows.flatMap((_, i) => {
      const line = columns.flatMap((_column, j) =>
        within(selection, { row: i, column: j }) ? [textAt({ row: i, column: j })] : [],
      );
      return line.length > 0 ? [line] : [];
    });
    event.clipboardData.setData('text/plain', writeCells(cells));
    event.preventDefault();
  }

  function onPaste(event: ClipboardEvent): void {
    if (edit || readOnly) return;
    event.preventDefault();
    const cells = readCells(event.clipboardData.getData('text/plain'));
    const top = Math.min(selection.at.row, selection.from.row);
    const row = rows.slice(0, top).filter((r) => !r.computed).length;
    const anchor = { row, column: Math.min(selection.at.column, selection.from.column) };
    const { changes, newRows } = pasteAt(cells, anchor, ids, columns, () => crypto.randomUUID());
    onChanges(changes, newRows);
  }

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
        onKeyDown={onKey}
        onCopy={onCopy}
        onPaste={onPaste}
      >
        <Heading slots={slots} />
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
                        <div key={slot.of.key} role="gridcell" className="truncate px-2 leading-[20px]">
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

function rowClass(row: GridRow): string {
  const base = 'absolute inset-x-0 top-0 grid grid-cols-(--columns) border-b border-rule';
  const tone = row.computed
    ? ' bg-ochre-wash text-ochre-ink font-medium'
    : row.tone === 'conflict'
      ? ' bg-madder-wash'
      : '';
  return `${base}${tone}${row.ruled ? ' border-t border-t-frame' : ''}`;
}

type Slot =
  | { readonly of: Column; readonly column: Column; readonly index: number; readonly shown: null }
  | { readonly of: ShownColumn; readonly column: null; readonly index: -1; readonly shown: ShownColumn };

/** Edited and shown columns in the order in which they stand. */
function slotsOf(columns: readonly Column[], shown: readonly ShownColumn[]): readonly Slot[] {
  const behind = (key: string | undefined): Slot[] =>
    shown.filter((c) => c.after === key).map((c) => ({ of: c, column: null, index: -1, shown: c }));
  return [
    ...columns.flatMap((c, index): Slot[] => [{ of: c, column: c, index, shown: null }, ...behind(c.key)]),
    ...behind(undefined),
  ];
}

function Heading({ slots }: { readonly slots: readonly Slot[] }) {
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

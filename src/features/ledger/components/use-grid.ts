/** Selection, the cell under edit, keys and the clipboard of a grid. */
import {
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
  type ClipboardEvent,
  type KeyboardEvent,
  type RefObject,
} from 'react';
import { readCells, writeCells } from '../grid/clipboard';
import { pasteAt } from '../grid/paste';
import { move, START, within, type Place, type Selection } from '../grid/selection';
import type { GridProps } from './grid-props';

interface Surroundings {
  readonly grid: RefObject<HTMLDivElement | null>;
  readonly scrollTo: (row: number, align?: 'center') => void;
}

interface Edited {
  /** Its id. */
  readonly row: string;
  readonly column: number;
  readonly text: string;
}

interface Chosen {
  readonly selection: Selection;
  /** Ids of the rows of both corners. */
  readonly at: string | null;
  readonly from: string | null;
}

/** The selection where its rows stand now; a row that is gone leaves its place, within the table. */
function anchored({ selection, at, from }: Chosen, rows: GridProps['rows']): Selection {
  const place = (corner: Place, id: string | null): Place => {
    const row = id === null ? -1 : rows.findIndex((one) => one.id === id);
    return { ...corner, row: row >= 0 ? row : Math.min(corner.row, Math.max(0, rows.length - 1)) };
  };
  return { at: place(selection.at, at), from: place(selection.from, from) };
}

export function useGrid(props: GridProps, { grid, scrollTo }: Surroundings) {
  const { columns, rows, pending, readOnly, onChanges, onEditing, onDelete, onAdd, onRow } = props;
  const { start = null, inSight = null } = props;
  // Rows come and go while others edit: what is chosen and what is edited stay with their rows, not with their places.
  const [chosen, setChosen] = useState<Chosen>({ selection: START, at: null, from: null });
  const [editing, setEdit] = useState<Edited | null>(null);
  const selection = useMemo(() => anchored(chosen, rows), [chosen, rows]);
  const edit = useMemo(() => {
    const row = editing ? rows.findIndex(({ id }) => id === editing.row) : -1;
    return editing && row >= 0 ? { place: { row, column: editing.column }, text: editing.text } : null;
  }, [editing, rows]);
  // Moving the focus away blurs the field, which keeps the cell: this says that it has been dealt with.
  const open = useRef(false);
  const size = { rows: rows.length, columns: columns.length };
  const ids = useMemo(() => rows.filter((row) => !row.computed).map((row) => row.id), [rows]);

  const goTo = useCallback(
    (next: Selection) => {
      setChosen({
        selection: next,
        at: rows[next.at.row]?.id ?? null,
        from: rows[next.from.row]?.id ?? null,
      });
      scrollTo(next.at.row);
      const row = rows[next.at.row];
      if (row && !row.computed) onRow(row.id);
    },
    [rows, scrollTo, onRow],
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
    setEdit({ row: row.id, column: place.column, text });
    onEditing({ row: row.id, key: column.key, text, column });
  };
  const type = (text: string): void => {
    if (!editing) return;
    setEdit({ ...editing, text });
    const column = columns[editing.column]!;
    onEditing({ row: editing.row, key: column.key, text, column });
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
    if (changed) onChanges([{ row: rows[place.row]!.id, key: columns[place.column]!.key, text }], []);
    onEditing(null);
    const at = then(place);
    goTo({ at, from: at });
    grid.current?.focus();
  };

  // The row under edit was deleted by someone: what was typed goes the way of any edit, so that the refusal is told.
  const orphaned = editing !== null && edit === null;
  useEffect(() => {
    if (!orphaned) return;
    open.current = false;
    onChanges([{ row: editing.row, key: columns[editing.column]!.key, text: editing.text }], []);
    // The row goes with the props, once.
    // eslint-disable-next-line react-hooks/set-state-in-effect
    setEdit(null);
    onEditing(null);
  }, [orphaned, editing, columns, onChanges, onEditing]);

  useEffect(() => {
    if (inSight === null || grid.current?.contains(document.activeElement)) return;
    const index = rows.findIndex((row) => row.id === inSight);
    if (index >= 0) scrollTo(index, 'center');
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
    // The row comes with the props after it was asked for, once.
    // eslint-disable-next-line react-hooks/set-state-in-effect
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
    paste(event.clipboardData.getData('text/plain'));
  }

  const spread = (text: string): void => {
    putBack();
    paste(text);
  };

  function paste(text: string): void {
    const cells = readCells(text);
    const top = Math.min(selection.at.row, selection.from.row);
    const row = rows.slice(0, top).filter((r) => !r.computed).length;
    const anchor = { row, column: Math.min(selection.at.column, selection.from.column) };
    const { changes, newRows } = pasteAt(cells, anchor, ids, columns, () => crypto.randomUUID());
    onChanges(changes, newRows);
  }

  return { selection, edit, textAt, goTo, begin, type, keep, putBack, onKey, onCopy, onPaste, spread };
}

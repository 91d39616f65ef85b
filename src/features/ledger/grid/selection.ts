/** Which cells of a grid are taken: one active cell, and the corner from which a block of cells was drawn. */
export interface Place {
  readonly row: number;
  readonly column: number;
}

export interface Selection {
  /** The active cell. */
  readonly at: Place;
  readonly from: Place;
}

export const START: Selection = { at: { row: 0, column: 0 }, from: { row: 0, column: 0 } };

export const cellAt = ({ at }: Selection, place: Place): boolean =>
  at.row === place.row && at.column === place.column;

const between = (value: number, a: number, b: number): boolean =>
  value >= Math.min(a, b) && value <= Math.max(a, b);

export const within = ({ at, from }: Selection, place: Place): boolean =>
  between(place.row, at.row, from.row) && between(place.column, at.column, from.column);

interface Key {
  readonly key: string;
  readonly shiftKey: boolean;
  readonly command: boolean;
}

const PAGE = 10;

/** The selection after a key that moves; null for a key that does not. Shift keeps the corner. */
export function move(
  selection: Selection,
  { key, shiftKey, command }: Key,
  size: { rows: number; columns: number },
): Selection | null {
  const { row, column } = selection.at;
  const last = { row: size.rows - 1, column: size.columns - 1 };
  const to = ((): Place | null => {
    switch (key) {
      case 'ArrowUp':
        return { row: command ? 0 : row - 1, column };
      case 'ArrowDown':
        return { row: command ? last.row : row + 1, column };
      case 'ArrowLeft':
        return { row, column: command ? 0 : column - 1 };
      case 'ArrowRight':
        return { row, column: command ? last.column : column + 1 };
      case 'PageUp':
        return { row: row - PAGE, column };
      case 'PageDown':
        return { row: row + PAGE, column };
      case 'Home':
        return { row: command ? 0 : row, column: 0 };
      case 'End':
        return { row: command ? last.row : row, column: last.column };
      default:
        return null;
    }
  })();
  if (!to) return null;
  const at = { row: clamp(to.row, last.row), column: clamp(to.column, last.column) };
  return { at, from: shiftKey ? selection.from : at };
}

const clamp = (value: number, most: number): number => Math.max(0, Math.min(most, value));

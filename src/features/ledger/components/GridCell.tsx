import { useEffect, useRef, type KeyboardEvent, type ReactNode } from 'react';
import type { Column } from '../grid/column';
import type { Place } from '../grid/selection';

interface Props {
  readonly id: string;
  readonly column: Column;
  readonly index: number;
  readonly text: string;
  readonly shown: ReactNode;
  readonly problem: string | null;
  readonly pending: boolean;
  readonly computed: boolean;
  readonly readOnly: boolean;
  readonly selected: boolean;
  readonly active: boolean;
  /** The text under edit; null while the cell rests. */
  readonly editing: string | null;
  readonly onPress: (extend: boolean) => void;
  readonly onBegin: () => void;
  readonly onType: (text: string) => void;
  readonly onKeep: (then?: (from: Place) => Place) => void;
  readonly onPutBack: () => void;
  /** Several cells pasted into the one under edit: they go into the grid from here on. */
  readonly onSpread: (text: string) => void;
}

const below = (from: Place): Place => ({ ...from, row: from.row + 1 });
const beside =
  (by: number) =>
  (from: Place): Place => ({ ...from, column: Math.max(0, from.column + by) });

export function GridCell(props: Props) {
  const { id, column, index, shown, problem, pending, computed, selected, active, editing } = props;
  const look = [
    'relative px-2 leading-[20px]',
    computed ? 'whitespace-nowrap' : 'truncate',
    column.numeric ? 'text-right tabular' : '',
    problem ? 'bg-madder-wash text-madder border-b-2 border-madder' : pending ? 'border-l-2 border-kelp' : '',
    active && editing === null
      ? 'outline-ink group-focus:outline group-focus:outline-[1.5px] outline-offset-[-1.5px] bg-sheet'
      : selected && !active
        ? 'bg-sunk'
        : '',
    computed ? 'cursor-default' : 'cursor-cell',
  ].join(' ');
  return (
    <div
      id={id}
      role="gridcell"
      aria-colindex={index}
      aria-selected={selected}
      aria-readonly={props.readOnly || computed}
      aria-invalid={problem !== null}
      aria-describedby={problem ? `${id}-problem` : undefined}
      className={look}
      title={problem ?? (props.text.length > 14 ? props.text : undefined)}
      onMouseDown={(event) => props.onPress(event.shiftKey)}
      onDoubleClick={props.onBegin}
    >
      {editing === null ? shown : <CellInput {...props} editing={editing} />}
      {problem && (
        <span id={`${id}-problem`} className="sr-only">
          {problem}
        </span>
      )}
    </div>
  );
}

function CellInput({
  id,
  column,
  editing,
  onType,
  onKeep,
  onPutBack,
  onSpread,
}: Props & { readonly editing: string }) {
  const input = useRef<HTMLInputElement>(null);
  useEffect(() => {
    const field = input.current;
    if (!field) return;
    field.focus();
    field.setSelectionRange(field.value.length, field.value.length);
  }, []);
  const problem = column.read(editing);
  function onKey(event: KeyboardEvent): void {
    event.stopPropagation();
    if (event.key === 'Enter')
      onKeep(event.shiftKey ? (from) => ({ ...from, row: Math.max(0, from.row - 1) }) : below);
    else if (event.key === 'Tab') onKeep(beside(event.shiftKey ? -1 : 1));
    else if (event.key === 'Escape') onPutBack();
    else return;
    event.preventDefault();
  }
  return (
    <>
      <input
        ref={input}
        value={editing}
        aria-label={column.unit ? `${column.heading}, ${column.unit}` : column.heading}
        aria-invalid={!problem.ok}
        list={column.choices ? `${id}-choices` : undefined}
        className={`bg-sheet absolute inset-0 w-full px-1.5 outline-2 outline-offset-[-1px] ${problem.ok ? 'outline-ochre' : 'text-madder outline-madder'} ${column.numeric ? 'tabular text-right' : ''}`}
        onChange={(event) => onType(event.target.value)}
        onKeyDown={onKey}
        onBlur={() => onKeep()}
        onCopy={(event) => event.stopPropagation()}
        onPaste={(event) => {
          event.stopPropagation();
          const text = event.clipboardData.getData('text/plain');
          if (!/[\t\n]/.test(text.trim())) return;
          event.preventDefault();
          onSpread(text);
        }}
      />
      {column.choices && (
        <datalist id={`${id}-choices`}>
          {column.choices.map((choice) => (
            <option key={choice} value={choice} />
          ))}
        </datalist>
      )}
    </>
  );
}

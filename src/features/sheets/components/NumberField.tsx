/** A number in the form: what is typed stays as it is, and what cannot be used is said, not changed. */
import { useId, useState } from 'react';
import { readNumber, type NumberSpan } from '../read-number';

interface Props extends NumberSpan {
  readonly label: string;
  readonly name: string;
  readonly value: number | null;
  /** A blank is allowed, and is told as null. */
  readonly optional?: boolean;
  readonly onChange: (value: number | null) => void;
}

export function NumberField({ label, name, value, optional = false, onChange, ...span }: Props) {
  const [typed, setTyped] = useState<string | null>(null);
  const problemId = useId();
  const blank = optional && typed?.trim() === '';
  const read = typed === null || blank ? null : readNumber(typed, span);
  const problem = read && 'problem' in read ? read.problem : null;
  const type = (text: string): void => {
    setTyped(text);
    if (optional && text.trim() === '') return onChange(null);
    const next = readNumber(text, span);
    if ('value' in next) onChange(next.value);
  };
  return (
    <div className="border-rule border-b">
      <label className="t-body flex min-h-8 items-center justify-between gap-3">
        <span className="text-ink-2">{label}</span>
        <input
          className="tabular t-value min-h-7 w-24 bg-transparent text-right"
          inputMode="decimal"
          autoComplete="off"
          name={name}
          value={typed ?? (value === null ? '' : String(value))}
          aria-invalid={problem !== null}
          aria-describedby={problem === null ? undefined : problemId}
          onChange={(event) => type(event.target.value)}
          onBlur={() => problem === null && setTyped(null)}
        />
      </label>
      {problem !== null && (
        <p id={problemId} className="wrong pb-1" role="alert">
          {problem}
        </p>
      )}
    </div>
  );
}

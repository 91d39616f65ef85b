/** A number that acts when it is kept, by Enter or by leaving the field; Escape puts back. */
import { useState } from 'react';

const FIELD = 'border-edge bg-sheet tabular h-7 w-20 rounded-[3px] border px-1.5 text-right';

interface NumberFieldProps {
  readonly label: string;
  readonly value: number;
  readonly least: number;
  readonly most: number;
  readonly onKeep: (value: number) => void;
}

export function NumberField({ label, value, least, most, onKeep }: NumberFieldProps) {
  const shown = String(Math.round(value * 1e4) / 1e4);
  const [typed, setTyped] = useState<string | null>(null);
  const read = typed === null ? value : Number(typed.replace('\u2212', '-').replace(',', '.'));
  const wrong = !(Number.isFinite(read) && read >= least && read <= most) || typed?.trim() === '';
  const keep = (): void => {
    if (typed !== null && !wrong && read !== value) onKeep(read);
    if (!wrong) setTyped(null);
  };
  return (
    <label>
      <span className="t-label text-ink-2 block">{label}</span>
      <input
        className={`${FIELD} ${wrong ? 'border-madder text-madder' : ''}`}
        inputMode="decimal"
        value={typed ?? shown}
        aria-invalid={wrong}
        title={wrong ? `from ${least} to ${most}` : undefined}
        onChange={(event) => setTyped(event.target.value)}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key === 'Enter') keep();
          if (event.key === 'Escape') setTyped(null);
        }}
      />
    </label>
  );
}

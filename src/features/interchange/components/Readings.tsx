import type { Answers, Offer } from '../contract';

interface Props {
  readonly offers: readonly Offer[];
  readonly busy: boolean;
  readonly onAnswer: (answers: Answers) => void;
}

/** How the file was read where it could be read otherwise; another choice reads it again. */
export function Readings({ offers, busy, onAnswer }: Props) {
  return (
    <section aria-label="How the file was read" className="border-rule border-y py-2">
      {offers.map(({ id, ask, choices, chosen }) => (
        <label key={id} className="t-body flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 py-1">
          <span className="max-w-[72ch]">{ask}</span>
          <select
            className="border-edge text-ink min-h-8 border-b bg-transparent"
            value={chosen}
            disabled={busy}
            onChange={(e) => onAnswer({ [id]: e.target.value })}
          >
            {choices.map((choice) => (
              <option key={choice}>{choice}</option>
            ))}
          </select>
        </label>
      ))}
    </section>
  );
}

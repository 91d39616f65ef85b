/** The age as text; pressed, it is a field. Enter keeps, Escape puts back. */
import { useState } from 'react';
import { age as ageText, ageValue, shortAge } from '../../format';
import { setAge } from '../../store/actions';
import { parseAge } from '../../store/jump';
import { useBench, useWorkbench } from '../bench';

export function AgeField() {
  const { store, scene } = useBench();
  const age = useWorkbench((state) => state.age);
  const [typed, setTyped] = useState<string | null>(null);
  if (typed === null) {
    return (
      <button
        type="button"
        className="tabular text-ochre-ink min-h-6 cursor-text"
        aria-label={`Age, ${ageText(age)}: change`}
        onClick={() => setTyped(ageValue(age))}
      >
        {ageText(age)}
      </button>
    );
  }
  const read = parseAge(typed);
  const beyond = read !== null && read > scene.oldest;
  const wrong = read === null || beyond;
  const keep = () => {
    if (!wrong) setAge(store, read, scene.oldest);
    setTyped(null);
  };
  return (
    <span className="relative">
      <input
        className="tabular border-ochre bg-sheet text-ink w-[62px] border px-1"
        aria-label="Age in Ma"
        inputMode="decimal"
        autoFocus
        aria-invalid={wrong}
        aria-describedby="age-span"
        value={typed}
        onChange={(event) => setTyped(event.target.value)}
        onFocus={(event) => event.target.select()}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && !wrong) keep();
          else if (event.key === 'Escape') setTyped(null);
          event.stopPropagation();
        }}
      />
      <span
        id="age-span"
        role="status"
        className="t-label text-madder bg-paper absolute top-full left-0 z-30 mt-1 px-1 font-normal whitespace-nowrap empty:hidden"
      >
        {wrong &&
          (beyond ? `The rotations go back to ${shortAge(scene.oldest)} Ma.` : 'An age in Ma, 0 is today.')}
      </span>
    </span>
  );
}

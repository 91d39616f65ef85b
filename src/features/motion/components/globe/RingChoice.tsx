/** Which ring of an outline with several parts or holes is under edit. */
import { ringNames, type RingPlace, type Rings } from '../../globe/outline-edit';

interface Props {
  readonly rings: Rings;
  readonly at: RingPlace;
  readonly onChoose: (at: RingPlace) => void;
}

export function RingChoice({ rings, at, onChoose }: Props) {
  const names = ringNames(rings);
  const current = names.findIndex((one) => one.at.part === at.part && one.at.ring === at.ring);
  return (
    <label className="t-body bg-paper/90 flex items-center gap-2 px-1">
      Ring
      <select
        className="border-edge text-ink min-h-8 border-b bg-transparent"
        value={current}
        onChange={(event) => {
          const chosen = names[Number(event.target.value)];
          if (chosen) onChoose(chosen.at);
        }}
      >
        {names.map(({ name }, i) => (
          <option key={name} value={i}>
            {name}
          </option>
        ))}
      </select>
    </label>
  );
}

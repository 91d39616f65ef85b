/** One of a few: a row of joined buttons, one of them pressed. */
import { ToggleButton, ToggleButtonGroup } from 'react-aria-components';

interface Props<K extends string> {
  readonly label: string;
  readonly options: readonly { readonly id: K; readonly label: string }[];
  readonly value: K;
  readonly onChange: (value: K) => void;
}

export function Segmented<K extends string>({ label, options, value, onChange }: Props<K>) {
  return (
    <ToggleButtonGroup
      aria-label={label}
      selectionMode="single"
      disallowEmptySelection
      selectedKeys={[value]}
      onSelectionChange={(keys) => {
        const [next] = [...keys];
        const option = options.find(({ id }) => id === next);
        if (option) onChange(option.id);
      }}
      className="border-edge inline-flex rounded border"
    >
      {options.map(({ id, label: text }) => (
        <ToggleButton
          key={id}
          id={id}
          className="t-body border-edge hover:bg-sunk data-[selected]:bg-ink data-[selected]:text-paper min-h-[26px] cursor-pointer border-l px-2.5 first:rounded-l-[2px] first:border-l-0 last:rounded-r-[2px] data-[selected]:font-medium pointer-coarse:min-h-11"
        >
          {text}
        </ToggleButton>
      ))}
    </ToggleButtonGroup>
  );
}

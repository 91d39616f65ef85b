/** `/`: an age, a unit of the chart, or a block. Stands in the page, over the log's headings. */
import { useState } from 'react';
import { ComboBox, Input, Label, ListBox, ListBoxItem, Popover } from 'react-aria-components';
import { open, select, setAge } from '../../store/actions';
import { shortAge } from '../../format';
import { jumpsFor, parseAge, type Jump as Target } from '../../store/jump';
import { useBench, useWorkbench } from '../bench';

const nothingFor = (typed: string, oldest: number): string =>
  parseAge(typed) === null ? 'Nothing by that name.' : `The rotations go back to ${shortAge(oldest)} Ma.`;

const keyOf = (jump: Target): string => (jump.kind === 'age' ? `age ${jump.label}` : `block ${jump.code}`);

export function Jump() {
  const { store, scene } = useBench();
  const isOpen = useWorkbench((state) => state.open === 'jump');
  const [typed, setTyped] = useState('');
  if (!isOpen) return null;
  const jumps = jumpsFor(typed, scene);
  const close = () => {
    setTyped('');
    open(store, null);
  };
  const go = (jump: Target | undefined) => {
    if (!jump) return;
    if (jump.kind === 'age') setAge(store, jump.age, scene.oldest);
    else select(store, jump.code);
    close();
  };
  return (
    <div className="border-frame bg-paper absolute inset-x-0 top-0 z-20 border-b px-3 py-2.5">
      <ComboBox
        aria-label="Jump to an age or a block"
        menuTrigger="focus"
        allowsCustomValue
        allowsEmptyCollection
        items={jumps.map((jump) => ({ id: keyOf(jump), jump }))}
        inputValue={typed}
        onInputChange={setTyped}
        onSelectionChange={(key) => go(jumps.find((jump) => keyOf(jump) === key))}
      >
        <Label className="t-label text-ink-2">
          Jump to an age in Ma, a unit of the chart, or a block. Esc closes.
        </Label>
        <Input
          autoFocus
          className="input mt-1 min-h-8"
          onKeyDown={(event) => {
            if (event.key === 'Escape') close();
            else if (
              event.key === 'Enter' &&
              event.currentTarget.getAttribute('aria-activedescendant') === null
            )
              go(jumps[0]);
          }}
          onBlur={(event) => {
            if (!(event.relatedTarget instanceof Element && event.relatedTarget.closest('[role="listbox"]')))
              close();
          }}
        />
        <Popover isNonModal offset={2} className="border-frame bg-paper w-(--trigger-width) border py-1">
          <ListBox<{ id: string; jump: Target }>
            className="outline-none"
            renderEmptyState={() => (
              <p className="t-body text-ink-2 px-3 py-1">{nothingFor(typed, scene.oldest)}</p>
            )}
          >
            {({ jump }) => (
              <ListBoxItem
                textValue={jump.label}
                className="t-body data-[focused]:bg-sunk flex min-h-7 cursor-pointer justify-between px-3 py-1"
              >
                <span>{jump.label}</span>
                <span className="text-ink-2">{jump.detail}</span>
              </ListBoxItem>
            )}
          </ListBox>
        </Popover>
      </ComboBox>
    </div>
  );
}

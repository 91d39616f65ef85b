/** Reading on a phone: globe, one strip beside the column, the sentence. */
import { useState, type ReactNode } from 'react';
import { age as ageText, coordinates } from '../format';
import { useBench, useWorkbench } from './bench';
import { BlockList } from './globe/BlockList';
import { GlobeCanvas } from './globe/GlobeCanvas';
import { useFrameName } from './globe/GlobePanel';
import { Legend } from './globe/Legend';
import { LogPanel } from './log/LogPanel';
import { Notebook, useAnswer, Within } from './notebook/Notebook';
import { MenuCell } from '../../../components/ui/MenuCell';
import { epochOf, FROZEN, HeldStillCell } from './title/TitleBlock';
import type { Head } from './title/head';

function PhoneHead({ head }: { head: Head }) {
  const account = head.account?.links ?? [{ id: 'sign-in', label: 'Sign in', href: head.signIn }];
  return (
    <header
      className={`border-frame flex items-center justify-between gap-3 px-3.5 py-2 ${head.frozen ? FROZEN : 'border-b-[1.5px]'}`}
    >
      <div className="min-w-0">
        <h1 className="truncate font-serif text-[17px] leading-6 font-semibold">{head.title}</h1>
        <p className="t-body text-ink-2">
          {head.version.value} {head.version.detail}
        </p>
      </div>
      <MenuCell
        label="Menu"
        groups={[
          { title: 'Pages', choices: head.pages },
          { title: 'Account', choices: account },
        ]}
        placement="bottom end"
        className="button min-h-11"
      >
        Menu
      </MenuCell>
    </header>
  );
}

function Answer({ open, toggle }: { open: boolean; toggle: () => void }) {
  const { point, answer } = useAnswer();
  return (
    <div className="border-frame flex items-center justify-between gap-3 border-t px-3.5 py-4">
      <p className="t-answer">
        {!point || !answer ? (
          'Select a block to see where it was.'
        ) : !answer.placed ? (
          answer.why
        ) : (
          <>
            {point.name ?? 'This point'}:{' '}
            <strong className="font-semibold">{coordinates(answer.lat, answer.lon)}</strong>
            <Within answer={answer} />
          </>
        )}
      </p>
      <button
        type="button"
        className="button min-h-11 shrink-0"
        aria-expanded={open}
        aria-controls="notebook"
        onClick={toggle}
      >
        Why here?
      </button>
    </div>
  );
}

export function PhoneWorkbench({ head, notice }: { readonly head: Head; readonly notice?: ReactNode }) {
  useBench();
  const [legend, setLegend] = useState(false);
  const [why, setWhy] = useState(false);
  const age = useWorkbench((state) => state.age);
  const frame = useFrameName();
  return (
    <div className="flex min-h-dvh flex-col">
      <PhoneHead head={head} />
      {notice}
      <main id="main">
        <div className="border-rule flex items-center justify-between border-b px-3.5">
          <HeldStillCell compact />
          <p className="t-value">
            <span className="t-body text-ink-2 mr-2">Age</span>
            <span className="text-ochre-ink">{ageText(age)}</span>{' '}
            <span className="font-normal">{epochOf(age).split(',')[0]}</span>
          </p>
        </div>
        <div className="border-frame relative h-[284px] border-b">
          <GlobeCanvas label={`${frame}: drag to turn, pinch to zoom`} describedBy="block-list" shortNames />
          <p className="t-label text-ink-2 bg-paper/80 pointer-events-none absolute bottom-2 left-3 w-[76px]">
            dashed: present coast, for location only
          </p>
          <button
            type="button"
            className="button bg-paper absolute right-3 bottom-2 min-h-11"
            aria-expanded={legend}
            onClick={() => setLegend(!legend)}
          >
            Legend
          </button>
        </div>
        {legend && (
          <div className="border-frame border-b px-3.5 py-3">
            <Legend />
          </div>
        )}
        <BlockList id="block-list" />
        <LogPanel />
        <Answer
          open={why}
          toggle={() => {
            setWhy(!why);
            // Below the fold otherwise: the button would seem to do nothing.
            if (!why)
              requestAnimationFrame(() =>
                document.getElementById('notebook')?.scrollIntoView({ block: 'start' }),
              );
          }}
        />
        {why && <Notebook />}
      </main>
    </div>
  );
}

/** The head of the drawing: project, version, held still, age and selection. Each cell opens its own list. */
import type { ReactNode } from 'react';
import { Chevron, MenuCell, type ChoiceGroup } from '../../../../components/ui/MenuCell';
import { unitAt } from '../../../../kernel/timescale';
import { number } from '../../format';
import { holdStill, select } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';
import { useAnswer } from '../notebook/Notebook';
import { AgeField } from './AgeField';
import { Share } from './Share';
import { AccountCell } from './AccountCell';
import type { Head } from './head';

const CELL = 'flex h-full flex-col justify-center border-r border-rule px-4';

function Value({ label, children, list = false }: { label: string; children: ReactNode; list?: boolean }) {
  return (
    <>
      <span className="t-label text-ink-2 block">{label}</span>
      <span className="t-value flex items-center gap-2 whitespace-nowrap">
        {children}
        {list && <Chevron />}
      </span>
    </>
  );
}

const Detail = ({ children }: { children: ReactNode }) => (
  <span className="text-ink-2 font-normal max-xl:hidden">{children}</span>
);

export function HeldStillCell({ compact = false }: { compact?: boolean }) {
  const { store, scene } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const block = scene.blocks.find(({ code }) => code === heldStill);
  const choice = ({ code, name }: { code: string; name: string }) => ({ id: code, label: name });
  const groups: ChoiceGroup[] = [
    { title: 'Frames', choices: scene.blocks.filter(({ kind }) => kind === 'frame').map(choice) },
    { title: 'Blocks', choices: scene.blocks.filter(({ kind }) => kind !== 'frame').map(choice) },
  ];
  const kind = block ? (block.kind === 'frame' ? 'frame' : 'block') : '';
  const unknown = heldStill || 'nothing yet';
  return (
    <MenuCell
      label={`Held still: ${block?.name ?? unknown}`}
      groups={groups}
      current={heldStill}
      onChoose={(code) => holdStill(store, code)}
      className={compact ? 'flex min-h-11 items-center gap-2' : CELL}
    >
      {compact ? (
        <>
          <span className="t-body text-ink-2">Held still</span>
          <span className="t-value">
            {block ? (block.kind === 'frame' ? block.name : block.short) : unknown}
          </span>
        </>
      ) : (
        <Value label="Held still" list>
          {block?.kind === 'frame' ? block.name : (block?.short ?? unknown)} <Detail>{kind}</Detail>
        </Value>
      )}
    </MenuCell>
  );
}

/** Stage and epoch of an age: "Danian, Paleocene". */
export function epochOf(age: number): string {
  const stage = unitAt(age, 'stage')?.name;
  const epoch = unitAt(age, 'epoch')?.name;
  return [stage, epoch === stage ? undefined : epoch].filter(Boolean).join(', ');
}

function AgeCell() {
  const age = useWorkbench((state) => state.age);
  return (
    <div className={`${CELL} min-w-[200px] max-xl:min-w-0`}>
      <span className="t-label text-ink-2 block">Age</span>
      <span className="t-value flex items-center gap-2 whitespace-nowrap">
        <AgeField /> <Detail>{epochOf(age)}</Detail>
      </span>
    </div>
  );
}

function SelectedCell() {
  const { store, scene } = useBench();
  const code = useWorkbench((state) => state.block);
  const { answer } = useAnswer();
  const block = scene.blocks.find((candidate) => candidate.code === code);
  const choices = scene.blocks
    .filter(({ outlines }) => outlines.length > 0)
    .map(({ code: id, name, evidence }) => ({ id, label: name, detail: evidence }));
  const km = answer?.placed ? answer.ellipse : null;
  return (
    <MenuCell
      label={`Selected: ${block?.name ?? 'nothing'}`}
      groups={[{ choices }]}
      current={code ?? ''}
      onChoose={(id) => select(store, id)}
      className={`${CELL} border-r-0 max-[1100px]:hidden`}
    >
      <Value label="Selected" list>
        {block?.name ?? 'nothing'}
        {km && km.semi_major_km >= 0.5 && (
          <Detail>
            {km.at_least ? 'at least ' : ''}± {number(km.semi_major_km)} km at 95 %
          </Detail>
        )}
        {answer && !answer.placed && <Detail>no place at this age</Detail>}
      </Value>
    </MenuCell>
  );
}

export const FROZEN = 'bg-sunk border-b-4 border-double';

export function TitleBlock({ head }: { readonly head: Head }) {
  return (
    <header
      className={`border-frame flex h-[52px] shrink-0 items-stretch max-md:hidden ${head.frozen ? FROZEN : 'border-b-[1.5px]'}`}
    >
      <div className="border-rule flex items-center border-r px-5 max-lg:hidden">
        <a href={head.home} className="font-serif text-[18px] leading-6 font-semibold tracking-[-0.01em]">
          Driftwright
        </a>
      </div>
      <MenuCell
        label={`Workbench, ${head.title}: pages of this project`}
        groups={[{ choices: head.pages }]}
        className={CELL}
      >
        <Value label="Workbench" list>
          {head.title}
        </Value>
      </MenuCell>
      <MenuCell
        label={`Version: ${head.version.value}`}
        groups={[{ choices: head.version.choices }]}
        className={`${CELL} max-lg:hidden`}
      >
        <Value label="Version" list>
          {head.version.value} <Detail>{head.version.detail}</Detail>
        </Value>
      </MenuCell>
      <HeldStillCell />
      <AgeCell />
      <SelectedCell />
      <div className="ml-auto flex shrink-0 items-center gap-2 px-5 whitespace-nowrap">
        <Share version={head.shown} />
        <PrintLink href={head.print} />
        <AccountCell account={head.account} signIn={head.signIn} />
      </div>
    </header>
  );
}

/** Leads to the print page with what is seen here. */
function PrintLink({ href }: { href: string }) {
  return (
    <a
      className="button max-lg:hidden"
      href={href}
      onClick={(event) => {
        event.currentTarget.href = `${href}${window.location.search}`;
      }}
    >
      Print…
    </a>
  );
}

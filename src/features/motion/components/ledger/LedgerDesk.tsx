/** The ledger under the log: its tables as tabs, edited in place where the reader may edit. */
import { useEffect, useState, type KeyboardEvent } from 'react';
import { findSceneBlock } from '../../scene/scene';
import { useBench, useWorkbench } from '../bench';
import { BlocksLedger } from './BlocksLedger';
import { DirectionsLedger } from './DirectionsLedger';
import { DriftPathTable } from './DriftPathTable';
import { MarginTable } from './MarginTable';
import { RotationsLedger } from './RotationsLedger';
import { useDraft } from './use-draft';

interface Props {
  readonly slug: string;
  readonly version: 'draft' | number;
  /** Why nothing can be edited; null where the reader may. */
  readonly readOnly: string | null;
}

const TABS = ['rotations', 'blocks', 'directions', 'path', 'margin'] as const;
type Tab = (typeof TABS)[number];

export function LedgerDesk({ slug, version, readOnly }: Props) {
  const { scene } = useBench();
  const draft = useDraft(slug, version);
  const code = useWorkbench((state) => state.block);
  const [tab, setTab] = useState<Tab>('rotations');
  const block = findSceneBlock(scene, code);
  useUndoKeys(draft.undo, readOnly === null);

  const own = draft.rotations.filter((row) => code === null || row.block === code).length;
  const sites = scene.directions.filter((direction) => direction.block === code).length;
  const names: Record<Tab, readonly [string, string]> = {
    rotations: ['Rotations', block ? `${own} of ${block.short}` : String(own)],
    blocks: ['Blocks', String(draft.blocks.length)],
    directions: ['Directions', block ? `${sites} of ${block.short}` : String(scene.directions.length)],
    path: ['Drift path', ''],
    margin: ['Across a margin', ''],
  };

  function onTabKey(event: KeyboardEvent): void {
    const by = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0;
    if (by === 0) return;
    event.preventDefault();
    event.stopPropagation();
    const next = TABS[(TABS.indexOf(tab) + by + TABS.length) % TABS.length]!;
    setTab(next);
    document.getElementById(`ledger-tab-${next}`)?.focus();
  }

  return (
    <section aria-label="Ledger" className="flex h-full min-h-0 flex-col">
      <div
        role="tablist"
        aria-label="Tables"
        className="border-rule flex shrink-0 gap-4 overflow-x-auto border-b px-3.5"
        onKeyDown={onTabKey}
      >
        {TABS.map((name) => (
          <button
            key={name}
            id={`ledger-tab-${name}`}
            role="tab"
            aria-selected={tab === name}
            aria-controls="ledger-panel"
            tabIndex={tab === name ? 0 : -1}
            className={`t-body h-9 whitespace-nowrap ${tab === name ? 'border-ink border-b-2 font-semibold' : 'text-ink-2'}`}
            onClick={() => setTab(name)}
          >
            {names[name][0]} <span className="text-ink-2 font-normal">{names[name][1]}</span>
          </button>
        ))}
        {readOnly && (
          <span className="t-body text-ink-2 ml-auto self-center whitespace-nowrap">read only</span>
        )}
      </div>
      <div
        id="ledger-panel"
        role="tabpanel"
        aria-labelledby={`ledger-tab-${tab}`}
        className="flex min-h-0 grow flex-col"
      >
        {tab === 'rotations' && <RotationsLedger draft={draft} readOnly={readOnly} />}
        {tab === 'blocks' && <BlocksLedger draft={draft} readOnly={readOnly} />}
        {tab === 'directions' && <DirectionsLedger />}
        {tab === 'path' && <DriftPathTable slug={slug} version={version} />}
        {tab === 'margin' && <MarginTable slug={slug} version={version} />}
      </div>
    </section>
  );
}

/** Ctrl or ⌘ Z takes back, with Shift (or Ctrl Y) does again; never while text is being typed. */
function useUndoKeys(undo: (which: 'undo' | 'redo') => void, on: boolean): void {
  useEffect(() => {
    if (!on) return;
    const listen = (event: globalThis.KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      if (event.target instanceof HTMLElement && event.target.closest('input, textarea, select')) return;
      const key = event.key.toLowerCase();
      if (key !== 'z' && key !== 'y') return;
      event.preventDefault();
      undo(key === 'y' || event.shiftKey ? 'redo' : 'undo');
    };
    document.addEventListener('keydown', listen);
    return () => document.removeEventListener('keydown', listen);
  }, [undo, on]);
}

/** The line under a ledger: what the cell under edit would do, what could not be saved, and the ways on. */
import type { ReactNode } from 'react';
import { count } from '../../format';
import type { Draft } from './use-draft';

interface Props {
  readonly draft: Draft;
  /** Why nothing can be edited here; null where it can. */
  readonly readOnly: string | null;
  readonly editing: boolean;
  readonly add: () => void;
  readonly addLabel: string;
  readonly children: ReactNode;
}

const KEY = 'border-edge inline-block rounded-[3px] border px-1.5 font-medium';

export function Foot({ draft, readOnly, editing, add, addLabel, children }: Props) {
  return (
    <div className="border-frame t-body flex min-h-8 shrink-0 flex-wrap items-center gap-x-4 gap-y-1 border-t px-3.5 py-1">
      <p className="grow" role="status">
        {children || <Standing draft={draft} readOnly={readOnly} />}
      </p>
      {editing ? (
        <p className="whitespace-nowrap">
          <kbd className={KEY}>Enter</kbd> keep <kbd className={`${KEY} ml-2`}>Esc</kbd> put back
        </p>
      ) : (
        readOnly === null && <Ways draft={draft} add={add} addLabel={addLabel} />
      )}
    </div>
  );
}

function Standing({ draft, readOnly }: { readonly draft: Draft; readonly readOnly: string | null }) {
  const { conflict, refused, saving, pending, step } = draft;
  if (conflict) return <span className="text-madder">{conflict.words}</span>;
  if (refused)
    return (
      <span className="text-madder">
        {pending.size > 0 && `${count(pending.size, 'row')} not saved. `}
        {`${refused.replace(/\.$/, '')}.`}
      </span>
    );
  if (saving) return <>Saving …</>;
  const waiting = [...pending.values()]
    .flatMap((row) => Object.values(row.cells))
    .filter((cell) => cell.problem !== null);
  if (waiting.length > 0)
    return (
      <span className="text-madder">{`${count(waiting.length, 'cell')} not saved: ${waiting[0]!.problem}.`}</span>
    );
  if ([...pending.values()].some((row) => row.isNew))
    return <>A new row is saved once its block, reference, age and pole are filled in.</>;
  if (step) return <>{step}</>;
  return <span className="text-ink-2">{readOnly ?? 'Type in a cell, or paste from a spreadsheet.'}</span>;
}

function Ways({ draft, add, addLabel }: Pick<Props, 'draft' | 'add' | 'addLabel'>) {
  return (
    <p className="flex flex-wrap gap-1.5">
      {draft.conflict && (
        <button className="button min-h-6 px-2" onClick={draft.takeMine}>
          Keep mine
        </button>
      )}
      {draft.conflict ? (
        <button className="button min-h-6 px-2" onClick={draft.takeTheirs}>
          Keep theirs
        </button>
      ) : (
        (draft.pending.size > 0 || draft.refused !== null) && (
          <button className="button min-h-6 px-2" onClick={draft.putBack}>
            Put back
          </button>
        )
      )}
      <button className="button min-h-6 px-2" onClick={add}>
        {addLabel}
      </button>
      <button
        className="button min-h-6 px-2"
        onClick={() => draft.undo('undo')}
        aria-keyshortcuts="Control+Z"
      >
        Undo
      </button>
      <button
        className="button min-h-6 px-2"
        onClick={() => draft.undo('redo')}
        aria-keyshortcuts="Control+Shift+Z"
      >
        Redo
      </button>
    </p>
  );
}

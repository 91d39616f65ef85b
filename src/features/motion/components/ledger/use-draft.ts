/**
 * The draft as it is edited here: rows of a table with what has been typed over them, saved in one step at a time, shown
 * at once on the globe, and never lost where the server refuses.
 */
import { useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { compileModel } from '../../../../kernel/rotations';
import type { Model } from '../../../../kernel/rotations/types';
import { EditRefused, lastLabel, overlap, sendEdits, sendUndo } from '../../../ledger/client';
import type { BatchAnswer, Block, Edit, Rotation, Table } from '../../../ledger/contract';
import type { Column } from '../../../ledger/grid/column';
import {
  readyEdits,
  withChanges,
  withNewRow,
  without,
  type CellChange,
  type Pending,
} from '../../../ledger/grid/pending';
import type { MotionsAnswer } from '../../contract';
import { keys, useMotions, useTable } from '../../client';
import { useUnsent } from './use-unsent';

export interface Conflict {
  /** Rows that someone else changed meanwhile, with who it was. */
  readonly rows: ReadonlySet<string>;
  readonly words: string;
  readonly revision: number;
}

export interface Draft {
  readonly blocks: readonly Block[];
  readonly rotations: readonly Rotation[];
  /** Compiled from the saved rows. */
  readonly model: Model | null;
  readonly pending: Pending;
  readonly saving: boolean;
  /** The step of the log that was just undone or done again, in words. */
  readonly step: string | null;
  /** What the server said of the last save; null after a good one. */
  readonly refused: string | null;
  readonly conflict: Conflict | null;
  readonly change: (
    table: Table,
    columns: readonly Column[],
    changes: readonly CellChange[],
    made: readonly NewRow[],
  ) => void;
  readonly remove: (table: Table, rows: readonly string[]) => void;
  readonly run: (edits: readonly Edit[], label?: string) => Promise<boolean>;
  readonly undo: (which: 'undo' | 'redo') => void;
  /** Told whenever a cell is opened, typed in, or left. */
  readonly onCell: (open: boolean) => void;
  readonly putBack: () => void;
  readonly takeMine: () => void;
}

export interface NewRow {
  readonly id: string;
  readonly base: Readonly<Record<string, unknown>>;
}

export function useDraft(slug: string, version: 'draft' | number = 'draft'): Draft {
  const client = useQueryClient();
  const motions = useMotions(slug, version);
  const blocks = useTable<Block>(slug, version, 'blocks');
  const rotations = useTable<Rotation>(slug, version, 'rotations');
  const [pending, setPending] = useState<Pending>(new Map());
  const [saving, setSaving] = useState(false);
  const [refused, setRefused] = useState<string | null>(null);
  const [conflict, setConflict] = useState<(Conflict & { readonly edits: readonly Edit[] }) | null>(null);

  const latest = useRef(pending);
  useEffect(() => {
    latest.current = pending;
  }, [pending]);
  const unsent = useUnsent(pending.size > 0);

  /** Of what the page holds at the moment of sending, which may be later than when the cell was typed. */
  const revisionNow = useCallback(
    () => client.getQueryData<MotionsAnswer>(keys.table(slug, version, 'motions'))?.revision ?? 0,
    [client, slug, version],
  );

  /** Puts an answer into what every part of the page reads, and compiles the model anew. */
  const adopt = useCallback(
    (answer: BatchAnswer) => {
      for (const table of new Set([...answer.items, ...answer.deleted].map((item) => item.table))) {
        client.setQueryData<readonly { id: string }[]>(keys.table(slug, 'draft', table), (rows) =>
          merged(rows ?? [], answer, table),
        );
      }
      const [b, r] = (['blocks', 'rotations'] as const).map((t) =>
        client.getQueryData(keys.table(slug, 'draft', t)),
      );
      client.setQueryData<MotionsAnswer>(keys.table(slug, 'draft', 'motions'), {
        ...compileModel(b as Block[], r as Rotation[]),
        version: 'draft',
        revision: answer.revision,
      });
      void client.invalidateQueries({ queryKey: keys.project(slug), exact: true });
    },
    [client, slug],
  );

  const send = useCallback(
    async ({ edits, work, again, onRefused }: Sending): Promise<boolean> => {
      setSaving(true);
      try {
        adopt(await work());
        setRefused(null);
        setConflict(null);
        if (again) unsent.forget(again.key);
        return true;
      } catch (error) {
        if (!(error instanceof EditRefused)) {
          setRefused(
            again
              ? 'The server did not answer. What you typed is kept here and sent again.'
              : 'The server did not answer. Try again.',
          );
          if (again) unsent.keep(again.key, again.send);
          return false;
        }
        if (again) unsent.forget(again.key);
        if (error.revision !== null) {
          const found = conflictOf(error, edits);
          setConflict({ ...found, revision: error.revision, edits });
          await client.invalidateQueries({ queryKey: keys.project(slug) });
        } else {
          setRefused(error.message);
          onRefused?.(error);
        }
        return false;
      } finally {
        setSaving(false);
      }
    },
    [adopt, client, slug, unsent],
  );

  /** The revision on the page when the cell under edit was opened: what others changed since is not overwritten unseen. */
  const editedSince = useRef<number | null>(null);
  const onCell = useCallback(
    (open: boolean) => {
      if (!open) editedSince.current = null;
      else editedSince.current ??= revisionNow();
    },
    [revisionNow],
  );

  const save = useCallback(
    (next: Pending, table: Table, columns: readonly Column[]): Promise<boolean> => {
      const attempt = async (now: Pending): Promise<boolean> => {
        const { edits, rows } = readyEdits(now, table, columns);
        if (edits.length === 0) return true;
        const done = await send({
          edits,
          work: () => sendEdits(slug, since ?? revisionNow(), edits),
          again: { key: table, send: () => attempt(latest.current) },
          onRefused: (error) => setPending((map) => marked(map, rows, error)),
        });
        if (done) setPending((map) => without(map, rows));
        return done;
      };
      const since = editedSince.current;
      setPending(next);
      latest.current = next;
      return attempt(next);
    },
    [send, slug, revisionNow],
  );

  const change = useCallback<Draft['change']>(
    (table, columns, changes, made) => {
      const started = made.reduce<Pending>((map, row) => withNewRow(map, row.id, row.base), pending);
      void save(withChanges(started, changes, columns), table, columns);
    },
    [pending, save],
  );

  const run = useCallback(
    (given: readonly Edit[], label?: string): Promise<boolean> => {
      // Rows are named here, so that an edit whose answer was lost is not made twice.
      const edits = given.map((edit) =>
        edit.op === 'create' && edit.id === undefined ? { ...edit, id: crypto.randomUUID() } : edit,
      );
      const key = crypto.randomUUID();
      const attempt = (): Promise<boolean> =>
        send({
          edits,
          work: () => sendEdits(slug, revisionNow(), edits, label),
          again: { key, send: attempt },
        });
      return attempt();
    },
    [send, slug, revisionNow],
  );

  const remove = useCallback<Draft['remove']>(
    (table, ids) => {
      const known = ids.filter((id) => !pending.get(id)?.isNew);
      setPending((now) => without(now, ids));
      if (known.length > 0) void run(known.map((id) => ({ op: 'delete', table, id })));
    },
    [pending, run],
  );

  const putBack = useCallback(() => {
    setPending(new Map());
    unsent.clear();
    setRefused(null);
    setConflict(null);
  }, [unsent]);

  const [step, setStep] = useState<string | null>(null);
  /** Names the step that was taken back or done again: nobody should have to guess. */
  const tellStep = useCallback(
    (which: 'undo' | 'redo') => async (done: boolean) => {
      if (!done) return;
      const label = await lastLabel(slug).catch(() => null);
      setStep(label === null ? null : `${which === 'undo' ? 'Undone' : 'Done again'}: ${label}.`);
    },
    [slug],
  );
  useEffect(() => {
    if (step === null) return undefined;
    const timer = window.setTimeout(() => setStep(null), STEP_SHOWN_MS);
    return () => window.clearTimeout(timer);
  }, [step]);

  return useMemo(
    () => ({
      step,
      blocks: blocks.data ?? [],
      rotations: rotations.data ?? [],
      model: motions.data ?? null,
      pending,
      saving,
      refused,
      conflict,
      change,
      remove,
      run,
      undo: (which) => {
        // What is typed and not saved is the last thing done: it goes first.
        if (which === 'undo' && pending.size > 0) putBack();
        else void send({ edits: [], work: () => sendUndo(slug, which, revisionNow()) }).then(tellStep(which));
      },
      onCell,
      putBack,
      takeMine: () => {
        if (!conflict) return;
        const { edits, revision: now } = conflict;
        const rows = edits.flatMap((edit) => edit.id ?? []);
        void send({ edits, work: () => sendEdits(slug, now, edits) }).then((done) => {
          if (done) setPending((map) => without(map, rows));
        });
      },
    }),
    [
      blocks.data,
      rotations.data,
      motions.data,
      pending,
      saving,
      refused,
      conflict,
      change,
      remove,
      run,
      send,
      slug,
      revisionNow,
      onCell,
      putBack,
      step,
      tellStep,
    ],
  );
}

const STEP_SHOWN_MS = 8_000;

interface Sending {
  readonly edits: readonly Edit[];
  readonly work: () => Promise<BatchAnswer>;
  /** How to send the same once more when no answer came; without it the sender has to ask again. */
  readonly again?: { readonly key: string; readonly send: () => Promise<boolean> };
  readonly onRefused?: (error: EditRefused) => void;
}

function conflictOf(error: EditRefused, edits: readonly Edit[]): Pick<Conflict, 'rows' | 'words'> {
  const rows = new Set(overlap(edits, error.changes));
  const last = error.changes.findLast((entry) => entry.changes?.some(({ entity_id }) => rows.has(entity_id)));
  if (!last) return { rows, words: 'The draft has moved on. Yours is kept beside it.' };
  const at = new Date(last.at).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });
  return { rows, words: `Changed by ${last.actor?.name ?? 'someone'} at ${at}. Yours is kept beside it.` };
}

function merged(rows: readonly { id: string }[], answer: BatchAnswer, table: string): { id: string }[] {
  const gone = new Set(answer.deleted.filter((d) => d.table === table).map((d) => d.id));
  const fresh = new Map(
    answer.items
      .filter((i) => i.table === table)
      .map((i) => [i.row['id'] as string, i.row as { id: string }]),
  );
  const kept = rows.filter((row) => !gone.has(row.id)).map((row) => fresh.get(row.id) ?? row);
  const known = new Set(rows.map((row) => row.id));
  return [...kept, ...[...fresh.values()].filter((row) => !known.has(row.id))];
}

/** The server's problems, put beside the cells that they are about. */
function marked(pending: Pending, rows: readonly string[], error: EditRefused): Pending {
  const next = new Map(pending);
  for (const { edit, field, problem } of error.cells) {
    const id = rows[edit];
    const row = id === undefined ? undefined : next.get(id);
    if (!id || !row) continue;
    const key = field ?? Object.keys(row.cells)[0];
    if (key === undefined) continue;
    const text = row.cells[key]?.text ?? '';
    next.set(id, { ...row, cells: { ...row.cells, [key]: { text, problem } } });
  }
  return next;
}

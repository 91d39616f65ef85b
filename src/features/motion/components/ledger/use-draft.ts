/**
 * The draft as it is edited here: rows of a table with what has been typed over them, saved in one step at a time, shown
 * at once on the globe, and never lost where the server refuses.
 */
import { useQueryClient } from '@tanstack/react-query';
import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import type { Model } from '../../../../kernel/rotations/types';
import { lastLabel, sendUndo, type EditRefused } from '../../../ledger/client';
import type { BatchAnswer, Block, Edit, Rotation, Table } from '../../../ledger/contract';
import {
  readyEdits,
  rebased,
  settled,
  withChanges,
  withNewRow,
  without,
  type Pending,
} from '../../../ledger/grid/pending';
import { typedStep, withoutStep, type Typed, type TypedStep } from '../../../ledger/grid/typed-steps';
import type { MotionsAnswer } from '../../contract';
import { keys, useMotions, useTable } from '../../client';
import { adoptAnswer } from './adopt';
import { useSending, type Conflict, type Parcel } from './use-sending';
import { useUnsent } from './use-unsent';

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
  readonly change: (typed: Typed) => void;
  readonly remove: (table: Table, rows: readonly string[]) => void;
  readonly run: (edits: readonly Edit[], label?: string) => Promise<boolean>;
  readonly undo: (which: 'undo' | 'redo') => void;
  /** Told whenever a cell is opened, typed in, or left. */
  readonly onCell: (open: boolean) => void;
  readonly putBack: () => void;
  /** The two ways out of a conflict. */
  readonly takeMine: () => void;
  readonly takeTheirs: () => void;
}

/** Rows of one table that go together, as they stood when they were sent. */
interface TypedParcel extends Parcel {
  readonly rows: readonly string[];
  readonly sent: Pending;
}

export function useDraft(slug: string, version: 'draft' | number = 'draft'): Draft {
  const client = useQueryClient();
  const motions = useMotions(slug, version);
  const blocks = useTable<Block>(slug, version, 'blocks');
  const rotations = useTable<Rotation>(slug, version, 'rotations');

  const [pending, setPending] = useState<Pending>(new Map());
  const latest = useRef(pending);
  const put = useCallback((next: Pending) => {
    latest.current = next;
    setPending(next);
  }, []);
  const [conflict, showConflict] = useState<Conflict | null>(null);
  const held = useRef<Conflict | null>(null);
  const setConflict = useCallback((next: Conflict | null) => {
    held.current = next;
    showConflict(next);
  }, []);

  const adopt = useCallback((answer: BatchAnswer) => adoptAnswer(client, slug, answer), [client, slug]);
  const { saving, refused, forgive, inTurn, sendParcel, sendStep } = useSending(slug, adopt);
  const unsent = useUnsent(pending.size > 0);

  const revisionNow = useCallback(
    () => client.getQueryData<MotionsAnswer>(keys.table(slug, version, 'motions'))?.revision ?? 0,
    [client, slug, version],
  );
  const editedSince = useRef<number | null>(null);
  const onCell = useCallback(
    (open: boolean) => {
      if (!open) editedSince.current = null;
      else editedSince.current ??= revisionNow();
    },
    [revisionNow],
  );

  /** Parcels without an answer, by table: sent again as they were before anything typed since. */
  const lost = useRef(new Map<Table, TypedParcel>());

  const save = useCallback(
    (typed: Pick<Typed, 'table' | 'columns'>): Promise<boolean> => {
      const { table } = typed;
      const attempt = (): Promise<boolean> =>
        inTurn(async () => {
          for (let whole = true; ;) {
            const parcel =
              lost.current.get(table) ?? parcelOf(latest.current, typed, held.current, revisionNow());
            if (!parcel) {
              unsent.forget(table);
              return whole;
            }
            const outcome = await sendParcel(parcel);
            if (outcome.is === 'lost') {
              lost.current.set(table, parcel);
              unsent.keep(table, attempt);
              return false;
            }
            lost.current.delete(table);
            if (outcome.is === 'taken') put(settled(latest.current, parcel.sent, parcel.rows));
            else whole = false;
            if (outcome.is === 'refused') {
              const told = marked(latest.current, parcel.rows, outcome.error);
              if (!told) return false;
              put(told);
            }
            if (outcome.is === 'conflict') {
              setConflict(joined(held.current, outcome.conflict));
              void client.invalidateQueries({ queryKey: keys.project(slug) });
            }
          }
        });
      return attempt();
    },
    [client, inTurn, put, revisionNow, sendParcel, setConflict, slug, unsent],
  );

  const columnsOf = useRef(new Map<Table, Typed['columns']>());
  const steps = useRef<TypedStep[]>([]);
  const undone = useRef<TypedStep[]>([]);
  const type = useCallback(
    (typed: Typed) => {
      const { table, columns, changes, made } = typed;
      columnsOf.current.set(table, columns);
      steps.current.push(typedStep(latest.current, typed));
      const since = editedSince.current ?? revisionNow();
      const started = made.reduce((map, row) => withNewRow(map, table, row), latest.current);
      put(withChanges(started, changes, { table, columns, since }));
      void save(typed);
    },
    [put, revisionNow, save],
  );
  const change = useCallback<Draft['change']>(
    (typed) => {
      undone.current = [];
      type(typed);
    },
    [type],
  );

  const heldRun = useRef<Parcel | null>(null);
  const run = useCallback(
    (given: readonly Edit[], label?: string): Promise<boolean> => {
      const edits = given.map((edit) =>
        edit.op === 'create' && edit.id === undefined ? { ...edit, id: crypto.randomUUID() } : edit,
      );
      const parcel: Parcel = { edits, label, since: revisionNow(), key: crypto.randomUUID() };
      const attempt = (): Promise<boolean> =>
        inTurn(async () => {
          const outcome = await sendParcel(parcel);
          if (outcome.is === 'lost') unsent.keep(parcel.key, attempt);
          else unsent.forget(parcel.key);
          if (outcome.is === 'conflict') {
            heldRun.current = parcel;
            setConflict(joined(held.current, outcome.conflict));
            void client.invalidateQueries({ queryKey: keys.project(slug) });
          }
          return outcome.is === 'taken';
        });
      return attempt();
    },
    [client, inTurn, revisionNow, sendParcel, setConflict, slug, unsent],
  );

  const remove = useCallback<Draft['remove']>(
    (table, ids) => {
      const known = ids.filter((id) => !latest.current.get(id)?.isNew);
      put(without(latest.current, ids));
      if (known.length > 0) void run(known.map((id) => ({ op: 'delete', table, id })));
    },
    [put, run],
  );

  const putBack = useCallback(() => {
    put(new Map());
    lost.current.clear();
    steps.current = [];
    unsent.clear();
    forgive();
    setConflict(null);
  }, [forgive, put, setConflict, unsent]);

  const takeTheirs = useCallback(() => {
    heldRun.current = null;
    if (held.current) put(without(latest.current, held.current.rows));
    setConflict(null);
  }, [put, setConflict]);

  const takeMine = useCallback(() => {
    const now = held.current;
    if (!now) return;
    setConflict(null);
    put(rebased(latest.current, now.rows, now.revision));
    const tables = new Set([...now.rows].flatMap((id) => latest.current.get(id)?.table ?? []));
    for (const table of tables) void save({ table, columns: columnsOf.current.get(table) ?? [] });
    const { edits, label } = heldRun.current ?? { edits: [] };
    heldRun.current = null;
    if (edits.length > 0) void run(edits, label);
  }, [put, run, save, setConflict]);

  const [step, tellStep] = useStepWords(slug);
  /** What is typed and not saved is the last thing done: it goes first, step by step. */
  const undo = useCallback<Draft['undo']>(
    (which) =>
      void inTurn(async () => {
        if (which === 'redo') {
          const again = undone.current.pop();
          if (again) return type(again);
        }
        while (which === 'undo' && latest.current.size > 0) {
          const typed = steps.current.pop();
          if (!typed) return putBack();
          const left = withoutStep(latest.current, typed);
          if (!left) continue;
          undone.current.push(typed);
          lost.current.delete(typed.table);
          put(left);
          forgive();
          return undefined;
        }
        if (await sendStep(() => sendUndo(slug, which))) tellStep(which);
        return undefined;
      }),
    [forgive, inTurn, put, putBack, sendStep, slug, tellStep, type],
  );

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
      undo,
      onCell,
      putBack,
      takeMine,
      takeTheirs,
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
      undo,
      onCell,
      putBack,
      takeMine,
      takeTheirs,
      step,
    ],
  );
}

const STEP_SHOWN_MS = 8_000;

/** Names the step that was taken back or done again: nobody should have to guess. */
function useStepWords(slug: string): [string | null, (which: 'undo' | 'redo') => void] {
  const [step, setStep] = useState<string | null>(null);
  const tell = useCallback(
    (which: 'undo' | 'redo') =>
      void lastLabel(slug)
        .catch(() => null)
        .then((label) =>
          setStep(label === null ? null : `${which === 'undo' ? 'Undone' : 'Done again'}: ${label}.`),
        ),
    [slug],
  );
  useEffect(() => {
    if (step === null) return undefined;
    const timer = window.setTimeout(() => setStep(null), STEP_SHOWN_MS);
    return () => window.clearTimeout(timer);
  }, [step]);
  return [step, tell];
}

/** What can be saved now; rows in conflict wait for the reader. */
function parcelOf(
  pending: Pending,
  { table, columns }: Pick<Typed, 'table' | 'columns'>,
  held: Conflict | null,
  now: number,
): TypedParcel | null {
  const free = held ? without(pending, held.rows) : pending;
  const { edits, rows, since } = readyEdits(free, table, columns);
  if (edits.length === 0) return null;
  return { edits, rows, sent: pending, since: since ?? now, key: crypto.randomUUID() };
}

const joined = (before: Conflict | null, now: Conflict): Conflict => ({
  ...now,
  rows: new Set([...(before?.rows ?? []), ...now.rows]),
});

/** The server's problems, put beside the cells that they are about; null where they are about none. */
function marked(pending: Pending, rows: readonly string[], error: EditRefused): Pending | null {
  const next = new Map(pending);
  let told = 0;
  for (const { edit, field, problem } of error.cells) {
    const id = rows[edit];
    const row = id === undefined ? undefined : next.get(id);
    if (!id || !row) continue;
    const key = field ?? Object.keys(row.cells)[0];
    if (key === undefined) continue;
    const cell = row.cells[key] ?? { text: '', since: 0 };
    told++;
    next.set(id, { ...row, cells: { ...row.cells, [key]: { ...cell, problem } } });
  }
  return told > 0 ? next : null;
}

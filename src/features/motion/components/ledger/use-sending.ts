/** Sends edits one after the other, and says what became of each: taken, refused, in conflict, or without an answer. */
import { useCallback, useMemo, useRef, useState } from 'react';
import { EditRefused, isSignedOut, overlap, sendEdits } from '../../../ledger/client';
import type { BatchAnswer, Edit } from '../../../ledger/contract';

export interface Conflict {
  /** Rows that someone else changed meanwhile; they are held back until the reader chooses. */
  readonly rows: ReadonlySet<string>;
  readonly words: string;
  readonly revision: number;
}

export interface Parcel {
  readonly edits: readonly Edit[];
  /** The revision that the edits were made on. */
  readonly since: number;
  readonly key: string;
  readonly label?: string | undefined;
}

/** `lost`: no answer came, or the session has ended; the same parcel may be sent again. */
export type Outcome =
  | { readonly is: 'taken' }
  | { readonly is: 'lost' }
  | { readonly is: 'refused'; readonly error: EditRefused }
  | { readonly is: 'conflict'; readonly conflict: Conflict };

export interface Sending {
  readonly saving: boolean;
  /** Why the last one was not taken; null after a good one. */
  readonly refused: string | null;
  readonly forgive: () => void;
  /** Waits for what was begun before. */
  readonly inTurn: <T>(work: () => Promise<T>) => Promise<T>;
  readonly sendParcel: (parcel: Parcel) => Promise<Outcome>;
  /** A step of the log without edits of its own. */
  readonly sendStep: (work: () => Promise<BatchAnswer>) => Promise<boolean>;
}

const LOST = 'The server did not answer. What you typed is kept here and sent again.';
const SIGNED_OUT =
  'You are signed out. What you typed is kept here: sign in in another tab, and it is sent again.';

export function useSending(slug: string, adopt: (answer: BatchAnswer) => void): Sending {
  const [flights, setFlights] = useState(0);
  const [refused, setRefused] = useState<string | null>(null);
  const last = useRef<Promise<unknown>>(Promise.resolve());
  const own = useRef(new Set<number>());

  const inTurn = useCallback(<T>(work: () => Promise<T>): Promise<T> => {
    const mine = last.current.then(work);
    last.current = mine.catch(() => undefined);
    return mine;
  }, []);

  const during = useCallback(async <T>(work: () => Promise<T>): Promise<T> => {
    setFlights((n) => n + 1);
    try {
      return await work();
    } finally {
      setFlights((n) => n - 1);
    }
  }, []);

  const take = useCallback(
    (answer: BatchAnswer) => {
      own.current.add(answer.revision);
      adopt(answer);
      setRefused(null);
    },
    [adopt],
  );

  const sendParcel = useCallback(
    ({ edits, since, key, label }: Parcel): Promise<Outcome> =>
      during(async () => {
        let revision = since;
        while (own.current.has(revision + 1)) revision++;
        try {
          take(await sendEdits(slug, { edits, revision, key, label, own: own.current }));
          return { is: 'taken' };
        } catch (error) {
          if (!(error instanceof EditRefused)) {
            setRefused(LOST);
            return { is: 'lost' };
          }
          if (error.revision !== null)
            return { is: 'conflict', conflict: conflictOf(error, error.revision, edits, own.current) };
          if (await isSignedOut(error)) {
            setRefused(SIGNED_OUT);
            return { is: 'lost' };
          }
          setRefused(error.message);
          return { is: 'refused', error };
        }
      }),
    [during, slug, take],
  );

  const sendStep = useCallback(
    (work: () => Promise<BatchAnswer>): Promise<boolean> =>
      during(async () => {
        try {
          take(await work());
          return true;
        } catch (error) {
          setRefused(error instanceof EditRefused ? error.message : 'The server did not answer. Try again.');
          return false;
        }
      }),
    [during, take],
  );

  return useMemo(
    () => ({
      saving: flights > 0,
      refused,
      forgive: () => setRefused(null),
      inTurn,
      sendParcel,
      sendStep,
    }),
    [flights, refused, inTurn, sendParcel, sendStep],
  );
}

/** Where a long history does not say which rows changed, all of the parcel's are held back. */
function conflictOf(
  error: EditRefused,
  revision: number,
  edits: readonly Edit[],
  own: ReadonlySet<number>,
): Conflict {
  const theirs = error.changes.filter((entry) => !own.has(entry.revision));
  const met = overlap(edits, theirs);
  const rows = new Set(met.length > 0 ? met : edits.flatMap(({ id }) => id ?? []));
  const last = theirs.findLast((entry) => entry.changes?.some(({ entity_id }) => rows.has(entity_id)));
  if (!last) return { rows, revision, words: 'The draft has moved on. Yours is kept beside it.' };
  const at = new Date(last.at).toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' });
  const who = last.actor?.name ?? 'someone';
  return { rows, revision, words: `Changed by ${who} at ${at}. Yours is kept beside it.` };
}

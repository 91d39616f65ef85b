/** Edits that no answer came for: kept in order, sent again when the server is heard, and not left behind unasked. */
import { useEffect, useMemo, useRef } from 'react';
import { useStale } from '../stale';

type Attempt = () => Promise<boolean>;

export interface Unsent {
  readonly keep: (key: string, attempt: Attempt) => void;
  readonly forget: (key: string) => void;
  readonly clear: () => void;
}

/** @param alsoWaiting whether something typed waits for another reason; leaving the page then asks first as well. */
export function useUnsent(alsoWaiting: boolean): Unsent {
  const attempts = useRef(new Map<string, Attempt>());
  const heard = useStale() === null;

  useEffect(() => {
    if (!heard) return undefined;
    let busy = false;
    const sendAll = async (): Promise<void> => {
      if (busy) return;
      busy = true;
      for (const attempt of [...attempts.current.values()]) if (!(await attempt())) break;
      busy = false;
    };
    void sendAll();
    const timer = window.setInterval(() => void sendAll(), RETRY_MS);
    return () => window.clearInterval(timer);
  }, [heard]);

  useEffect(() => {
    const ask = (event: BeforeUnloadEvent): void => {
      if (alsoWaiting || attempts.current.size > 0) event.preventDefault();
    };
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [alsoWaiting]);

  return useMemo(
    () => ({
      keep: (key, attempt) => void attempts.current.set(key, attempt),
      forget: (key) => void attempts.current.delete(key),
      clear: () => attempts.current.clear(),
    }),
    [],
  );
}

/** A single request can be lost while the server is heard otherwise. */
const RETRY_MS = 15_000;

/** Keeps the draft fresh while others edit it, and knows whether the server is heard. */
import { useQueryClient } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { keys, type Version } from './client';
import type { MotionsAnswer } from './contract';

export interface Hearing {
  /** False from the moment the connection is lost until it is there again. */
  readonly heard: boolean;
  /** When the server was last heard, ms since the epoch. */
  readonly heardAt: number;
}

/** A stream that ended for good, by an error answer, is asked for again after this long, doubled each time. */
const FIRST_RETRY_MS = 2_000;
const LONGEST_RETRY_MS = 60_000;

/** Reads the draft again whenever someone changes it, and once more after silence. A version never changes. */
export function useDraftEvents(slug: string, version: Version): Hearing {
  const client = useQueryClient();
  const [hearing, setHearing] = useState<Hearing>(() => ({ heard: true, heardAt: Date.now() }));
  useEffect(() => {
    let missed = false;
    /** @param revision what the draft is at, where the stream begins by saying so. */
    const hear = (revision: number | null = null): void => {
      const held = client.getQueryData<MotionsAnswer>(keys.table(slug, version, 'motions'))?.revision;
      const behind = revision !== null && held !== undefined && revision > held;
      if (missed || behind) void client.invalidateQueries({ queryKey: keys.project(slug) });
      missed = false;
      setHearing({ heard: true, heardAt: Date.now() });
    };
    const lose = (): void => {
      if (!missed)
        setHearing(({ heard, heardAt }) => ({ heard: false, heardAt: heard ? Date.now() : heardAt }));
      missed = true;
    };
    const stop = version === 'draft' ? listen(slug, client, hear, lose) : () => undefined;
    const online = version === 'draft' ? () => undefined : () => hear();
    window.addEventListener('offline', lose);
    window.addEventListener('online', online);
    return () => {
      stop();
      window.removeEventListener('offline', lose);
      window.removeEventListener('online', online);
    };
  }, [client, slug, version]);
  return hearing;
}

function revisionOf({ data }: MessageEvent): number | null {
  const { revision } = JSON.parse(String(data)) as { revision?: unknown };
  return typeof revision === 'number' ? revision : null;
}

function listen(
  slug: string,
  client: ReturnType<typeof useQueryClient>,
  hear: (revision: number | null) => void,
  lose: () => void,
): () => void {
  let events: EventSource | null = null;
  let timer: number | undefined;
  let wait = FIRST_RETRY_MS;
  const connect = (): void => {
    window.clearTimeout(timer);
    events?.close();
    events = new EventSource(`/api/projects/${encodeURIComponent(slug)}/events`);
    // Twice: the connection itself, and the server's first event, which carries the revision.
    events.addEventListener('open', (event: Event) => {
      wait = FIRST_RETRY_MS;
      hear(event instanceof MessageEvent ? revisionOf(event) : null);
    });
    events.addEventListener('change', () => void client.invalidateQueries({ queryKey: keys.project(slug) }));
    events.addEventListener('error', () => {
      lose();
      if (events?.readyState !== EventSource.CLOSED) return;
      timer = window.setTimeout(connect, wait);
      wait = Math.min(LONGEST_RETRY_MS, wait * 2);
    });
  };
  connect();
  window.addEventListener('online', connect);
  return () => {
    window.removeEventListener('online', connect);
    window.clearTimeout(timer);
    events?.close();
  };
}

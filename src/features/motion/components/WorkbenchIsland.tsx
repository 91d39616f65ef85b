/** The workbench of one project, from the server's answers. */
import { QueryClientProvider } from '@tanstack/react-query';
import { useEffect, useRef, useState, type ReactNode } from 'react';
import type { MotionsAnswer } from '../contract';
import { AnswerError, createClient, keys, useScene, type Version } from '../client';
import { useDraftEvents } from '../draft-events';
import { count } from '../format';
import { complete, homeCentre } from '../scene/defaults';
import { turnTo } from '../store/actions';
import type { Scene } from '../scene/scene';
import { followInAddress, fromQuery } from '../store/link';
import { createWorkbench, type Linked } from '../store/state';
import { OutlineDesk } from './globe/OutlineDesk';
import { LedgerDesk } from './ledger/LedgerDesk';
import type { Head } from './title/head';
import { Stale, staleWords } from './stale';
import { PhoneHint } from './use-media';
import { Waiting } from './Waiting';
import { Workbench } from './Workbench';

export interface WorkbenchIslandProps {
  readonly slug: string;
  readonly version: Version;
  readonly head: Head;
  /** Query of the address, so that server and browser begin alike. */
  readonly search: string;
  /** The project's own frame, where it names one. */
  readonly heldStill: string | null;
  /** Why the ledger cannot be edited; null where it may. */
  readonly readOnly: string | null;
  /** True where the request came from a phone. */
  readonly phone?: boolean;
  /** Lists read with the page; they spare the first requests. */
  readonly initial?: {
    readonly motions: MotionsAnswer;
    readonly tables: Readonly<Record<'blocks' | 'features' | 'directions', readonly unknown[]>>;
  };
}

export default function WorkbenchIsland(props: WorkbenchIslandProps) {
  const [client] = useState(() => {
    const made = createClient();
    const { slug, version, initial } = props;
    if (initial) {
      made.setQueryData(keys.table(slug, version, 'motions'), initial.motions);
      for (const [table, rows] of Object.entries(initial.tables))
        made.setQueryData(keys.table(slug, version, table), rows);
    }
    return made;
  });
  return (
    <QueryClientProvider client={client}>
      <PhoneHint value={props.phone ?? false}>
        <Loaded {...props} />
      </PhoneHint>
    </QueryClientProvider>
  );
}

function Loaded({ slug, version, head, search, heldStill, readOnly }: WorkbenchIslandProps) {
  const { scene, waiting, arrived, wanted, lost, error, retry } = useScene(slug, version, head.title);
  const link = useDraftEvents(slug, version);
  if (error && !scene) {
    const detail = error instanceof AnswerError ? error.detail : 'Look at the connection, then try again.';
    return <Waiting head={head} words={`${error.message}. ${detail}`} retry={retry} />;
  }
  if (!scene) return <Waiting head={head} words="Reading blocks, rotations and directions" />;
  const stale = link.heard ? null : staleWords(link.heardAt, readOnly === null);
  const notice = stale ? (
    <Progress words={stale} />
  ) : waiting ? (
    <Progress words={`Reading outlines, ${arrived} of ${wanted}`} share={wanted > 0 ? arrived / wanted : 0} />
  ) : lost > 0 ? (
    <Progress words={`${count(lost, 'outline')} could not be read. Reload to try again.`} />
  ) : null;
  const own = { ...(heldStill ? { heldStill } : {}), ...fromQuery(search) };
  return (
    <Stale value={stale}>
      <Ready
        scene={scene}
        head={head}
        stated={own}
        notice={notice}
        waiting={waiting}
        ledger={<LedgerDesk slug={slug} version={version} readOnly={readOnly} />}
        tools={readOnly === null ? <OutlineDesk slug={slug} /> : null}
      />
    </Stale>
  );
}

function Ready({
  scene,
  head,
  stated,
  notice,
  waiting,
  ledger,
  tools,
}: {
  scene: Scene;
  head: Head;
  stated: Partial<Linked>;
  notice: ReactNode;
  waiting: boolean;
  ledger: ReactNode;
  tools: ReactNode;
}) {
  const [store] = useState(() => createWorkbench(complete(scene, stated)));
  useEffect(() => followInAddress(store, window, head.shown), [store, head.shown]);
  // Without a centre in the link the first one is a guess until the outlines are there.
  const guessed = useRef(stated.centre ? null : store.getState().centre);
  useEffect(() => {
    if (waiting || guessed.current === null) return;
    if (store.getState().centre === guessed.current) turnTo(store, homeCentre(scene, store.getState()));
    guessed.current = null;
  }, [waiting, scene, store]);
  return <Workbench head={head} scene={scene} store={store} ledger={ledger} tools={tools} notice={notice} />;
}

const Progress = ({ words, share }: { words: string; share?: number }) => (
  <div className="t-label bg-paper text-ink-2">
    <p role="status" className="px-3 py-1">
      {words}
    </p>
    {share !== undefined && (
      <progress className="progress block h-0.5 w-full" value={share} max={1} aria-label={words} />
    )}
  </div>
);

/** What the parts of one workbench share: its store, its scene, and what follows from both. */
import { createContext, useContext, useEffect, useMemo, useState, type ReactNode } from 'react';
import { useStore } from 'zustand';
import type { Model } from '../../../kernel/rotations/types';
import type { Centre } from '../globe/matrix';
import { homeCentre } from '../scene/defaults';
import { frameKeeper, type Frame } from '../scene/frame';
import { selectedPoint, type NamedPoint } from '../scene/points';
import type { Scene } from '../scene/scene';
import { trackOf, type Track } from '../scene/track';
import type { WorkbenchState, WorkbenchStore } from '../store/state';

interface Bench {
  readonly store: WorkbenchStore;
  readonly scene: Scene;
  /** The saved model, or the one under edit. */
  readonly model: Model;
  readonly frameAt: (model: Model, age: number, heldStill: string) => Frame;
  /** The point whose motion is shown. */
  readonly point: NamedPoint | null;
  readonly track: Track | null;
  readonly home: Centre;
}

const BenchContext = createContext<Bench | null>(null);

export function BenchProvider({
  store,
  scene: given,
  children,
}: {
  store: WorkbenchStore;
  scene: Scene;
  children: ReactNode;
}) {
  const draft = useStore(store, (state) => state.draftModel);
  const block = useStore(store, (state) => state.block);
  const chosen = useStore(store, (state) => state.point);
  const heldStill = useStore(store, (state) => state.heldStill);
  const span = useStore(store, (state) => state.path);
  const scene = useMemo(() => (draft ? { ...given, model: draft } : given), [draft, given]);
  const frameAt = useMemo(() => frameKeeper(), []);
  const point = useMemo(() => selectedPoint(scene, block, chosen), [scene, block, chosen]);
  const track = useMemo(
    () => (point && knows(scene.model, heldStill) ? trackOf(scene.model, point, heldStill, span) : null),
    [scene.model, point, heldStill, span],
  );
  const home = useMemo(
    () => homeCentre(given, { ...store.getState(), heldStill }),
    [given, store, heldStill],
  );
  const bench = useMemo(
    () => ({ store, scene, model: scene.model, frameAt, point, track, home }),
    [store, scene, frameAt, point, track, home],
  );
  return <BenchContext value={bench}>{children}</BenchContext>;
}

const knows = (model: Model, code: string): boolean => model.blocks.some((block) => block.code === code);

export function useBench(): Bench {
  const bench = useContext(BenchContext);
  if (!bench) throw new Error('a part of the workbench stands outside its BenchProvider');
  return bench;
}

/** A part of the state; the component draws again only when that part changes. */
export function useWorkbench<T>(select: (state: WorkbenchState) => T): T {
  return useStore(useBench().store, select);
}

/** Between two readings of the calm age while the line is dragged, ms. */
const CALM_MS = 100;

/** The age for tables and lists: ten times a second at most while the line is dragged, exact when it rests. */
export function useCalmAge(): number {
  const { store } = useBench();
  const [age, setAge] = useState(() => store.getInitialState().age);
  useEffect(() => {
    let timer: number | undefined;
    const take = () => {
      window.clearTimeout(timer);
      timer = undefined;
      setAge(store.getState().age);
    };
    take();
    const stop = store.subscribe(({ moving }) => {
      if (!moving) take();
      else timer ??= window.setTimeout(take, CALM_MS);
    });
    return () => {
      window.clearTimeout(timer);
      stop();
    };
  }, [store]);
  return age;
}

/** Where everything is at the age shown. */
export function useFrame(): Frame {
  const { model, frameAt } = useBench();
  const age = useWorkbench((state) => state.age);
  const heldStill = useWorkbench((state) => state.heldStill);
  return frameAt(model, age, heldStill);
}

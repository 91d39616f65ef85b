/** What a picture island is given: plain JSON from the server. Outlines come by hash. */
import { useMemo } from 'react';
import type { Model } from '../../../../kernel/rotations/types';
import type { Block, Direction, Feature } from '../../../ledger/contract';
import { assemble, useShapes, wantedBy } from '../../client';
import { complete } from '../../scene/defaults';
import type { Scene } from '../../scene/scene';
import { sharedWorkbench, type Layer, type Linked, type WorkbenchStore } from '../../store/state';
import { useHydrated } from '../use-hydrated';

const NO_SHAPES: ReturnType<typeof useShapes>['shapes'] = new Map();

export interface Payload {
  readonly title: string;
  readonly model: Model;
  readonly blocks: readonly Block[];
  readonly features: readonly Feature[];
  readonly directions: readonly Direction[];
}

/** What is shown; what is left out takes the project's own value. `off` names layers that are not drawn. */
export interface Shown extends Partial<
  Pick<Linked, 'age' | 'heldStill' | 'block' | 'point' | 'centre' | 'zoom'>
> {
  readonly off?: readonly Layer[];
}

export interface PictureProps {
  readonly payload: Payload;
  readonly shown?: Shown;
  /** Islands of one page with the same key move together. */
  readonly share: string;
}

/** Scene and store of a picture; `ready` once its outlines are there. */
export function usePicture({ payload, shown = {}, share }: PictureProps): {
  scene: Scene;
  store: WorkbenchStore;
  ready: boolean;
} {
  const wanted = useMemo(() => wantedBy(payload.blocks, payload.features), [payload]);
  const { shapes: arrived, waiting } = useShapes(wanted);
  const shapes = useHydrated() ? arrived : NO_SHAPES;
  const scene = useMemo(
    () =>
      assemble(payload.title, payload.model, payload.blocks, payload.features, payload.directions, shapes),
    [payload, shapes],
  );
  const store = useMemo(() => {
    const { off, ...stated } = shown;
    return sharedWorkbench(share, complete(scene, { ...stated, ...(off ? { off: new Set(off) } : {}) }));
    // Made once: a store outlives the outlines that arrive later.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [share]);
  return { scene, store, ready: !waiting && shapes.size > 0 };
}

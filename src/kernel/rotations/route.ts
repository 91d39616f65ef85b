import type { Beyond } from './leg-at';
import { requireBlock } from './model-index';
import type { CompiledBlock, Leg, Model, Status } from './types';
import { type Walk, walkUp } from './walk';

export interface Step {
  readonly block: CompiledBlock;
  readonly leg: Leg;
  readonly direction: 'up' | 'down';
}

/** The links between two blocks at an age, from the block to the reference, or why there are none. */
export type Route =
  | { readonly status: 'placed'; readonly steps: readonly Step[] }
  | { readonly status: Exclude<Status, 'placed'>; readonly at: string };

/**
 * Up from the block to the lowest common ancestor, then down to relative_to: links that both share cancel and
 * are not asked for.
 * @throws {KernelError} `UnknownBlock`, `CircuitCycle`.
 */
export function routeAt(
  model: Model,
  block: string,
  age_ma: number,
  relative_to: string,
  beyond: Beyond = 'none',
): Route {
  const from = walkUp(model, requireBlock(model, block), age_ma, beyond);
  const to = walkUp(model, requireBlock(model, relative_to, 'relative_to'), age_ma, beyond);
  const up = from.blocks.findIndex((candidate) => to.blocks.includes(candidate));
  const meeting = from.blocks[up];
  if (meeting) {
    const down = to.blocks.indexOf(meeting);
    return { status: 'placed', steps: [...steps(from, up, 'up'), ...steps(to, down, 'down').reverse()] };
  }
  if (age_ma === 0 && joinedAtPresent(from, to)) {
    return {
      status: 'placed',
      steps: [...steps(from, from.legs.length, 'up'), ...steps(to, to.legs.length, 'down').reverse()],
    };
  }
  return noRoute(from, to);
}

function steps({ blocks, legs }: Walk, count: number, direction: 'up' | 'down'): Step[] {
  return legs.slice(0, count).flatMap((leg, i) => {
    const block = blocks[i];
    return block ? [{ block, leg, direction }] : [];
  });
}

/** At 0 Ma a block without rotations lies where it lies, so its present coordinates are everyone's. */
function joinedAtPresent(from: Walk, to: Walk): boolean {
  const ends = [from.end, to.end];
  return ends.includes('no rotations') && ends.every((end) => end === 'no rotations' || end === 'root');
}

/** Named is the block whose rotations end, before one that has none or whose reference is missing. */
function noRoute(from: Walk, to: Walk): Route {
  const ending = (end: Walk['end']): Walk | undefined => [from, to].find((walk) => walk.end === end);
  const stopped = ending('outside rotations') ?? ending('no rotations');
  const broken = stopped ?? ending('missing reference') ?? from;
  return { status: stopped ? 'outside rotations' : 'not connected', at: broken.blocks.at(-1)?.code ?? '' };
}

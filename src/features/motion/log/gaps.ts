/** Ages at which a block should have a place and has none: a missing reference, a hole in the rotations, a loop. */
import type { Model } from '../../../kernel/rotations/types';
import { list, shortAge } from '../format';
import { poseAt } from '../scene/tolerant';

export interface Gap {
  readonly younger: number;
  readonly older: number;
  /** Where the circuit stops. */
  readonly at: string;
  readonly words: string;
}

type Span = Omit<Gap, 'words'> & { readonly loop: readonly string[] | null; readonly unconnected: boolean };

/**
 * Gaps younger than the block's oldest place in the frame, and loops wherever they are; youngest first. Ages before and
 * after the block's own existence are not gaps.
 */
export function gapsOf(
  model: Model,
  block: string,
  frame: string,
  oldestPlaced: number | null,
  nameOf: (code: string) => string,
): Gap[] {
  const spans: Span[] = [];
  const ages = turningAges(model);
  ages.slice(1).forEach((older, i) => {
    const younger = ages[i] ?? 0;
    const middle = (younger + older) / 2;
    const pose = poseAt(model, block, middle, frame);
    if (pose.status !== 'outside rotations' && pose.status !== 'not connected') return;
    const loop = loopAt(model, block, middle);
    if (!loop && (oldestPlaced === null || older > oldestPlaced)) return;
    const last = spans[spans.length - 1];
    const unconnected = pose.status === 'not connected';
    if (last?.older === younger && last.at === pose.at && (last.loop === null) === (loop === null))
      spans[spans.length - 1] = { ...last, older };
    else spans.push({ younger, older, at: pose.at, loop, unconnected });
  });
  return spans.map(({ loop, unconnected, ...span }) => {
    const ages = `between ${shortAge(span.younger)} and ${shortAge(span.older)} Ma`;
    const words = loop
      ? `Not computed. The circuit runs in a loop, ${list(loop.map(nameOf))}, ${ages}.`
      : `Not computed. ${nameOf(span.at)} has no ${unconnected ? 'reference' : 'rotation'} ${ages}.`;
    return { ...span, words };
  });
}

/** Ages at which any circuit can change, from 0 on. */
function turningAges(model: Model): number[] {
  const ages = model.blocks.flatMap(({ legs }) => legs.flatMap((leg) => [leg.younger_ma, leg.older_ma]));
  return [...new Set([0, ...ages])].filter((age) => age <= model.oldest_ma).sort((a, b) => a - b);
}

/** The loop that a block's circuit runs into at an age. */
function loopAt(model: Model, block: string, age: number): readonly string[] | null {
  const seen = new Set<string>();
  for (let code: string | undefined = block; code !== undefined && !seen.has(code);) {
    seen.add(code);
    const legs = model.blocks.find((b) => b.code === code)?.legs ?? [];
    code = legs.find(({ younger_ma, older_ma }) => age > younger_ma && age <= older_ma)?.relative_to;
  }
  const loop = model.problems.find(
    (problem) =>
      problem.name === 'Cycle' &&
      age > problem.younger_ma &&
      age <= problem.older_ma &&
      problem.loop.some((code) => seen.has(code)),
  );
  return loop?.name === 'Cycle' ? loop.loop : null;
}

/** The frame that a model is shown in where nobody has chosen one. */
import type { Model } from '../../kernel/rotations/types';
import { poseAt } from './scene/tolerant';

/** Ages at which blocks are counted: the present joins blocks that no rotation does. */
const SHARES = [0.02, 0.25, 0.5, 0.75];

/**
 * The frame in which the most blocks have a place through the history, the first of those alike; the first block where
 * there is no frame; null for an empty model.
 */
export function usualFrame(model: Model): string | null {
  const frames = model.blocks.filter(({ kind }) => kind === 'frame');
  const ages = SHARES.map((share) => share * model.oldest_ma);
  const placed = (frame: string): number =>
    ages.reduce(
      (sum, age) =>
        sum + model.blocks.filter(({ code }) => poseAt(model, code, age, frame).status === 'placed').length,
      0,
    );
  const counts = frames.map(({ code }) => placed(code));
  return frames[counts.indexOf(Math.max(...counts))]?.code ?? model.blocks[0]?.code ?? null;
}

/** What a view opens with: the project's own choice where the model holds it, else the usual frame. */
export const openingFrame = (model: Model, held_still: string | null): string | null =>
  model.blocks.some(({ code }) => code === held_still) ? held_still : usualFrame(model);

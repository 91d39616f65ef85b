import { circuitBreakpoints } from './breakpoints';
import { routeAt } from './route';
import type { Model } from './types';

/**
 * Ages, ascending, of the rows (implied ones too) of every link between a block and relative_to within a
 * span, ends included: where the motion may change its pole and rate. Ages at which the two are not connected
 * have none.
 */
export function circuitRowAges(
  model: Model,
  block: string,
  older_ma: number,
  younger_ma: number,
  relative_to: string,
): number[] {
  const found = new Set<number>();
  const ends = circuitBreakpoints(model, block, relative_to);
  ends.forEach((older, i) => {
    const younger = ends[i - 1] ?? older;
    if (older < younger_ma || younger > older_ma) return;
    const route = routeAt(model, block, older, relative_to);
    for (const { leg } of route.status === 'placed' ? route.steps : []) {
      for (const { age_ma } of leg.rows) {
        if (age_ma >= Math.max(younger, younger_ma) && age_ma <= Math.min(older, older_ma)) found.add(age_ma);
      }
    }
  });
  return [...found].sort((a, b) => a - b);
}

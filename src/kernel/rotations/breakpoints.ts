import { findBlock } from './model-index';
import type { Model } from './types';

/**
 * Ages, ascending, at which the circuit between two blocks may change its links: the ends of the legs of
 * every block that either reaches at any age. From just above one such age up to and including the next the
 * links stay the same.
 */
export function circuitBreakpoints(model: Model, block: string, relative_to: string): number[] {
  const ages = new Set<number>([0]);
  const reached = new Set<string>();
  const waiting = [block, relative_to];
  for (let code = waiting.pop(); code !== undefined; code = waiting.pop()) {
    if (reached.has(code)) continue;
    reached.add(code);
    for (const leg of findBlock(model, code)?.legs ?? []) {
      ages.add(leg.younger_ma).add(leg.older_ma);
      waiting.push(leg.relative_to);
    }
  }
  return [...ages].sort((a, b) => a - b);
}

import { KernelError } from '../errors';
import { type Beyond, legAt } from './leg-at';
import { findBlock } from './model-index';
import type { CompiledBlock, Leg, Model } from './types';

/** Why a walk up the circuit ends where it does. */
export type WalkEnd = 'root' | 'no rotations' | 'outside rotations' | 'missing reference';

export interface Walk {
  /** The blocks met, the first the one asked for. */
  readonly blocks: readonly CompiledBlock[];
  /** legs[i] leads from blocks[i] to blocks[i + 1]. */
  readonly legs: readonly Leg[];
  readonly end: WalkEnd;
}

/**
 * From a block to its reference, its reference's reference and so on at an age. A frame without rotations is
 * a root.
 * @throws {KernelError} `CircuitCycle` with the loop.
 */
export function walkUp(model: Model, start: CompiledBlock, age_ma: number, beyond: Beyond = 'none'): Walk {
  const blocks = [start];
  const legs: Leg[] = [];
  for (let block = start; ;) {
    if (block.legs.length === 0)
      return { blocks, legs, end: block.kind === 'frame' ? 'root' : 'no rotations' };
    const leg = legAt(block, age_ma, beyond);
    if (!leg) return { blocks, legs, end: 'outside rotations' };
    const reference = findBlock(model, leg.relative_to);
    if (!reference) return { blocks, legs, end: 'missing reference' };
    const seen = blocks.indexOf(reference);
    if (seen >= 0) throw cycle(blocks.slice(seen), age_ma);
    blocks.push(reference);
    legs.push(leg);
    block = reference;
  }
}

function cycle(blocks: readonly CompiledBlock[], age_ma: number): KernelError {
  const loop = blocks.map((block) => block.code);
  const problem = `the circuit runs in a loop, ${[...loop, loop[0]].join(' → ')}`;
  return new KernelError('CircuitCycle', { quantity: 'age_ma', value: age_ma, problem, loop });
}

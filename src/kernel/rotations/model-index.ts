import { KernelError } from '../errors';
import type { CompiledBlock, Model } from './types';

const indexes = new WeakMap<Model, ReadonlyMap<string, number>>();

/** Place of each block in `model.blocks` by code; made once for a model, which must not change afterwards. */
export function createIndex(model: Model): ReadonlyMap<string, number> {
  const known = indexes.get(model);
  if (known) return known;
  const index = new Map(model.blocks.map((block, i) => [block.code, i]));
  indexes.set(model, index);
  return index;
}

export function findBlock(model: Model, code: string): CompiledBlock | null {
  const i = createIndex(model).get(code);
  return (i === undefined ? undefined : model.blocks[i]) ?? null;
}

/** @throws {KernelError} `UnknownBlock`. */
export function requireBlock(model: Model, code: string, quantity = 'block'): CompiledBlock {
  const block = findBlock(model, code);
  if (!block)
    throw new KernelError('UnknownBlock', {
      quantity,
      value: code,
      problem: 'no block or frame has this code',
    });
  return block;
}

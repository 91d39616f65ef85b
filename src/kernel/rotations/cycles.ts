import { legAt } from './leg-at';
import type { CompiledBlock, ModelProblem } from './types';

type Cycle = Extract<ModelProblem, { name: 'Cycle' }>;

/** Every loop of the circuits, each with the greatest range of ages over which it stays as it is. */
export function findCycles(blocks: readonly CompiledBlock[]): Cycle[] {
  const byCode = new Map(blocks.map((block) => [block.code, block]));
  const ends = new Set(blocks.flatMap(({ legs }) => legs.flatMap((leg) => [leg.younger_ma, leg.older_ma])));
  const ages = [...ends].sort((a, b) => a - b);
  const cycles: Cycle[] = [];
  ages.forEach((older_ma, i) => {
    const younger_ma = ages[i - 1] ?? older_ma;
    for (const loop of loopsAt(byCode, older_ma)) {
      const open = cycles.findIndex(
        (known) => known.older_ma === younger_ma && known.loop.join() === loop.join(),
      );
      const known = cycles[open];
      if (known) cycles[open] = { ...known, older_ma };
      else cycles.push({ name: 'Cycle', loop, older_ma, younger_ma });
    }
  });
  return cycles;
}

/**
 * References hold from just above one end of a leg up to and including the next, so one age stands for such a
 * range.
 */
function loopsAt(byCode: ReadonlyMap<string, CompiledBlock>, age_ma: number): string[][] {
  const done = new Set<string>();
  const loops: string[][] = [];
  for (const start of byCode.keys()) {
    const path: string[] = [];
    let code: string | undefined = start;
    while (code !== undefined && !done.has(code)) {
      done.add(code);
      path.push(code);
      const block = byCode.get(code);
      code = block && legAt(block, age_ma)?.relative_to;
    }
    const at = code === undefined ? -1 : path.indexOf(code);
    if (at >= 0) loops.push(fromLeast(path.slice(at)));
  }
  return loops;
}

function fromLeast(loop: readonly string[]): string[] {
  const least = loop.reduce((best, code, i) => (code < (loop[best] ?? code) ? i : best), 0);
  return [...loop.slice(least), ...loop.slice(0, least)];
}

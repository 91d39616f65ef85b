import { groupByAge } from './legs';
import type { ModelProblem } from './types';

type Parallel = Extract<ModelProblem, { name: 'ParallelSequences' }>;

interface Row {
  readonly relative_to: string;
  readonly age_ma: number;
}

/**
 * Ages at which rows of one block run side by side in two references or more, so that nothing says which of
 * them holds in between. One leg between two hand-overs (A → B → A) has both references at its two ends alone,
 * and goes on both sides (at the younger one, at least to the implied identity): three such ages in a row, or
 * two with nothing beyond, are no hand-over.
 */
export function findParallel(block: string, rows: readonly Row[]): Parallel[] {
  const found: Parallel[] = [];
  const ages = groupByAge(rows).map((group) => ({
    age_ma: group[0]?.age_ma ?? 0,
    references: [...new Set(group.map((row) => row.relative_to))],
  }));
  for (let start = 0; start < ages.length;) {
    let shared = ages[start]?.references ?? [];
    let end = start + 1;
    for (; end < ages.length && shared.length > 1; end++) {
      const both = shared.filter((code) => ages[end]?.references.includes(code));
      if (both.length < 2) break;
      shared = both;
    }
    const [younger, older] = [ages[start], ages[end - 1]];
    const atAnEnd = younger?.age_ma === 0 || end === ages.length;
    if (younger && older && shared.length > 1 && end - start >= (atAnEnd ? 2 : 3)) {
      found.push({
        name: 'ParallelSequences',
        block,
        references: [...shared].sort(),
        older_ma: older.age_ma,
        younger_ma: younger.age_ma,
      });
    }
    start = Math.max(start + 1, end - 1);
    if (end >= ages.length) break;
  }
  return found;
}

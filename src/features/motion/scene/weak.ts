/** Where constraint weakens: what a block's own rotation in use at an age lacks. */
import { legAt } from '../../../kernel/rotations';
import type { CompiledBlock, CompiledRow } from '../../../kernel/rotations/types';

export const WEAKNESSES = ['no covariance', 'posed', 'long gap'] as const;
export type Weakness = (typeof WEAKNESSES)[number];

/** Neighbouring rows further apart than this, Myr, are a long gap. Common practice, no source. */
const LONG_GAP_MYR = { mesozoicAndYounger: 20, older: 50 } as const;
/** Base of the Triassic, Ma (ICS chart). */
const TRIASSIC_BASE_MA = 251.902;

/** Of the block's own link: rows without a covariance, rows posed by hand, rows far apart. Empty at 0 Ma, where nothing is open. */
export function weaknessesAt(block: CompiledBlock, age_ma: number): readonly Weakness[] {
  if (age_ma === 0) return [];
  const rows = rowsAround(block, age_ma);
  if (rows.length === 0) return [];
  const open = rows.filter(({ implied }) => !implied);
  const [younger, older] = [rows[0]!, rows.at(-1)!];
  const most = age_ma < TRIASSIC_BASE_MA ? LONG_GAP_MYR.mesozoicAndYounger : LONG_GAP_MYR.older;
  const found: Record<Weakness, boolean> = {
    'no covariance': open.some(({ covariance }) => covariance === null),
    posed: open.some(({ evidence }) => evidence === 'posed'),
    'long gap': older.age_ma - younger.age_ma > most,
  };
  return WEAKNESSES.filter((weakness) => found[weakness]);
}

/** The rows that an age lies between, or the one that it lies at. */
function rowsAround(block: CompiledBlock, age_ma: number): readonly CompiledRow[] {
  const rows = legAt(block, age_ma)?.rows ?? [];
  const at = rows.findIndex((row) => row.age_ma >= age_ma);
  if (at < 0) return [];
  return rows[at]!.age_ma === age_ma ? [rows[at]!] : rows.slice(Math.max(0, at - 1), at + 1);
}

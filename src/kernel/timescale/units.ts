import { requireAge } from '../errors';
import { CHART_ROWS, EDITION } from './chart';

export const RANKS = ['eon', 'era', 'period', 'epoch', 'stage'] as const;
export type Rank = (typeof RANKS)[number];

/** A unit of the chart. An age belongs to it when younger_ma < age ≤ older_ma; 0 to the youngest. */
export interface GeologicalUnit {
  readonly name: string;
  readonly rank: Rank;
  readonly older_ma: number;
  readonly younger_ma: number;
  /** As printed on the chart, #RRGGBB. */
  readonly colour: string;
}

export interface Chart {
  /** Name the edition wherever the chart is shown. */
  readonly edition: string;
  /** By rank from eon to stage, youngest first within a rank. */
  readonly units: readonly GeologicalUnit[];
}

/**
 * The chart's ranks reach back as far as they are divided: eons to 4567 Ma, eras to 4031 Ma, periods to 2500
 * Ma, epochs and stages to 538.8 Ma.
 */
export const CHRONOSTRATIGRAPHIC_CHART: Chart = {
  edition: EDITION,
  units: CHART_ROWS.map(([rank, name, older_ma, colour], i) => {
    const [before, , base] = CHART_ROWS[i - 1] ?? [];
    return { rank, name, older_ma, younger_ma: before === rank ? (base ?? 0) : 0, colour };
  }),
};

const byRank = new Map(
  RANKS.map((rank) => [rank, CHRONOSTRATIGRAPHIC_CHART.units.filter((unit) => unit.rank === rank)]),
);

/**
 * The unit that holds an age; null beyond the oldest of that rank. @throws {KernelError} `NegativeAge`,
 * `NonFinite`.
 */
export function unitAt(age_ma: number, rank: Rank): GeologicalUnit | null {
  requireAge('age_ma', age_ma);
  return byRank.get(rank)?.find((unit) => age_ma <= unit.older_ma) ?? null;
}

/**
 * The units of a rank that share some of a span of ages, youngest first; units that only touch an end of it
 * are left out.
 */
export function unitsBetween(older_ma: number, younger_ma: number, rank: Rank): GeologicalUnit[] {
  requireAge('older_ma', older_ma);
  requireAge('younger_ma', younger_ma);
  return (byRank.get(rank) ?? []).filter((unit) => unit.older_ma > younger_ma && unit.younger_ma < older_ma);
}

/** The rotations strip: a column for each link of a block's circuit, filled by evidence between its rows. */
import { poseAt } from '../scene/tolerant';
import type { CompiledRow, Evidence, Link, Model } from '../../../kernel/rotations/types';

export interface Fill {
  readonly younger: number;
  readonly older: number;
  readonly evidence: Evidence;
}

export interface Bar {
  readonly age: number;
  readonly handOver: boolean;
  readonly withoutCovariance: boolean;
  readonly inUse: boolean;
}

export interface Column {
  readonly block: string;
  readonly fills: readonly Fill[];
  readonly bars: readonly Bar[];
  /** Spans of one reference, for the words along the column. */
  readonly legs: readonly {
    readonly relative_to: string;
    readonly younger: number;
    readonly older: number;
  }[];
  /** Age beyond which there are no rotations. */
  readonly oldest: number;
}

/** The links of a block's circuit at an age; beyond its rotations, those of its oldest placed age. */
export function linksAt(model: Model, block: string, age: number, heldStill: string): readonly Link[] {
  const pose = poseAt(model, block, age, heldStill);
  if (pose.status === 'placed') return pose.links;
  const oldest = oldestPlaced(model, block, heldStill);
  const last = oldest === null ? null : poseAt(model, block, oldest, heldStill);
  return last?.status === 'placed' ? last.links : [];
}

/** Oldest age at which a block has a place in a frame, among the ages of its rows. */
export function oldestPlaced(model: Model, block: string, heldStill: string): number | null {
  const ages = model.blocks.flatMap(({ legs }) => legs.map(({ older_ma }) => older_ma));
  const placed = [0, ...ages].filter((age) => poseAt(model, block, age, heldStill).status === 'placed');
  return placed.length === 0 ? null : Math.max(...placed);
}

/** A link's block, and the ids of its two rows in use where the circuit holds at the age. */
export interface UsedLink {
  readonly block: string;
  readonly rows: readonly string[];
}

export function usedLinks(model: Model, block: string, age: number, heldStill: string): UsedLink[] {
  const placed = poseAt(model, block, age, heldStill).status === 'placed';
  return linksAt(model, block, age, heldStill).map((link) => ({
    block: link.block,
    rows: placed ? [link.younger.id, link.older.id] : [],
  }));
}

/** One column per link, in the order of the circuit. */
export function columnsOf(model: Model, links: readonly UsedLink[]): Column[] {
  return links.map(({ block, rows }) => {
    const legs = model.blocks.find(({ code }) => code === block)?.legs ?? [];
    const used = new Set(rows);
    const handOvers = new Set(legs.slice(1).map(({ younger_ma }) => younger_ma));
    return {
      block,
      legs: legs.map(({ relative_to, younger_ma, older_ma }) => ({
        relative_to,
        younger: younger_ma,
        older: older_ma,
      })),
      fills: legs.flatMap(({ rows: all }) => all.slice(1).flatMap((older, i) => fillBetween(all[i], older))),
      bars: legs.flatMap(({ rows: all }) =>
        all.filter(({ age_ma }) => age_ma > 0).map((row) => barOf(row, handOvers, used)),
      ),
      oldest: legs.at(-1)?.older_ma ?? 0,
    };
  });
}

/** Between two rows the older one's evidence fills: it is what the stage towards it rests on. */
function fillBetween(younger: CompiledRow | undefined, older: CompiledRow): Fill[] {
  return younger ? [{ younger: younger.age_ma, older: older.age_ma, evidence: older.evidence }] : [];
}

const barOf = (row: CompiledRow, handOvers: ReadonlySet<number>, used: ReadonlySet<string>): Bar => ({
  age: row.age_ma,
  handOver: handOvers.has(row.age_ma),
  withoutCovariance: row.covariance === null && !row.implied,
  inUse: used.has(row.id),
});

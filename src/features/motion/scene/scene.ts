/** Everything a workbench draws from, made once from what the server answered. */
import { holdsAt } from '../../../kernel/rotations/circuit';
import type { Evidence, Model } from '../../../kernel/rotations/types';
import type { Direction } from '../../ledger/contract';
import type { Shape } from '../globe/shape';
import { shortName } from '../names';

export interface SceneOutline {
  readonly shape: Shape;
  readonly older_ma: number | null;
  readonly younger_ma: number | null;
}

export interface SceneBlock {
  readonly code: string;
  readonly name: string;
  /** As it stands in narrow headings. */
  readonly short: string;
  readonly kind: string;
  readonly evidence: Evidence;
  readonly outlines: readonly SceneOutline[];
}

/** Lines that a block carries. */
export interface SceneLine {
  readonly block: string;
  readonly kind: string;
  readonly name: string;
  readonly shape: Shape;
  readonly appears_ma: number | null;
  readonly disappears_ma: number | null;
}

/** A named place that a block carries, in its present coordinates. */
export interface ScenePoint {
  readonly block: string;
  readonly kind: string;
  readonly name: string;
  readonly lat: number;
  readonly lon: number;
  readonly appears_ma: number | null;
  readonly disappears_ma: number | null;
}

export interface Scene {
  readonly title: string;
  readonly model: Model;
  readonly blocks: readonly SceneBlock[];
  readonly lines: readonly SceneLine[];
  readonly points: readonly ScenePoint[];
  readonly directions: readonly Direction[];
  /** Oldest age of the column: the oldest rotation or direction, rounded up to a whole step of the axis. */
  readonly oldest: number;
}

export interface SceneInput {
  readonly title: string;
  readonly model: Model;
  readonly blocks: readonly Omit<SceneBlock, 'short'>[];
  readonly lines: readonly SceneLine[];
  readonly points: readonly ScenePoint[];
  readonly directions: readonly Direction[];
}

/** Steps that an age axis counts in, by its length. */
export function axisStep(oldest: number): number {
  for (const step of [1, 2, 5, 10, 20, 50, 100, 200]) if (oldest / step <= 12) return step;
  return 500;
}

/** How far the column reaches before anything is dated, Ma: about the oldest sea floor. Common practice, no source. */
const EMPTY_REACH_MA = 200;

export function sceneOf(input: SceneInput): Scene {
  const ages = input.directions.map(({ age_max_ma, age_ma }) => age_max_ma ?? age_ma ?? 0);
  const known = Math.max(input.model.oldest_ma, ...ages);
  const reach = known > 0 ? known : EMPTY_REACH_MA;
  const step = axisStep(reach);
  return {
    ...input,
    blocks: input.blocks.map((block) => ({ ...block, short: shortName(block) })),
    oldest: Math.ceil(reach / step) * step,
  };
}

export const findSceneBlock = (scene: Scene, code: string | null): SceneBlock | undefined =>
  scene.blocks.find((block) => block.code === code);

/** The outline a block has at an age, if any. */
export const outlineAt = (block: SceneBlock, age: number): Shape | null =>
  block.outlines.find(({ older_ma, younger_ma }) => holdsAt(older_ma, younger_ma, age))?.shape ?? null;

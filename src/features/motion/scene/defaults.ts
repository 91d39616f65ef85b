/** What a workbench shows when a link says nothing: the block with the longest record, held in the root frame. */
import { toMatrix } from '../../../kernel/rotations';
import { handOverJumps, poseAt } from './tolerant';
import type { Model } from '../../../kernel/rotations/types';
import { placeOf, turn, unit, vectorOf, type Centre, type Vec } from '../globe/matrix';
import { LINKED, type Linked } from '../store/state';
import { ownPoint } from './points';
import { findSceneBlock, type Scene } from './scene';

const rowCount = (model: Model, code: string): number =>
  model.blocks.find((block) => block.code === code)?.legs.reduce((sum, { rows }) => sum + rows.length, 0) ??
  0;

/**
 * The frame at the top of a block's circuit; where hand-overs lead to several, the one that it is placed in for the
 * longest; else the first frame, else the block itself.
 */
export function rootFrame(model: Model, code: string | null): string {
  const block = model.blocks.find((candidate) => candidate.code === code);
  const tops = block ? topsOf(model, block.code) : [];
  if (tops.length <= 1 || !block)
    return (
      tops[0] ??
      model.blocks.find(({ kind }) => kind === 'frame')?.code ??
      block?.code ??
      model.blocks[0]?.code ??
      ''
    );
  const spans = tops.map((top) => placedSpan(model, block.code, top));
  return tops[spans.indexOf(Math.max(...spans))]!;
}

/** Blocks and frames without rotations of their own at which a block's circuits end, whatever the age. */
function topsOf(model: Model, code: string): string[] {
  const seen = new Set([code]);
  const tops: string[] = [];
  for (const next of seen) {
    const legs = model.blocks.find((block) => block.code === next)?.legs ?? [];
    if (legs.length === 0 && next !== code) tops.push(next);
    for (const { relative_to } of legs) seen.add(relative_to);
  }
  return tops.filter((top) => model.blocks.some((block) => block.code === top));
}

/** Myr for which a block is placed in a frame. */
function placedSpan(model: Model, code: string, frame: string): number {
  const ends = model.blocks.flatMap(({ legs }) => legs.flatMap((leg) => [leg.younger_ma, leg.older_ma]));
  const ages = [...new Set([0, ...ends])].sort((a, b) => a - b);
  return ages.slice(1).reduce((sum, older, i) => {
    const younger = ages[i]!;
    const placed = poseAt(model, code, (younger + older) / 2, frame).status === 'placed';
    return placed ? sum + older - younger : sum;
  }, 0);
}

function firstBlock(scene: Scene): string | null {
  const outlined = scene.blocks.filter(({ outlines }) => outlines.length > 0);
  const ranked = [...outlined].sort((a, b) => rowCount(scene.model, b.code) - rowCount(scene.model, a.code));
  return ranked[0]?.code ?? null;
}

/** Where the selected block's last hand-over is, else half-way to its oldest row. */
function firstAge(scene: Scene, code: string | null): number {
  const jump = handOverJumps(scene.model).find(({ block }) => block === code);
  const oldest = scene.model.blocks.find((block) => block.code === code)?.legs.at(-1)?.older_ma ?? 0;
  return jump?.age_ma ?? Math.round(oldest / 2);
}

/** Between the selected block and the middle of all blocks, at that age. */
export function homeCentre(scene: Scene, linked: Pick<Linked, 'age' | 'heldStill' | 'block'>): Centre {
  const sum: Vec = [0, 0, 0];
  const add = (v: Vec, weight: number) => v.forEach((x, i) => (sum[i] = (sum[i] as number) + weight * x));
  const placed = scene.blocks.flatMap((block) => {
    const point = ownPoint(scene, block);
    const pose = point && poseAt(scene.model, block.code, linked.age, linked.heldStill);
    if (!point || pose?.status !== 'placed') return [];
    return [{ code: block.code, at: turn(toMatrix(pose.quaternion), vectorOf(point.lat, point.lon)) }];
  });
  for (const { code, at } of placed) add(at, code === linked.block ? 1 : 1 / placed.length);
  if (Math.hypot(...sum) < 1e-6) return LINKED.centre;
  const { lat, lon } = placeOf(unit(sum));
  return { lat: Math.round(lat), lon: Math.round(lon), roll: 0 };
}

/** A complete state from what a link or a page states; codes that the model doesn't know are left out. */
export function complete(scene: Scene, stated: Partial<Linked>): Linked {
  const knows = (code: string | null | undefined): code is string =>
    scene.model.blocks.some((block) => block.code === code);
  const block = findSceneBlock(scene, stated.block ?? null) ? (stated.block ?? null) : firstBlock(scene);
  const heldStill = knows(stated.heldStill) ? stated.heldStill : rootFrame(scene.model, block);
  const age = Math.min(stated.age ?? firstAge(scene, block), scene.oldest);
  const point = block === stated.block ? (stated.point ?? null) : null;
  const centre = stated.centre ?? homeCentre(scene, { age, heldStill, block });
  return { ...LINKED, ...stated, age, block, heldStill, point, centre };
}

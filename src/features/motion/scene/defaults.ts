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

/** The frame at the top of a block's circuit; else the first frame, else the block itself. */
export function rootFrame(model: Model, code: string | null): string {
  const seen = new Set<string>();
  let block = model.blocks.find((candidate) => candidate.code === code);
  while (block && block.legs.length > 0 && !seen.has(block.code)) {
    seen.add(block.code);
    const above: string | undefined = block.legs.at(-1)?.relative_to;
    block = model.blocks.find((candidate) => candidate.code === above) ?? block;
  }
  return (
    block?.code ?? model.blocks.find(({ kind }) => kind === 'frame')?.code ?? model.blocks[0]?.code ?? ''
  );
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

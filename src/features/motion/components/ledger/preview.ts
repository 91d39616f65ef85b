/** What a cell under edit would do: the model with the new value, and how far it moves the block. */
import { compileModel, poseAt, rotate } from '../../../../kernel/rotations';
import type { Model } from '../../../../kernel/rotations/types';
import { distanceKm, toVector } from '../../../../kernel/sphere';
import type { Block, Rotation } from '../../../ledger/contract';
import type { Editing } from '../../../ledger/components/grid-props';
import type { NamedPoint } from '../../scene/points';

const MOVES = new Set(['relative_to', 'age_ma', 'pole_lat', 'pole_lon', 'angle_deg']);

/** The model as it would be; null where the cell moves nothing or cannot be read. */
export function previewOf(
  editing: Editing,
  blocks: readonly Block[],
  rotations: readonly Rotation[],
): Model | null {
  if (!MOVES.has(editing.key)) return null;
  const typed = editing.column.read(editing.text);
  if (!typed.ok || !rotations.some((row) => row.id === editing.row)) return null;
  const changed = rotations.map((row) =>
    row.id === editing.row ? { ...row, [editing.key]: typed.value } : row,
  );
  return compileModel(blocks, changed);
}

/** Distance between where two models have a point at an age; null where either has no place for it. */
export function movedKm(
  before: Model,
  after: Model,
  point: NamedPoint,
  age_ma: number,
  heldStill: string,
): number | null {
  const [a, b] = [before, after].map((model) => placed(model, point, age_ma, heldStill));
  return a && b ? distanceKm(a, b) : null;
}

function placed(model: Model, { block, lat, lon }: NamedPoint, age_ma: number, heldStill: string) {
  try {
    const pose = poseAt(model, block, age_ma, heldStill);
    return pose.status === 'placed' ? rotate(pose.quaternion, toVector(lat, lon)) : null;
  } catch {
    // A reference under edit may close a loop for as long as it is being typed.
    return null;
  }
}

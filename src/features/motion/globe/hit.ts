/** Which block lies under a place of the held-still frame, and where on it. */
import { matrixOf, type Frame } from '../scene/frame';
import { outlineAt, type Scene } from '../scene/scene';
import { contains } from './contains';
import { placeOf, turnBack, type Vec } from './matrix';

export interface Hit {
  readonly block: string;
  /** In the block's present coordinates, degrees. */
  readonly lat: number;
  readonly lon: number;
}

/** The selected block wins where blocks overlap, as it is drawn on top. */
export function hitAt(scene: Scene, frame: Frame, at: Vec, selected: string | null): Hit | null {
  const order = [...scene.blocks].sort((a, b) => Number(b.code === selected) - Number(a.code === selected));
  for (const block of order) {
    const shape = outlineAt(block, frame.age);
    const pose = matrixOf(frame, block.code);
    if (!shape || !pose) continue;
    const present = turnBack(pose, at);
    if (contains(shape, present)) return { block: block.code, ...placeOf(present) };
  }
  return null;
}

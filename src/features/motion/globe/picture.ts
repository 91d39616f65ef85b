/** One picture: what is drawn, where, and how. */
import type { Frame } from '../scene/frame';
import type { NamedPoint } from '../scene/points';
import { holdsAt } from '../../../kernel/rotations/circuit';
import { outlineAt, type Scene } from '../scene/scene';
import { weaknessesAt } from '../scene/weak';
import type { Separation } from '../scene/separation';
import type { Track } from '../scene/track';
import type { Layer } from '../store/state';
import type { GroundOptions } from './ground';
import type { Vec } from './matrix';
import type { DrawnBlock } from './paint-blocks';
import type { Palette } from './palette';

export interface Picture extends GroundOptions {
  readonly scene: Scene;
  readonly frame: Frame;
  readonly flat: boolean;
  readonly off: ReadonlySet<Layer>;
  readonly selected: string | null;
  readonly point: NamedPoint | null;
  readonly track: Track | null;
  readonly separation: Separation | null;
  readonly cursor: Vec | null;
  readonly palette: Palette;
  readonly shortNames: boolean;
}

/** The scene without the blocks whose evidence is switched off. */
export function visible({ scene, off }: Picture): Scene {
  return off.size === 0
    ? scene
    : { ...scene, blocks: scene.blocks.filter(({ evidence }) => !off.has(evidence)) };
}

/** Blocks with an outline at this age, the selected one last so that nothing covers it. */
export function drawnBlocks(picture: Picture): DrawnBlock[] {
  const { selected, frame } = picture;
  const sorted = [...visible(picture).blocks].sort(
    (a, b) => Number(a.code === selected) - Number(b.code === selected),
  );
  return sorted.flatMap((block) => {
    const shape = outlineAt(block, frame.age);
    const carrier = frame.indexOf.get(block.code);
    if (!shape || carrier === undefined) return [];
    const compiled = frame.model.blocks[carrier];
    const weak = compiled !== undefined && weaknessesAt(compiled, frame.age).length > 0;
    return [{ evidence: block.evidence, weak, shape, carrier }];
  });
}

/** Present coasts carried by the blocks that are shown. */
export function drawnCoasts(picture: Picture): Omit<DrawnBlock, 'evidence' | 'weak'>[] {
  const shown = new Set(visible(picture).blocks.map(({ code }) => code));
  return picture.scene.lines
    .filter(({ kind, block, appears_ma, disappears_ma }) => {
      return kind === 'layer' && shown.has(block) && holdsAt(appears_ma, disappears_ma, picture.frame.age);
    })
    .map(({ shape, block }) => ({ shape, carrier: picture.frame.indexOf.get(block) ?? -1 }));
}

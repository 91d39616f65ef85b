/** Paints a picture on two canvases, what stands below and what is marked on top, and keeps what both use again. */
import { arrowsAt } from '../scene/arrows';
import { matrixOf, type Frame } from '../scene/frame';
import { mapName } from '../names';
import { holdsAt } from '../../../kernel/rotations/circuit';
import { outlineAt } from '../scene/scene';
import { extentOf } from './block-extent';
import { Clipper } from './clip';
import type { Ground } from './ground';
import { flatGround } from './ground-flat';
import { globeGround } from './ground-globe';
import type { Box } from './labels';
import { turn, vectorOf } from './matrix';
import { paintBlocks, paintLines } from './paint-blocks';
import { paintArrows, paintCursor, paintPlaceName, paintSeparation } from './paint-marks';
import { paintFigures } from './paint-figures';
import { paintNames } from './paint-names';
import { ellipse, paintPoint, paintTrack } from './paint-track';
import type { Palette } from './palette';
import { buildPatterns, type Patterns } from './patterns';
import type { Pen } from './pen';
import { drawnBlocks, drawnCoasts, visible, type Picture } from './picture';

const SELECTED = 1.9;

export class Studio {
  private readonly clipper = new Clipper();
  private readonly patterns = new Map<number, Patterns>();
  private palette: Palette | null = null;
  private readonly memory = new Map<string, number>();

  ground(picture: Picture): Ground {
    return picture.flat ? flatGround(picture) : globeGround(picture, this.clipper);
  }

  paintBase(ctx: CanvasRenderingContext2D, picture: Picture): void {
    const { palette, scale, off, frame } = picture;
    const pen = { ctx, palette, scale, clipper: this.clipper };
    const ground = this.ground(picture);
    const style = { palette, scale, patterns: this.patternsFor(ctx, palette, scale) };
    ctx.clearRect(0, 0, ground.width, ground.height);
    ground.paintUnder(pen, !off.has('graticule'));
    paintBlocks(ctx, ground, drawnBlocks(picture), frame.matrices, style);
    if (!off.has('coast')) paintLines(ctx, ground, drawnCoasts(picture), frame.matrices, style);
    ground.paintOver(pen, !off.has('graticule'));
  }

  paintMarks(ctx: CanvasRenderingContext2D, picture: Picture): void {
    const { palette, scale, off, frame, track, separation, cursor } = picture;
    const pen = { ctx, palette, scale, clipper: this.clipper };
    const ground = this.ground(picture);
    ctx.clearRect(0, 0, ground.width, ground.height);
    this.outlineSelected(pen, ground, picture);
    if (!off.has('velocity') && frame.age > 0) paintArrows(pen, ground, arrowsAt(visible(picture), frame));
    const taken: Box[] = [];
    if (separation && !off.has('separation')) taken.push(...paintSeparation(pen, ground, separation));
    const path =
      track && !off.has('path') ? paintTrack(pen, ground, track, frame.age, !off.has('ellipse')) : null;
    taken.push(...(path?.clear ?? []));
    taken.push(...this.paintSelectedPoint(pen, ground, picture));
    if (!off.has('names')) {
      if (!picture.shortNames) taken.push(...paintPlaces(pen, ground, picture));
      taken.push(...this.paintBlockNames(pen, ground, picture, taken, path?.avoid ?? []));
    }
    if (!off.has('graticule')) paintFigures(pen, ground, taken);
    if (cursor) paintCursor(pen, ground, cursor);
  }

  private patternsFor(ctx: CanvasRenderingContext2D, palette: Palette, scale: number): Patterns {
    if (this.palette !== palette) {
      this.patterns.clear();
      this.palette = palette;
    }
    let patterns = this.patterns.get(scale);
    if (!patterns) this.patterns.set(scale, (patterns = buildPatterns(ctx, palette, scale)));
    return patterns;
  }

  private outlineSelected(
    { ctx, palette, scale }: Pen,
    ground: Ground,
    { scene, frame, selected }: Picture,
  ): void {
    const block = scene.blocks.find(({ code }) => code === selected);
    const shape = block && outlineAt(block, frame.age);
    const pose = block && matrixOf(frame, block.code);
    if (!shape || !pose || ground.load(shape, pose) === 'hidden') return;
    ctx.beginPath();
    ground.edges(ctx, true);
    ctx.strokeStyle = palette.ochre;
    ctx.lineWidth = SELECTED * scale;
    ctx.lineJoin = 'round';
    ctx.stroke();
  }

  private paintSelectedPoint(pen: Pen, ground: Ground, { frame, point, track, off }: Picture): Box[] {
    const pose = point && matrixOf(frame, point.block);
    if (!point || !pose) return [];
    const v = turn(pose, vectorOf(point.lat, point.lon));
    const at = ground.at(v);
    if (!at) return [];
    const near = track?.points.reduce((a, b) => (apart(b.age, frame) < apart(a.age, frame) ? b : a));
    if (near?.ellipse && !off.has('ellipse') && apart(near.age, frame) <= 1)
      ellipse(pen, ground, { ...near, v }, true);
    paintPoint(pen, at);
    const r = 8 * pen.scale;
    return [{ x: at[0] - r, y: at[1] - r, w: 2 * r, h: 2 * r }];
  }

  private paintBlockNames(
    pen: Pen,
    ground: Ground,
    picture: Picture,
    taken: readonly Box[],
    avoid: readonly Box[],
  ): Box[] {
    const { frame, selected, shortNames } = picture;
    const wishes = visible(picture).blocks.flatMap((block) => {
      const shape = outlineAt(block, frame.age);
      const pose = matrixOf(frame, block.code);
      const extent = shape && pose && extentOf(shape, pose, 0, ground);
      if (!extent || extent.right - extent.left < 12 * pen.scale) return [];
      const name = block.code === selected ? block.name : shortNames ? block.short : mapName(block);
      return [{ key: block.code, name, extent, selected: block.code === selected }];
    });
    return paintNames(pen, wishes, { clear: taken, avoid }, (box) => fits(ground, box), this.memory);
  }
}

/** On the canvas, and not hanging over the limb by more than a few letters. */
function fits(ground: Ground, { x, y, w, h }: Box): boolean {
  const onCanvas = x >= 0 && y >= 0 && x + w <= ground.width && y + h <= ground.height;
  const middle = y + h / 2;
  return onCanvas && [0.15, 0.85].every((share) => ground.holds(x + share * w, middle));
}

const apart = (age: number, frame: Frame): number => Math.abs(age - frame.age);

function paintPlaces(pen: Pen, ground: Ground, { scene, frame }: Picture): Box[] {
  return scene.points.flatMap(({ name, block, lat, lon, kind, appears_ma, disappears_ma }) => {
    const pose = matrixOf(frame, block);
    if (kind !== 'layer' || !name || !pose || !holdsAt(appears_ma, disappears_ma, frame.age)) return [];
    return paintPlaceName(pen, ground, name, turn(pose, vectorOf(lat, lon)));
  });
}

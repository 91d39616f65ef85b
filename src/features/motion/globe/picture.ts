/** Paints one globe on its two canvases: what stands below, and what is marked on top. */
import { arrowsAt } from '../scene/arrows';
import { matrixOf, type Frame } from '../scene/frame';
import { type NamedPoint } from '../scene/points';
import { holdsAt, outlineAt, type Scene } from '../scene/scene';
import { type Separation } from '../scene/separation';
import { type Track } from '../scene/track';
import { type Layer } from '../store/state';
import { extentOf } from './block-extent';
import { Clipper } from './clip';
import { type Box } from './labels';
import { multiply, turn, vectorOf, viewMatrix, type Centre, type Vec } from './matrix';
import { paintBlocks, paintLines, type DrawnBlock, type DrawnLines } from './paint-blocks';
import { paintArrows, paintCursor, paintPlaceName, paintSeparation } from './paint-marks';
import { paintNames } from './paint-names';
import { paintDisc, paintGraticule, paintLimb, paintLimbLabels, paintMeridianLabels, RING } from './paint-sphere';
import { ellipse, paintPoint, paintTrack } from './paint-track';
import { type Palette } from './palette';
import { buildPatterns, type Patterns } from './patterns';
import { place, type Look, type Pen } from './pen';
import { levelFor } from './shape';

export interface Picture {
  readonly scene: Scene;
  readonly frame: Frame;
  readonly centre: Centre;
  readonly zoom: number;
  readonly off: ReadonlySet<Layer>;
  readonly moving: boolean;
  readonly selected: string | null;
  readonly point: NamedPoint | null;
  readonly track: Track | null;
  readonly separation: Separation | null;
  readonly cursor: Vec | null;
  readonly palette: Palette;
  /** CSS pixels. */
  readonly width: number;
  readonly height: number;
  /** Device pixels to a CSS pixel. */
  readonly scale: number;
  readonly shortNames: boolean;
  /** Fraction of the smaller side that the radius takes at zoom 1. */
  readonly fit?: number;
}

/** Room around the limb for its labels, CSS pixels. */
const MARGIN = 24;

/** Radius of the globe at zoom 1, CSS pixels. */
export const baseRadius = (width: number, height: number): number =>
  Math.max(40, Math.min(width, height) / 2 - MARGIN);

export function lookOf({ centre, zoom, width, height, scale, moving, fit }: Picture): Look {
  const radius = (fit ? (fit * Math.min(width, height)) / 2 : baseRadius(width, height)) * zoom * scale;
  return {
    disc: { cx: (width / 2) * scale, cy: (height / 2) * scale, radius },
    view: viewMatrix(centre),
    width: width * scale,
    height: height * scale,
    level: levelFor(radius, moving ? 0.9 : 0.3),
  };
}

/** What is kept from picture to picture. */
export class Studio {
  private readonly clipper = new Clipper();
  private patterns = new Map<number, Patterns>();
  private palette: Palette | null = null;
  private readonly memory = new Map<string, number>();
  private matrices = new Float64Array(0);

  pen(ctx: CanvasRenderingContext2D, { palette, scale }: Picture): Pen {
    return { ctx, palette, scale, clipper: this.clipper };
  }

  patternsFor(ctx: CanvasRenderingContext2D, { palette, scale }: Picture): Patterns {
    if (this.palette !== palette) {
      this.patterns.clear();
      this.palette = palette;
    }
    let patterns = this.patterns.get(scale);
    if (!patterns) this.patterns.set(scale, (patterns = buildPatterns(ctx, palette, scale)));
    return patterns;
  }

  /** View matrices of all blocks: `view` times each pose. */
  private turned(frame: Frame, look: Look): Float64Array {
    if (this.matrices.length !== frame.matrices.length) this.matrices = new Float64Array(frame.matrices.length);
    for (let at = 0; at < frame.matrices.length; at += 9) multiply(look.view, frame.matrices, this.matrices, at, at);
    return this.matrices;
  }

  paintBase(ctx: CanvasRenderingContext2D, picture: Picture): void {
    const pen = this.pen(ctx, picture);
    const look = lookOf(picture);
    ctx.clearRect(0, 0, look.width, look.height);
    paintDisc(pen, look);
    paintGraticule(pen, look, !picture.off.has('graticule'));
    const style = { ...picture, patterns: this.patternsFor(ctx, picture), level: look.level };
    const matrices = this.turned(picture.frame, look);
    const { blocks, order } = drawnBlocks(picture);
    paintBlocks(ctx, this.clipper, look.disc, blocks, pick(matrices, order), style);
    if (!picture.off.has('coast')) paintLines(ctx, this.clipper, look.disc, drawnLines(picture), matrices, style);
    paintLimb(pen, look);
    if (!picture.off.has('graticule')) paintLimbLabels(pen, look);
  }

  paintMarks(ctx: CanvasRenderingContext2D, picture: Picture): void {
    const pen = this.pen(ctx, picture);
    const look = lookOf(picture);
    const { off, frame, scene, track, separation } = picture;
    ctx.clearRect(0, 0, look.width, look.height);
    const matrices = this.turned(frame, look);
    this.outlineSelected(pen, look, picture, matrices);
    if (!off.has('velocity')) paintArrows(pen, look, arrowsAt(visible(picture), frame));
    if (!off.has('graticule')) paintMeridianLabels(pen, look);
    const taken: Box[] = [];
    if (separation && !off.has('separation')) taken.push(...paintSeparation(pen, look, separation));
    if (track && !off.has('path')) taken.push(...paintTrack(pen, look, track, frame.age, !off.has('ellipse')));
    taken.push(...this.paintSelectedPoint(pen, look, picture));
    if (!off.has('names')) {
      for (const { name, block, lat, lon, kind, appears_ma, disappears_ma } of scene.points) {
        const m = matrixOf(frame, block);
        if (kind !== 'layer' || !name || !m || !holdsAt(appears_ma, disappears_ma, frame.age)) continue;
        taken.push(...paintPlaceName(pen, look, name, turn(m, vectorOf(lat, lon))));
      }
      this.paintBlockNames(pen, look, picture, matrices, taken);
    }
    if (picture.cursor) paintCursor(pen, look, picture.cursor);
  }

  private outlineSelected({ ctx, palette, scale, clipper }: Pen, look: Look, picture: Picture, matrices: Float64Array) {
    const { scene, frame, selected } = picture;
    const block = scene.blocks.find(({ code }) => code === selected);
    const shape = block && outlineAt(block, frame.age);
    const index = frame.indexOf.get(selected ?? '');
    if (!shape || index === undefined || Number.isNaN(matrices[9 * index])) return;
    if (clipper.load(shape, look.level, matrices, 9 * index) === 'hidden') return;
    ctx.beginPath();
    clipper.stroke(ctx, look.disc);
    ctx.strokeStyle = palette.ochre;
    ctx.lineWidth = 1.9 * scale;
    ctx.lineJoin = 'round';
    ctx.stroke();
  }

  private paintSelectedPoint(pen: Pen, look: Look, { frame, point, track, off }: Picture): Box[] {
    const m = point && matrixOf(frame, point.block);
    if (!point || !m) return [];
    const v = turn(m, vectorOf(point.lat, point.lon));
    const view = turn(look.view, v);
    if (view[2] <= 0) return [];
    const near = track?.points.reduce((a, b) => (Math.abs(b.age - frame.age) < Math.abs(a.age - frame.age) ? b : a));
    if (near?.ellipse && !off.has('ellipse') && Math.abs(near.age - frame.age) <= 1) {
      ellipse(pen, look, { age: frame.age, v, ellipse: near.ellipse }, true);
    }
    const at = place(look.disc, view);
    paintPoint(pen, at);
    const r = 8 * pen.scale;
    return [{ x: at[0] - r, y: at[1] - r, w: 2 * r, h: 2 * r }];
  }

  private paintBlockNames(pen: Pen, look: Look, picture: Picture, matrices: Float64Array, taken: readonly Box[]): void {
    const { disc } = look;
    const wishes = visible(picture).blocks.flatMap((block) => {
      const shape = outlineAt(block, picture.frame.age);
      const index = picture.frame.indexOf.get(block.code);
      if (!shape || index === undefined || Number.isNaN(matrices[9 * index])) return [];
      const extent = extentOf(shape, matrices, 9 * index, disc);
      if (!extent || extent.right - extent.left < 12 * pen.scale) return [];
      const name = picture.shortNames && block.code !== picture.selected ? block.short : block.name;
      return [{ key: block.code, name, extent, selected: block.code === picture.selected }];
    });
    const edge = (RING + 2) * pen.scale;
    const bounds = { x: edge, y: edge, w: look.width - 2 * edge, h: look.height - 2 * edge };
    paintNames(pen, wishes, taken, bounds, this.memory);
  }
}

/** The scene without the blocks whose evidence is switched off. */
function visible({ scene, off }: Picture): Scene {
  return off.size === 0 ? scene : { ...scene, blocks: scene.blocks.filter(({ evidence }) => !off.has(evidence)) };
}

/** Blocks to draw, the selected one last, and each one's place in the model. */
function drawnBlocks(picture: Picture): { blocks: DrawnBlock[]; order: number[] } {
  const blocks: DrawnBlock[] = [];
  const order: number[] = [];
  const { selected, frame } = picture;
  const sorted = [...visible(picture).blocks].sort((a, b) => Number(a.code === selected) - Number(b.code === selected));
  for (const { code, evidence, outlines } of sorted) {
    const shape = outlines.find(({ older_ma, younger_ma }) => holdsAt(older_ma, younger_ma, frame.age))?.shape;
    const index = frame.indexOf.get(code);
    if (!shape || index === undefined) continue;
    blocks.push({ code, evidence, shape });
    order.push(index);
  }
  return { blocks, order };
}

function drawnLines(picture: Picture): DrawnLines[] {
  const { lines } = picture.scene;
  const shown = new Set(visible(picture).blocks.map(({ code }) => code));
  return lines
    .filter(({ kind, block, appears_ma, disappears_ma }) => {
      return kind === 'layer' && shown.has(block) && holdsAt(appears_ma, disappears_ma, picture.frame.age);
    })
    .map(({ shape, block }) => ({ shape, carrier: picture.frame.indexOf.get(block) ?? -1 }));
}

function pick(matrices: Float64Array, order: readonly number[]): Float64Array {
  const out = new Float64Array(9 * order.length);
  order.forEach((index, i) => out.set(matrices.subarray(9 * index, 9 * index + 9), 9 * i));
  return out;
}

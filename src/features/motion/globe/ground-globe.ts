/** The orthographic globe. */
import type { Clipper, Disc } from './clip';
import type { Ground, GroundOptions } from './ground';
import { multiply, turn, turnBack, viewMatrix, type Mat } from './matrix';
import { paintDisc, paintGraticule, paintLimb, paintLimbLabels, meridianFigures } from './paint-sphere';
import { place, viewOf } from './pen';
import { levelFor } from './shape';

export interface Look {
  readonly disc: Disc;
  /** Frame coordinates to view coordinates. */
  readonly view: Mat;
  readonly width: number;
  readonly height: number;
}

/** Room around the limb for its labels, CSS pixels. */
const MARGIN = 24;
/** The same on a small canvas, where labels may be cut. */
const SMALL = { side: 320, margin: 13 } as const;
/** Points nearer to the limb than this (cosine of the angle to the viewer) are not marked. */
const EDGE = 0.02;
/** Error of the drawn level of detail, device pixels. */
const COARSE = 0.9;
const FINE = 0.3;

/** Radius of the whole globe on a canvas, CSS pixels, with room for its labels. */
export function baseRadius(width: number, height: number): number {
  const side = Math.min(width, height);
  return Math.max(40, side / 2 - (side < SMALL.side ? SMALL.margin : MARGIN));
}

export function discOf({ zoom, width, height, scale, fit }: GroundOptions): Disc {
  const base = fit ? (fit * Math.min(width, height)) / 2 : baseRadius(width, height);
  return { cx: (width / 2) * scale, cy: (height / 2) * scale, radius: base * zoom * scale };
}

export function globeGround(options: GroundOptions, clipper: Clipper): Ground {
  const disc = discOf(options);
  const view = viewMatrix(options.centre);
  const [width, height] = [options.width * options.scale, options.height * options.scale];
  const level = levelFor(disc.radius, options.moving ? COARSE : FINE);
  const turned = new Float64Array(9);
  const look: Look = { disc, view, width, height };
  return {
    width,
    height,
    radius: disc.radius,
    at(v) {
      const seen = turn(view, v);
      return seen[2] > EDGE ? place(disc, seen) : null;
    },
    under(xy) {
      const { v, onGlobe } = viewOf(disc, xy);
      return onGlobe ? turnBack(view, v) : null;
    },
    load(shape, pose, at = 0) {
      multiply(view, pose, turned, at);
      return clipper.load(shape, level, turned);
    },
    fill: (sink) => clipper.fill(sink, disc),
    edges: (sink, closed) => clipper.stroke(sink, disc, closed),
    paintUnder(pen, graticule) {
      paintDisc(pen, look);
      paintGraticule(pen, look, graticule);
    },
    paintOver(pen, graticule) {
      paintLimb(pen, look);
      if (graticule) paintLimbLabels(pen, look);
    },
    holds: (x, y) => Math.hypot(x - disc.cx, y - disc.cy) <= disc.radius,
    figures: (scale) => meridianFigures(look, scale),
  };
}

/** What blocks and marks are drawn on: the orthographic globe or a flat map. Coordinates are device pixels. */
import type { PathSink, Visibility } from './clip';
import type { Vec } from './matrix';
import type { Pen, XY } from './pen';
import type { Shape } from './shape';

export interface Ground {
  readonly width: number;
  readonly height: number;
  /** Device pixels to a radian at the centre. */
  readonly radius: number;
  /** Where a unit vector of the held-still frame falls; null where it isn't seen. */
  at(v: Vec): XY | null;
  /** The frame vector under a point of the canvas; null off the globe. */
  under(xy: XY): Vec | null;
  /** Makes a shape ready by its pose (row-major at an offset); the next two calls draw it. */
  load(shape: Shape, pose: ArrayLike<number>, at?: number): Visibility;
  fill(sink: PathSink): void;
  edges(sink: PathSink, closed: boolean): void;
  paintUnder(pen: Pen, graticule: boolean): void;
  /** Limb or frame, with labels where the graticule is on. */
  paintOver(pen: Pen, graticule: boolean): void;
  /** Whether a point of the canvas belongs to the picture. */
  holds(x: number, y: number): boolean;
  /** Figures of the graticule, to be drawn where nothing else stands. */
  figures(scale: number): Figure[];
}

export interface Figure {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly align: 'center' | 'right';
}

export interface GroundOptions {
  readonly centre: { readonly lat: number; readonly lon: number; readonly roll: number };
  readonly zoom: number;
  /** CSS pixels. */
  readonly width: number;
  readonly height: number;
  readonly scale: number;
  /** Coarser while something moves. */
  readonly moving: boolean;
  /** Share of half the smaller side that the radius takes at zoom 1; left out: all but room for the limb's labels. */
  readonly fit?: number | undefined;
}

/** The point whose path, latitude and speed are shown: the chosen one, or the block's own. */
import { placeOf, unit, type Vec } from '../globe/matrix';
import { vertex, type Shape } from '../globe/shape';
import { inText } from '../names';
import type { Point } from '../store/state';
import { findSceneBlock, type Scene, type SceneBlock } from './scene';

export interface NamedPoint extends Point {
  readonly block: string;
  /** "Gannet beds", or null for a place without a name. */
  readonly name: string | null;
  /** As the subject of a sentence: "the Gannet beds", "this point of Sable terrane". */
  readonly subject: string;
  readonly plural: boolean;
}

/**
 * A block's own point: its first named rock, else the place of its first direction, else the middle of its outline.
 * null for a frame or a block without outline.
 */
export function ownPoint(scene: Scene, block: SceneBlock): NamedPoint | null {
  const rock = scene.points.find((point) => point.block === block.code && point.kind === 'rock');
  if (rock) return named(rock.lat, rock.lon, block, rock.name || null);
  const site = scene.directions.find((direction) => direction.block === block.code);
  if (site) return named(site.lat, site.lon, block, site.site);
  const middle = middleOf(block);
  return (
    middle && {
      ...middle,
      block: block.code,
      name: null,
      subject: `the middle of ${inText(block)}`,
      plural: false,
    }
  );
}

/** The point a selection stands for. */
export function selectedPoint(scene: Scene, code: string | null, point: Point | null): NamedPoint | null {
  const block = findSceneBlock(scene, code);
  if (!block) return null;
  if (!point) return ownPoint(scene, block);
  const known = scene.points.find(
    ({ block: on, lat, lon, kind }) =>
      on === code && kind === 'rock' && near(lat, point.lat) && near(lon, point.lon),
  );
  return named(point.lat, point.lon, block, known?.name ?? null);
}

const near = (a: number, b: number): boolean => Math.abs(a - b) < 0.05;

function named(lat: number, lon: number, block: SceneBlock, name: string | null): NamedPoint {
  const plural = name !== null && /s$/.test(name);
  const subject = name === null ? `this point of ${inText(block)}` : plural ? `the ${name}` : name;
  return { lat, lon, block: block.code, name, subject, plural };
}

const middles = new WeakMap<Shape, Point | null>();

function middleOf(block: SceneBlock): Point | null {
  const shape = block.outlines[0]?.shape;
  if (!shape) return null;
  let known = middles.get(shape);
  if (known === undefined) middles.set(shape, (known = meanPlace(shape)));
  return known;
}

/** Mean direction of an outline's vertices: a handle, not its centroid by area. */
function meanPlace(shape: Shape): Point | null {
  const parts = shape.levels[0] ?? [];
  const sum: Vec = [0, 0, 0];
  for (const part of parts) {
    for (let i = 0; i < part.length / 3; i++) {
      const v = vertex(part, i);
      sum[0] += v[0];
      sum[1] += v[1];
      sum[2] += v[2];
    }
  }
  if (Math.hypot(...sum) < 1e-9) return null;
  const { lat, lon } = placeOf(unit(sum));
  return { lat: Math.round(lat * 10) / 10, lon: Math.round(lon * 10) / 10 };
}

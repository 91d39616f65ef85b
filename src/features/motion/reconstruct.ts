import type { FeatureCollection, Geometry, Position } from 'geojson';
import { checkGeometry, isFieldError } from '~/features/ledger/geometry-rules';
import { refuse } from '~/features/ledger/parse';
import { KernelError } from '~/kernel/errors';
import { poseAt } from '~/kernel/rotations/circuit';
import { requireBlock } from '~/kernel/rotations/model-index';
import { rotate, unrotate } from '~/kernel/rotations/quaternion';
import type { Pose, Quaternion, Status, Vector3 } from '~/kernel/rotations/types';
import { toLatLon, toVector } from '~/kernel/sphere/vector';
import type { PlaceFeature, Places } from './contract';
import { holds, outlinesOf, type LoadedOutline } from './outlines';
import type { Motion } from './queries';

export type Direction = 'past' | 'present';
type Turn = (q: Quaternion, v: Vector3) => Vector3;

/** Places without a block are looked for in every outline: more than this are for a batch of samples. */
const MOST_LOCATED = 5_000;

/**
 * Carries places from the present to an age, or back. A feature goes with the block that its properties name, or
 * with the one block whose outline holds all its positions. Positions are carried one by one: edges stay great
 * circles, nothing is cut or added, and past and present undo each other. Properties get `block` and `status`;
 * what has no place gets a null geometry.
 * @throws KernelError as `poseAt`, `OutOfRange` for too many places without a block; Problem `InvalidRows`
 */
export async function reconstruct(
  motion: Motion,
  places: Places,
  age_ma: number,
  direction: Direction,
): Promise<FeatureCollection<Geometry | null>> {
  const features = asFeatures(places);
  refuse(
    features.flatMap(({ geometry }, i) => {
      const checked = checkGeometry(geometry);
      return isFieldError(checked) ? { ...checked, path: `features.${i}.geometry.${checked.path}` } : [];
    }),
  );
  const poseOf = posesOf(motion, age_ma);
  const finder = await finderOf(motion, age_ma, direction, poseOf);
  const turn = direction === 'past' ? rotate : unrotate;
  const asked = { age_ma, relative_to: motion.relative_to, version: motion.state.version };
  return {
    type: 'FeatureCollection',
    features: features.map(({ properties, geometry }) => {
      const found = namedBlock(motion, properties) ?? finder(vectorsOf(geometry as Geometry));
      const pose = 'block' in found ? poseOf(found.block) : null;
      const status = pose?.status ?? (found as Unplaced).status;
      return {
        type: 'Feature',
        properties: { ...properties, block: 'block' in found ? found.block : null, status, ...asked },
        geometry: pose?.status === 'placed' ? turned(geometry as Geometry, turn, pose.quaternion) : null,
      };
    }),
  };
}

type Unplaced = { readonly status: Status };
type Found = { readonly block: string } | Unplaced;

function asFeatures(places: Places): PlaceFeature[] {
  if (places.type === 'FeatureCollection') return places.features;
  return places.type === 'Feature' ? [places] : [{ type: 'Feature', properties: null, geometry: places }];
}

function posesOf({ model, relative_to }: Motion, age_ma: number): (block: string) => Pose {
  const poses = new Map<string, Pose>();
  return (block) => {
    const pose = poses.get(block) ?? poseAt(model, block, age_ma, relative_to);
    poses.set(block, pose);
    return pose;
  };
}

function namedBlock({ model }: Motion, properties: PlaceFeature['properties']): Found | null {
  const name = properties?.['block'];
  return typeof name === 'string' && name !== ''
    ? { block: requireBlock(model, name, 'properties.block').code }
    : null;
}

/** Finds the block that carries all of some positions at an age, given at present or as they lie at that age. */
async function finderOf(
  { state, relative_to }: Motion,
  age_ma: number,
  direction: Direction,
  poseOf: (block: string) => Pose,
) {
  poseOf(relative_to);
  const outlines = (await outlinesOf(state)).filter(({ holdsAt }) => holdsAt(age_ma));
  let located = 0;
  return (positions: readonly Vector3[]): Found => {
    located += positions.length;
    if (located > MOST_LOCATED) {
      const problem = `more than ${MOST_LOCATED} positions without properties.block`;
      throw new KernelError('OutOfRange', { quantity: 'features', value: located, problem });
    }
    const blocks = new Set(positions.map((position) => blockAt(position, outlines, direction, poseOf)));
    const [only] = blocks;
    if (blocks.size !== 1 || only === AMBIGUOUS) return { status: 'ambiguous block' };
    return only ? { block: only } : { status: 'no block here' };
  };
}

const AMBIGUOUS = '?';

function blockAt(
  position: Vector3,
  outlines: readonly LoadedOutline[],
  direction: Direction,
  poseOf: (block: string) => Pose,
): string | null {
  const found = new Set<string>();
  for (const outline of outlines) {
    const pose = poseOf(outline.block);
    if (pose.status !== 'placed' && direction === 'present') continue;
    const present = direction === 'past' || !pose.quaternion ? position : unrotate(pose.quaternion, position);
    if (holds(outline, present)) found.add(outline.block);
  }
  const [first] = found;
  return found.size > 1 ? AMBIGUOUS : (first ?? null);
}

/** All positions of a geometry, in order. */
function vectorsOf(geometry: Geometry): Vector3[] {
  const vectors: Vector3[] = [];
  mapPositions(geometry, (position) => {
    vectors.push(toVector(position[1]!, position[0]!));
    return position;
  });
  return vectors;
}

const turned = (geometry: Geometry, turn: Turn, q: Quaternion): Geometry =>
  mapPositions(geometry, ([lon, lat]) => {
    const place = toLatLon(turn(q, toVector(lat!, lon!)));
    return [place.lon, place.lat];
  });

type Nested = Position | Nested[];

function mapPositions(geometry: Geometry, change: (position: Position) => Position): Geometry {
  const walk = (value: Nested): Nested =>
    typeof value[0] === 'number' ? change(value as Position) : (value as Nested[]).map(walk);
  const { type, coordinates } = geometry as Exclude<Geometry, { type: 'GeometryCollection' }>;
  return { type, coordinates: walk(coordinates) } as Geometry;
}

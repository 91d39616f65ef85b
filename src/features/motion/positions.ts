import type { Feature, FeatureCollection, MultiPolygon, Position } from 'geojson';
import { requireAge } from '~/kernel/errors';
import { requireBlock } from '~/kernel/rotations/model-index';
import { rotate } from '~/kernel/rotations/quaternion';
import type { Quaternion, Vector3 } from '~/kernel/rotations/types';
import { woundRing } from '~/kernel/sphere/area';
import { writeRing } from '~/kernel/sphere/ring';
import { outlinesOf, type LoadedOutline } from './outlines';
import { flatten } from './plate-carree';
import type { Motion } from './queries';
import { poseAt } from './scene/tolerant';

/**
 * The outlines that hold at an age, where they lay then, as GeoJSON (RFC 7946); blocks that a loop cuts off are left out.
 * @throws KernelError `UnknownBlock` of the frame, `NegativeAge`
 */
export async function positionsOf(
  { state, model, relative_to }: Motion,
  age_ma: number,
): Promise<FeatureCollection> {
  requireBlock(model, relative_to, 'relative_to');
  requireAge('age_ma', age_ma);
  const outlines = (await outlinesOf(state)).filter(({ holdsAt }) => holdsAt(age_ma));
  const features: Feature[] = [];
  for (const { code, name, kind, evidence } of state.blocks) {
    const pose = poseAt(model, code, age_ma, relative_to);
    if (pose.status !== 'placed') continue;
    for (const outline of outlines.filter(({ block }) => block === code)) {
      const geometry = flatten(carried(outline, pose.quaternion));
      const properties = { block: code, name, kind, evidence, age_ma, relative_to, version: state.version };
      if (geometry) features.push({ type: 'Feature', properties, geometry });
    }
  }
  return { type: 'FeatureCollection', features };
}

function carried({ parts, inside }: LoadedOutline, q: Quaternion): MultiPolygon {
  const coordinates = parts.map(({ rings }) =>
    rings.map((ring, i): Position[] => {
      const wound = woundRing(ring, i === 0 && inside === 'smaller' ? 'clockwise' : 'anticlockwise');
      return writeRing(wound.map((v: Vector3) => rotate(q, v)));
    }),
  );
  return { type: 'MultiPolygon', coordinates };
}

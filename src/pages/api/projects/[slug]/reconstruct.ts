import { places } from '~/features/motion/contract';
import { openMotion, reconstructQuery } from '~/features/motion/queries';
import { reconstruct } from '~/features/motion/reconstruct';
import { json, projectRoute } from '~/server/route';

const LIMIT_BYTES = 8 * 1024 * 1024;

export const POST = projectRoute(
  {
    action: 'compute',
    summary: 'Carry places to an age, or back to the present: GeoJSON in, GeoJSON out',
    query: reconstructQuery,
    body: places,
    limitBytes: LIMIT_BYTES,
    streams: 'application/geo+json',
  },
  async ({ access, query, body }) => {
    const motion = await openMotion(access, query);
    const carried = await reconstruct(motion, body, query.age_ma, query.direction);
    return json(carried, 200, { 'Content-Type': 'application/geo+json' });
  },
);

import { stateText } from '~/features/ledger/state-answer';
import { positionsOf } from '~/features/motion/positions';
import { openMotion, positionsQuery } from '~/features/motion/queries';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'The outlines where they lay at an age',
    query: positionsQuery,
    streams: 'application/geo+json',
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    const positions = await positionsOf(motion, query.age_ma);
    return stateText(
      request,
      access,
      motion.state,
      JSON.stringify(positions),
      'application/geo+json',
      motion.framed,
    );
  },
);

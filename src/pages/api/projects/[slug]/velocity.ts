import { stateAnswer } from '~/features/ledger/state-answer';
import { velocityAnswer } from '~/features/motion/contract';
import { openMotion, velocityQuery } from '~/features/motion/queries';
import { velocityOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'The velocity of a point of a block at an age',
    query: velocityQuery,
    answer: velocityAnswer,
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    return stateAnswer(request, access, motion.state, velocityOf(motion, query), motion.framed);
  },
);

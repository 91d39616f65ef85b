import { stateAnswer } from '~/features/ledger/state-answer';
import { quaternionsAnswer } from '~/features/motion/contract';
import { openMotion, quaternionsQuery } from '~/features/motion/queries';
import { quaternionsOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'Every block’s quaternion at one age',
    query: quaternionsQuery,
    answer: quaternionsAnswer,
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    return stateAnswer(request, access, motion.state, quaternionsOf(motion, query), motion.framed);
  },
);

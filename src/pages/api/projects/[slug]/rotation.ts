import { stateAnswer } from '~/features/ledger/state-answer';
import { rotationAnswer } from '~/features/motion/contract';
import { openMotion, rotationQuery } from '~/features/motion/queries';
import { rotationOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'A finite rotation with its uncertainty and the rows that made it',
    query: rotationQuery,
    answer: rotationAnswer,
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    return stateAnswer(request, access, motion.state, rotationOf(motion, query), motion.framed);
  },
);

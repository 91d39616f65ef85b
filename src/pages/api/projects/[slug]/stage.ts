import { stateAnswer } from '~/features/ledger/state-answer';
import { stageAnswer } from '~/features/motion/contract';
import { openMotion, stageQuery } from '~/features/motion/queries';
import { stageOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  { action: 'compute', summary: 'A stage rotation, forward in time', query: stageQuery, answer: stageAnswer },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    return stateAnswer(request, access, motion.state, stageOf(motion, query), motion.framed);
  },
);

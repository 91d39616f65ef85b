import { flowLineAnswer } from '~/features/kinematics/contract';
import { flowLineCsv } from '~/features/kinematics/files';
import { flowLineQuery } from '~/features/kinematics/queries';
import { flowLineOf } from '~/features/kinematics/server';
import { stateAnswer, stateText } from '~/features/ledger/state-answer';
import { openMotion } from '~/features/motion/queries';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'The flow line from a ridge point on both flanks',
    query: flowLineQuery,
    answer: flowLineAnswer,
    streams: 'text/csv',
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, { version: query.version, relative_to: query.block_a });
    const answer = flowLineOf(motion, query);
    if (query.format === 'json') return stateAnswer(request, access, motion.state, answer);
    const type = 'text/csv; charset=utf-8; header=present';
    const response = stateText(request, access, motion.state, flowLineCsv(answer), type);
    response.headers.set(
      'Content-Disposition',
      `attachment; filename="flow-line-${answer.block_a}-${answer.block_b}.csv"`,
    );
    return response;
  },
);

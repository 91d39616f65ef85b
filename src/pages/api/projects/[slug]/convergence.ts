import { convergenceAnswer } from '~/features/kinematics/contract';
import { convergenceCsv } from '~/features/kinematics/files';
import { convergenceQuery } from '~/features/kinematics/queries';
import { convergenceOf } from '~/features/kinematics/server';
import { stateAnswer, stateText } from '~/features/ledger/state-answer';
import { openMotion } from '~/features/motion/queries';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'Relative motion of a block across a margin: closing, slip and obliquity',
    query: convergenceQuery,
    answer: convergenceAnswer,
    streams: 'text/csv',
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    const answer = convergenceOf(motion, query);
    if (query.format === 'json') return stateAnswer(request, access, motion.state, answer, motion.framed);
    const type = 'text/csv; charset=utf-8; header=present';
    const response = stateText(request, access, motion.state, convergenceCsv(answer), type, motion.framed);
    response.headers.set(
      'Content-Disposition',
      `attachment; filename="convergence-${answer.block}-${answer.relative_to}.csv"`,
    );
    return response;
  },
);

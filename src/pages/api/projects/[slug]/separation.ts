import { separationAnswer } from '~/features/kinematics/contract';
import { separationCsv } from '~/features/kinematics/files';
import { separationQuery } from '~/features/kinematics/queries';
import { separationOf } from '~/features/kinematics/server';
import { stateAnswer, stateText } from '~/features/ledger/state-answer';
import { openMotion } from '~/features/motion/queries';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'How far two blocks were apart, how much they overlap, and when they first met',
    query: separationQuery,
    answer: separationAnswer,
    streams: 'text/csv',
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, { version: query.version, relative_to: query.block_a });
    const answer = await separationOf(motion, query, request.signal);
    if (query.format === 'json') return stateAnswer(request, access, motion.state, answer);
    const type = 'text/csv; charset=utf-8; header=present';
    const response = stateText(request, access, motion.state, separationCsv(answer), type);
    response.headers.set(
      'Content-Disposition',
      `attachment; filename="separation-${answer.block_a}-${answer.block_b}.csv"`,
    );
    return response;
  },
);

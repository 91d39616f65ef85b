import { stateAnswer, stateText } from '~/features/ledger/state-answer';
import { driftPath } from '~/features/motion/contract';
import { driftCsv, driftGeojson } from '~/features/motion/drift-files';
import { driftPathQuery, openMotion } from '~/features/motion/queries';
import { driftPathOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'Where a point of a block was, step by step',
    query: driftPathQuery,
    answer: driftPath,
  },
  async ({ access, request, query }) => {
    const motion = await openMotion(access, query);
    const path = driftPathOf(motion, query);
    if (query.format === 'json') return stateAnswer(request, access, motion.state, path, motion.framed);
    const [text, type] =
      query.format === 'csv'
        ? [driftCsv(path), 'text/csv; charset=utf-8; header=present']
        : [JSON.stringify(driftGeojson(path)), 'application/geo+json'];
    const response = stateText(request, access, motion.state, text, type, motion.framed);
    const name = `drift-path-${path.block}.${query.format}`;
    response.headers.set('Content-Disposition', `attachment; filename="${name}"`);
    return response;
  },
);

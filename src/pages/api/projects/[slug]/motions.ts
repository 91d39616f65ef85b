import { z } from 'zod';
import { loadState } from '~/features/ledger/state';
import { stateAnswer } from '~/features/ledger/state-answer';
import { modelOf } from '~/features/motion/model';
import { motionsQuery } from '~/features/motion/queries';
import { motionsOf } from '~/features/motion/server';
import { projectRoute } from '~/server/route';

const answer = z
  .object({
    version: z.union([z.literal('draft'), z.number()]),
    revision: z.number(),
    oldest_ma: z.number(),
    blocks: z.array(z.unknown()),
    problems: z.array(z.unknown()),
  })
  .describe('The compiled model: legs and stages of every link, and what compiling found wrong');

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'The compiled sequences, to evaluate at any age',
    query: motionsQuery,
    answer,
  },
  async ({ access, request, query }) => {
    const state = await loadState(access, query.version);
    return stateAnswer(request, access, state, motionsOf({ state, model: modelOf(state) }));
  },
);

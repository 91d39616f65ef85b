import { z } from 'zod';
import { loadState } from '~/features/ledger/state';
import { stateAnswer, stateText } from '~/features/ledger/state-answer';
import { modelOf } from '~/features/motion/model';
import { motionsQuery } from '~/features/motion/queries';
import { motionsOf } from '~/features/motion/server';
import { encodeModel } from '~/kernel/rotations/model-codec';
import { prefers } from '~/server/accept';
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

const BYTES = 'application/octet-stream';

export const GET = projectRoute(
  {
    action: 'compute',
    summary: 'The compiled sequences, to evaluate at any age',
    query: motionsQuery,
    answer,
    streams: BYTES,
  },
  async ({ access, request, query }) => {
    const state = await loadState(access, query.version);
    const motions = motionsOf({ state, model: modelOf(state) });
    const response = prefers(request, 'application/json', BYTES)
      ? stateText(request, access, state, encodeModel(motions), BYTES)
      : stateAnswer(request, access, state, motions);
    response.headers.append('Vary', 'Accept');
    return response;
  },
);

import { z } from 'zod';
import { slug } from '~/features/ledger/contract';
import { loadState, type State, type VersionName } from '~/features/ledger/state';
import type { Model } from '~/kernel/rotations/types';
import { demand, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { queryLatitude, queryLongitude, queryNumber, queryVersion } from '~/server/queries';
import { modelOf } from './model';
import { openingFrame } from './usual-frame';

const state = { version: queryVersion };
/** Left out, it is what the project holds still, else the frame in which the most blocks have a place. */
const frame = { ...state, relative_to: slug.optional() };
const span = { older_ma: queryNumber, younger_ma: queryNumber.default(0) };

export const motionsQuery = z.object(state);
export const quaternionsQuery = z.object({ ...frame, age_ma: queryNumber });
export const rotationQuery = z.object({ ...frame, block: slug, age_ma: queryNumber });
export const stageQuery = z.object({
  ...frame,
  block: slug,
  ...span,
  in: z.enum(['reference', 'block']).default('reference'),
});
export const positionsQuery = quaternionsQuery;
export const reconstructQuery = quaternionsQuery.extend({
  direction: z.enum(['past', 'present']).default('past'),
});
export const driftPathQuery = z.object({
  ...frame,
  block: slug,
  lat: queryLatitude,
  lon: queryLongitude,
  ...span,
  step_ma: queryNumber.default(5),
  format: z.enum(['json', 'csv', 'geojson']).default('json'),
});
export const velocityQuery = z.object({
  ...frame,
  block: slug,
  lat: queryLatitude,
  lon: queryLongitude,
  age_ma: queryNumber,
  window_myr: queryNumber.default(0),
});

/** A state with its compiled model, and the reference that a question is asked in. */
export interface Motion {
  readonly state: State;
  readonly model: Model;
  readonly relative_to: string;
  /** True where the question named the frame itself, so that the answer depends on the state alone. */
  readonly framed: boolean;
}

/** @throws Problem as `loadState`; `InvalidQuery` where no reference is named and there is no block at all */
export async function openMotion(
  access: Access,
  query: { readonly version?: VersionName | undefined; readonly relative_to?: string | undefined },
): Promise<Motion> {
  demand(access, 'compute');
  const loaded = await loadState(access, query.version);
  const model = modelOf(loaded);
  const relative_to = query.relative_to ?? openingFrame(model, access.project.held_still);
  if (relative_to === null) {
    const problem = 'name the block or frame to hold still';
    throw new Problem('InvalidQuery', {
      detail: `relative_to: ${problem}`,
      errors: [{ path: 'relative_to', read: '', problem }],
    });
  }
  return { state: loaded, model, relative_to, framed: query.relative_to !== undefined };
}

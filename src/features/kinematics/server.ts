import type { z } from 'zod';
import type { Motion } from '~/features/motion/queries';
import { convergencePath, flowLine } from '~/kernel/kinematics';
import { fromRefusal, KernelError } from '~/kernel/errors';
import { requireBlock } from '~/kernel/rotations/model-index';
import { runInWorker } from '~/server/workers';
import type { ConvergenceAnswer, FlowLineAnswer, SeparationAnswer } from './contract';
import { datedOutlines } from './outlines';
import type { convergenceQuery, flowLineQuery, separationQuery } from './queries';
import type { SeparationJob, SeparationResult } from './separation.task';
import separationTask from './separation.task.ts?nodeworker';

/** @throws KernelError as `convergencePath` */
export function convergenceOf(
  { state, model, relative_to }: Motion,
  query: z.output<typeof convergenceQuery>,
): ConvergenceAnswer {
  const {
    block,
    coordinates_of = relative_to,
    lat,
    lon,
    margin_azimuth,
    older_ma,
    younger_ma,
    step_ma,
  } = query;
  const points = convergencePath(model, {
    block,
    relative_to,
    coordinates_of,
    lat,
    lon,
    margin_azimuth_deg: margin_azimuth,
    older_ma,
    younger_ma,
    step_ma,
  });
  return { block, relative_to, coordinates_of, lat, lon, margin_azimuth, version: state.version, points };
}

/** @throws KernelError as `flowLine` */
export function flowLineOf(
  { state, model }: Pick<Motion, 'state' | 'model'>,
  query: z.output<typeof flowLineQuery>,
): FlowLineAnswer {
  const {
    block_a,
    block_b,
    coordinates_of = block_a,
    lat,
    lon,
    fraction,
    older_ma,
    younger_ma,
    step_ma,
  } = query;
  const asked = { block_a, block_b, coordinates_of, lat, lon, fraction };
  const points = flowLine(model, { ...asked, older_ma, younger_ma, step_ma });
  return { ...asked, version: state.version, points };
}

/** The most ages of one answer: each is a search over both outlines. */
const MOST_AGES = 1_000;

/** @throws KernelError as `separationPath` and `firstContact`, `OutOfRange` for too many steps */
export async function separationOf(
  motion: Motion,
  query: z.output<typeof separationQuery>,
  signal: AbortSignal,
): Promise<SeparationAnswer> {
  const { state, model } = motion;
  const { block_a, block_b, coordinates_of = block_a, older_ma, younger_ma, step_ma, tolerance_km } = query;
  if ((older_ma - younger_ma) / step_ma > MOST_AGES)
    throw new KernelError('OutOfRange', {
      quantity: 'step_ma',
      value: step_ma,
      problem: `more than ${MOST_AGES} steps`,
    });
  requireBlock(model, block_a, 'block_a');
  requireBlock(model, block_b, 'block_b');
  requireBlock(model, coordinates_of, 'coordinates_of');
  const [outlines_a, outlines_b] = await Promise.all([
    datedOutlines(motion, block_a),
    datedOutlines(motion, block_b),
  ]);
  const request = {
    block_a,
    block_b,
    outlines_a,
    outlines_b,
    coordinates_of,
    older_ma,
    younger_ma,
    step_ma,
    tolerance_km,
  };
  const result = await runInWorker<SeparationJob, SeparationResult>(
    separationTask,
    { model, request },
    signal,
  );
  if ('refused' in result) throw fromRefusal(result.refused);
  const { points, contact } = result;
  return {
    block_a,
    block_b,
    coordinates_of,
    tolerance_km,
    version: state.version,
    points,
    first_contact_ma: contact.status === 'contact' ? contact.age_ma : null,
    first_contact: contact,
  };
}

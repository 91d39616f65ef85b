import type { z } from 'zod';
import type { Motion } from '~/features/motion/queries';
import { convergencePath } from '~/kernel/kinematics';
import type { ConvergenceAnswer } from './contract';
import type { convergenceQuery } from './queries';

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

/**
 * The kernel's answers for a draft under edit, which may hold a loop or a code that is gone: where the kernel refuses,
 * nothing is connected. Everything else passes through.
 */
import * as kernel from '../../../kernel/rotations';
import { KernelError } from '../../../kernel/errors';
import type { AngularVelocity, DriftPoint, HandOver } from '../../../kernel/rotations';
import type { Model, Pose } from '../../../kernel/rotations/types';

function orElse<T>(work: () => T, refused: T): T {
  try {
    return work();
  } catch (error) {
    if (error instanceof KernelError) return refused;
    throw error;
  }
}

export const poseAt = (model: Model, block: string, age: number, frame: string): Pose =>
  orElse<Pose>(() => kernel.poseAt(model, block, age, frame), {
    status: 'not connected',
    quaternion: null,
    at: block,
    links: [],
  });

export const angularVelocity = (model: Model, block: string, age: number, frame: string): AngularVelocity =>
  orElse<AngularVelocity>(() => kernel.angularVelocity(model, block, age, frame), {
    status: 'not connected',
    at: block,
  });

/** Where a loop cuts the circuit the path has points at the ages outside the loop only. */
export function driftPath(model: Model, request: kernel.DriftRequest): DriftPoint[] {
  const whole = orElse(() => kernel.driftPath(model, request), null);
  if (whole) return whole;
  const { block, older_ma, younger_ma, step_ma, relative_to } = request;
  const steps = Math.min(kernel.MOST_AGES, Math.max(0, Math.floor((older_ma - younger_ma) / step_ma)) || 0);
  const ages = new Set(circuitRowAges(model, block, older_ma, younger_ma, relative_to));
  for (let i = 0; i <= steps; i++) ages.add(younger_ma + i * step_ma);
  return [...ages]
    .sort((a, b) => a - b)
    .flatMap((age) =>
      orElse(() => kernel.driftPath(model, { ...request, older_ma: age, younger_ma: age }), []),
    );
}

/** Where a loop cuts the circuit, the ages of every row: more of them than the circuit has, and none missing. */
export const circuitRowAges = (
  model: Model,
  block: string,
  older: number,
  younger: number,
  frame: string,
): number[] =>
  orElse(() => kernel.circuitRowAges(model, block, older, younger, frame), null) ??
  [...new Set([younger, older, ...model.blocks.flatMap(rowAges)])]
    .filter((age) => age >= younger && age <= older)
    .sort((a, b) => a - b);

const rowAges = ({ legs }: Model['blocks'][number]): number[] =>
  legs.flatMap(({ rows }) => rows.map(({ age_ma }) => age_ma));

export const handOverJumps = (model: Model): HandOver[] => orElse(() => kernel.handOverJumps(model), []);

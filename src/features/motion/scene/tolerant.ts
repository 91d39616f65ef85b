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

/** A path that a loop cuts has no points. */
export const driftPath = (model: Model, request: kernel.DriftRequest): DriftPoint[] =>
  orElse(() => kernel.driftPath(model, request), []);

export const circuitRowAges = (
  model: Model,
  block: string,
  older: number,
  younger: number,
  frame: string,
): number[] => orElse(() => kernel.circuitRowAges(model, block, older, younger, frame), []);

export const handOverJumps = (model: Model): HandOver[] => orElse(() => kernel.handOverJumps(model), []);

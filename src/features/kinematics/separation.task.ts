/** Worker task: how far two blocks were apart, age by age, and when they first met. */
import { KernelError, refusalOf, type KernelRefusal } from '../../kernel/errors';
import {
  firstContact,
  separationPath,
  type FirstContact,
  type SeparationPoint,
  type SeparationRequest,
} from '../../kernel/kinematics';
import type { Model } from '../../kernel/rotations/types';

export interface SeparationJob {
  readonly model: Model;
  readonly request: SeparationRequest & { readonly tolerance_km: number };
}

export type SeparationResult =
  | { readonly points: SeparationPoint[]; readonly contact: FirstContact }
  /** A refusal of the kernel: its class does not travel between threads, what it says does. */
  | { readonly refused: KernelRefusal };

export default function separate({ model, request }: SeparationJob): SeparationResult {
  try {
    return { points: separationPath(model, request), contact: firstContact(model, request) };
  } catch (error) {
    if (error instanceof KernelError) return { refused: refusalOf(error) };
    throw error;
  }
}

import type { Model, ModelProblem } from '~/kernel/rotations/types';
import type { FieldError } from '~/server/problem';

const span = ({ older_ma, younger_ma }: { older_ma: number; younger_ma: number }) =>
  `${younger_ma}–${older_ma} Ma`;

/** A circuit that bites its own tail, or ends in a block that is not there, has no meaning to freeze. */
export function blockersOf({ problems }: Model): FieldError[] {
  return problems.flatMap((problem) => blocker(problem) ?? []);
}

function blocker(problem: ModelProblem): FieldError | null {
  switch (problem.name) {
    case 'Cycle':
      return {
        path: 'rotations',
        read: [...problem.loop, problem.loop[0]].join(' → '),
        problem: `the circuit runs in a loop at ${span(problem)}`,
        hint: 'Change the reference of one block of the loop at these ages.',
      };
    case 'MissingReference':
      return {
        path: 'rotations',
        read: problem.relative_to,
        problem: `${problem.block} refers to it at ${span(problem)}, and there is no such block`,
        hint: 'Add the block or frame, or change the reference.',
      };
    case 'DuplicateBlock':
    case 'UnknownBlock':
    case 'DuplicateRow':
      return {
        path: 'rotations',
        read: problem.block,
        problem: `${problem.name}: the rows contradict each other`,
      };
    case 'ParallelSequences':
      return {
        path: 'rotations',
        read: problem.references.join(', '),
        problem: `${problem.block} has rows in these references side by side at ${span(problem)}`,
        hint: 'Keep one reference between two hand-overs.',
      };
    case 'InvalidRow':
      return {
        path: 'rotations',
        read: problem.read,
        problem: `${problem.quantity} of ${problem.block} is not usable`,
      };
    case 'LegGap':
    case 'NonIdentityAtPresent':
    case 'NearHalfTurnStage':
      return null;
  }
}

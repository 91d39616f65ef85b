import type { ProblemName } from './problems';

interface ConstraintProblem {
  readonly name: ProblemName;
  readonly problem: string;
  readonly hint: string;
}

const unusable = (problem: string, hint: string): ConstraintProblem => ({
  name: 'InvalidRows',
  problem,
  hint,
});
const conflict = (problem: string, hint: string): ConstraintProblem => ({ name: 'Conflict', problem, hint });
const unknownBlock = unusable('the block is not in the project', 'Add the block first, or mend its code.');
const badLife = unusable(
  'younger age not below the older one',
  'Give the older age first, or leave one of them blank.',
);
const badAge = unusable('age outside 0–4600 Ma', 'Ages are in Ma, 0 at the present.');
const badLatitude = unusable(
  'latitude outside ±90°',
  'Moved decimal point, or latitude and longitude swapped?',
);
const badLongitude = unusable('longitude outside ±360°', 'Give degrees east.');

/** What each constraint of the database means to whoever ran into it. */
const BY_CONSTRAINT: Readonly<Record<string, ConstraintProblem>> = {
  user_email_unique: {
    name: 'EmailTaken',
    problem: 'this e-mail already has an account',
    hint: 'Sign in, or set a new password.',
  },
  project_slug_unique: {
    name: 'SlugTaken',
    problem: 'another project has this address',
    hint: 'Choose another.',
  },
  membership_project_id_user_id_pk: {
    name: 'AlreadyMember',
    problem: 'already in the team',
    hint: 'Change the role instead.',
  },
  version_project_id_project_id_fk: {
    name: 'ProjectHasVersions',
    problem: 'released versions are kept',
    hint: 'Make the project private instead.',
  },
  version_immutable: conflict('a released version never changes', 'Release a new version.'),
  geometry_immutable: conflict('a stored geometry never changes', 'Store the new geometry beside it.'),
  ...Object.fromEntries(
    ['block', 'block_outline', 'rotation', 'feature', 'direction', 'source'].map((table) => [
      `${table}_pkey`,
      unusable('the id of a row that is there already', 'Leave the id out, or make a new UUID.'),
    ]),
  ),
  block_code_unique: conflict('the project has a block of this code', 'Codes are unique: choose another.'),
  source_cite_unique: conflict('the project has a source of this name', 'Add a letter, as in 2021a.'),
  rotation_row_unique: conflict(
    'one row for each block, reference and age',
    'Change the row that is there, or give another age.',
  ),
  rotation_other: unusable('a block cannot be its own reference', 'Name another block or a frame.'),
  block_outline_block: unknownBlock,
  rotation_block: unknownBlock,
  feature_block: unknownBlock,
  direction_block: unknownBlock,
  pole_block: unknownBlock,
  date_record_block: unknownBlock,
  block_life: badLife,
  block_outline_life: badLife,
  feature_life: badLife,
  direction_age_range: unusable('youngest age above the oldest', 'Swap them.'),
  block_appears: badAge,
  block_disappears: badAge,
  block_outline_older: badAge,
  block_outline_younger: badAge,
  rotation_age: badAge,
  feature_age: badAge,
  direction_age: badAge,
  rotation_pole_lat: badLatitude,
  direction_lat: badLatitude,
  rotation_pole_lon: badLongitude,
  direction_lon: badLongitude,
  rotation_covariance_whole: unusable(
    'a covariance has six entries or none',
    'Fill all six cells, or clear all six.',
  ),
  rotation_covariance_diagonal: unusable('a variance below zero', 'Check the diagonal of the matrix.'),
};

interface DriverError {
  readonly code?: unknown;
  readonly constraint?: unknown;
  readonly detail?: unknown;
}

/** The error of the driver beneath whatever wraps it: `23…` is PostgreSQL's class of broken constraints. */
export function constraintOf(error: unknown): { constraint: string; values: readonly string[] } | null {
  for (let at: unknown = error, depth = 0; at instanceof Error && depth < 4; at = at.cause, depth++) {
    const { code, constraint, detail } = at as DriverError;
    if (typeof code !== 'string' || !code.startsWith('23') || typeof constraint !== 'string') continue;
    const key = typeof detail === 'string' ? /\)=\((.*)\)/.exec(detail)?.[1] : undefined;
    return { constraint, values: key?.split(', ') ?? [] };
  }
  return null;
}

/** A broken constraint in words; null for an error of another kind, or of a constraint that no request should reach. */
export function constraintProblem(error: unknown, pathOf?: (read: string) => string | undefined) {
  const found = constraintOf(error);
  const known = found && BY_CONSTRAINT[found.constraint];
  if (!found || !known) return null;
  const { name, problem, hint } = known;
  const read = found.values.slice(1).join(', ');
  const path = pathOf?.(read);
  return {
    name,
    constraint: found.constraint,
    facts: {
      detail: `${problem}. ${hint}`,
      errors: [{ ...(path === undefined ? {} : { path }), read, problem, hint }],
    },
  };
}

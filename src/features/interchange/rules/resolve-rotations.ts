/** Sets the rows of a file against the draft: unknown blocks and frames, rows already there, loops in the circuit. */
import { compileModel } from '../../../kernel/rotations';
import type { BlockInput } from '../../../kernel/rotations/types';
import type { Rotation, RotationFields } from '../../ledger/contract';
import type { RejectedRow } from '../contract';
import type { Asking } from './ask';
import { withoutParallel } from './parallel';
import { rotationKey, type Candidate } from './rotations';

export interface DraftForRotations {
  readonly blocks: readonly BlockInput[];
  readonly rotations: readonly Rotation[];
}

export interface ResolvedRotations {
  readonly create: readonly Candidate<RotationFields>[];
  readonly replace: readonly (Candidate<RotationFields> & { readonly id: string })[];
  readonly unchanged: readonly Candidate<RotationFields>[];
  readonly kept: readonly Candidate<RotationFields>[];
  readonly rejected: readonly RejectedRow[];
  /** Rows of the draft that the answers say to take out. */
  readonly remove: readonly Rotation[];
  /** Codes that the answers say to add: frames for missing references, blocks without outline otherwise. */
  readonly addFrames: readonly string[];
  readonly addBlocks: readonly string[];
}

const ADD_FRAME = 'add as frames';
const ADD_BLOCK = 'add without outline';
const REJECT = 'reject these rows';

export function resolveRotations(
  candidates: readonly Candidate<RotationFields>[],
  draft: DraftForRotations,
  asking: Asking,
): ResolvedRotations {
  const rejected: RejectedRow[] = [];
  const known = new Set(draft.blocks.map((b) => b.code));
  const addBlocks = new Set<string>();
  const addFrames = new Set<string>();
  const moved = new Set(candidates.map((c) => c.fields.block));

  const spelled = candidates.flatMap((candidate) => respelled(candidate, known, asking, rejected));
  const present = spelled.filter((candidate) => {
    const { block, relative_to } = candidate.fields;
    for (const code of [block, relative_to]) {
      if (known.has(code)) continue;
      const asReference = code === relative_to && !moved.has(code);
      const answer = asReference
        ? askMissing(asking, 'missing_reference', 'References', [ADD_FRAME, REJECT], candidate, code)
        : askMissing(asking, 'missing_block', 'Blocks', [ADD_BLOCK, REJECT], candidate, code);
      if (answer === REJECT) {
        rejected.push(unknownCode(candidate, code, asReference));
        return false;
      }
      (asReference ? addFrames : addBlocks).add(code);
    }
    return true;
  });

  const given = new Set(present.map(({ fields }) => rotationKey(fields)));
  const standing = draft.rotations.filter((row) => !given.has(rotationKey(row)));
  const single = withoutParallel(present, standing, asking, rejected);
  const removed = new Set(single.remove);
  const rest = { ...draft, rotations: draft.rotations.filter((row) => !removed.has(row)) };
  const looped = withoutLoops(single.candidates, rest, [...addBlocks], [...addFrames], rejected);
  return {
    ...against(looped, rest.rotations, asking),
    remove: single.remove,
    rejected,
    addFrames: [...addFrames],
    addBlocks: [...addBlocks],
  };
}

/** A code one slip away from one of the project's is asked about by itself, before it is taken for a new one. */
function respelled(
  candidate: Candidate<RotationFields>,
  known: ReadonlySet<string>,
  asking: Asking,
  rejected: RejectedRow[],
): Candidate<RotationFields>[] {
  const fields = { ...candidate.fields };
  for (const column of ['block', 'relative_to'] as const) {
    const code = fields[column];
    const near = known.has(code) ? null : nearest(code, known);
    if (!near) continue;
    const ask = `${code} is not in the project, but ${near} is. Which is meant?`;
    const choices = [near, `${code}, a new one`, REJECT];
    const answer = asking.ask(`spelling:${code}`, ask, choices, `line ${candidate.line}: ${code}`);
    if (answer === near) fields[column] = near;
    if (answer !== REJECT) continue;
    rejected.push({ ...unknownCode(candidate, code, column === 'relative_to'), hint: `Write ${near}?` });
    return [];
  }
  return [{ ...candidate, fields }];
}

/** Numbered and lettered codes, as "arc-2" and "arc-b", differ by one letter on purpose. */
const SERIES = /\d|(^|-)[a-z]$/;

/** A code of the project that a slip of one letter turns into this one; null where there is none. */
function nearest(code: string, known: ReadonlySet<string>): string | null {
  if (code.length < 4 || SERIES.test(code)) return null;
  return [...known].find((other) => Math.abs(other.length - code.length) <= 1 && isSlip(code, other)) ?? null;
}

/** One letter changed, left out, added, or two neighbours exchanged (Damerau 1964). */
function isSlip(a: string, b: string): boolean {
  let i = 0;
  while (i < a.length && a[i] === b[i]) i++;
  const [restA, restB] = [a.slice(i), b.slice(i)];
  return (
    restA.slice(1) === restB.slice(1) ||
    restA.slice(1) === restB ||
    restA === restB.slice(1) ||
    (restA[0] === restB[1] && restA[1] === restB[0] && restA.slice(2) === restB.slice(2))
  );
}

function askMissing(
  asking: Asking,
  id: string,
  what: string,
  choices: readonly string[],
  candidate: Candidate<RotationFields>,
  code: string,
): string | null {
  const ask = `${what} named in the file are not in the project. Add them?`;
  return asking.ask(id, ask, choices, `line ${candidate.line}: ${code}`);
}

const unknownCode = (
  candidate: Candidate<RotationFields>,
  code: string,
  asReference: boolean,
): RejectedRow => ({
  line: candidate.line,
  column: asReference ? 'relative_to' : 'block',
  read: code,
  problem: 'not in the project',
  hint: 'Import its outline first, or correct the code.',
});

function withoutLoops(
  candidates: readonly Candidate<RotationFields>[],
  draft: DraftForRotations,
  addBlocks: readonly string[],
  addFrames: readonly string[],
  rejected: RejectedRow[],
): readonly Candidate<RotationFields>[] {
  const whole = { appears_ma: null, disappears_ma: null };
  const blocks = [
    ...draft.blocks,
    ...addBlocks.map((code) => ({ code, kind: 'other' as const, ...whole })),
    ...addFrames.map((code) => ({ code, kind: 'frame' as const, ...whole })),
  ];
  const keys = new Set(candidates.map((c) => rotationKey(c.fields)));
  const rows = [
    ...draft.rotations.filter((row) => !keys.has(rotationKey(row))),
    ...candidates.map((c, i) => ({ ...c.fields, id: `file ${i}` })),
  ];
  const loops = compileModel(blocks, rows).problems.filter((p) => p.name === 'Cycle');
  if (loops.length === 0) return candidates;
  const links = ({ fields }: Candidate<RotationFields>, { loop }: (typeof loops)[number]): boolean =>
    loop.some((code, i) => code === fields.block && loop[(i + 1) % loop.length] === fields.relative_to);
  const within = ({ fields }: Candidate<RotationFields>, l: (typeof loops)[number]): boolean =>
    fields.age_ma >= l.younger_ma && fields.age_ma <= l.older_ma;
  // Rows may also reach across the loop's ages from both sides without one inside.
  const across = new Set(loops.filter((l) => !candidates.some((c) => links(c, l) && within(c, l))));
  const rest = candidates.filter((candidate) => {
    const { line, fields } = candidate;
    const loop = loops.find((l) => links(candidate, l) && (across.has(l) || within(candidate, l)));
    if (!loop) return true;
    rejected.push({
      line,
      column: 'relative_to',
      read: fields.relative_to,
      problem: `closes a loop between ${loop.older_ma} and ${loop.younger_ma} Ma: ${[...loop.loop, loop.loop[0]].join(' → ')}`,
      hint: 'Give one of these blocks another reference at these ages: a circuit ends in a frame.',
    });
    return false;
  });
  // The rows left may close the loop anew between them.
  return rest.length < candidates.length ? withoutLoops(rest, draft, addBlocks, addFrames, rejected) : rest;
}

function against(
  candidates: readonly Candidate<RotationFields>[],
  existing: readonly Rotation[],
  asking: Asking,
) {
  const byKey = new Map(existing.map((row) => [rotationKey(row), row]));
  const create: Candidate<RotationFields>[] = [];
  const replace: (Candidate<RotationFields> & { id: string })[] = [];
  const unchanged: Candidate<RotationFields>[] = [];
  const kept: Candidate<RotationFields>[] = [];
  for (const candidate of candidates) {
    const row = byKey.get(rotationKey(candidate.fields));
    if (!row) create.push(candidate);
    else if (sameFields(candidate.fields, row)) unchanged.push(candidate);
    else {
      const ask =
        'Rows of the same block, reference and age stand in the draft with other values. Which are to stay?';
      const where = `line ${candidate.line}: ${row.block} in ${row.relative_to} at ${row.age_ma} Ma`;
      if (asking.ask('existing_rows', ask, ["the file's", "the draft's"], where) === "the draft's")
        kept.push(candidate);
      else replace.push({ ...candidate, id: row.id });
    }
  }
  return { create, replace, unchanged, kept };
}

/** Compares every field of a file's row with the draft's. */
export function sameFields(fields: object, row: object): boolean {
  const other = row as Record<string, unknown>;
  return Object.entries(fields).every(
    ([key, value]) => JSON.stringify(value) === JSON.stringify(other[key] ?? null),
  );
}

/** What the ledger would refuse is refused row by row, before anything is written, with the line that it stands on. */
import type { z } from 'zod';
import { fieldErrors } from '~/server/problem';
import { blockFields, directionFields, featureFields, rotationFields } from '../ledger/contract';
import { rowErrors } from '../ledger/row-rules';
import type { RejectedRow } from './contract';
import type { ImportKind } from './files';
import type { Candidate, FileReading } from './rules/rotations';

const SHAPES: Record<ImportKind, z.ZodType> = {
  blocks: blockFields,
  rotations: rotationFields,
  features: featureFields.omit({ sha256: true }),
  directions: directionFields,
};

/** @param fieldsOf the ledger's fields of a candidate, which may carry more, such as its outlines */
export function usable<C>(
  reading: FileReading<C>,
  kind: ImportKind,
  fieldsOf: (candidate: C) => object,
): FileReading<C> {
  const rejected: RejectedRow[] = [];
  const candidates = reading.candidates.filter((candidate) => {
    const faults = faultsOf(candidate, kind, fieldsOf(candidate.fields));
    rejected.push(...faults);
    return faults.length === 0;
  });
  return { ...reading, candidates, rejected: [...reading.rejected, ...rejected] };
}

function faultsOf({ line }: Candidate<unknown>, kind: ImportKind, fields: object): RejectedRow[] {
  const parsed = SHAPES[kind].safeParse(fields);
  const errors = parsed.success
    ? rowErrors(kind, fields as Readonly<Record<string, unknown>>)
    : fieldErrors(parsed.error, fields);
  return errors.map(({ path, read, problem, hint }) => ({
    line,
    column: path?.split('.')[0] ?? null,
    read,
    problem,
    hint: hint ?? 'Correct the value in the file.',
  }));
}

/** Asks which of two sequences of one block is meant where a file gives both for the same ages. */
import { groupByAge } from '../../../kernel/rotations/legs';
import { findParallel } from '../../../kernel/rotations/parallel';
import type { Rotation, RotationFields } from '../../ledger/contract';
import type { RejectedRow } from '../contract';
import type { Asking } from './ask';
import type { Candidate } from './rotations';

type Row = Pick<RotationFields, 'block' | 'relative_to' | 'age_ma'>;
type FileRow = Candidate<RotationFields>;

export interface Single {
  readonly candidates: readonly FileRow[];
  /** Rows of the draft that the answers say to take out. */
  readonly remove: readonly Rotation[];
}

/**
 * Rows in references that were not chosen go, those of the file as rejected, those of the draft as removed; at
 * the two ends of the ages they stay where their sequence goes on beyond, as a hand-over needs them.
 */
export function withoutParallel(
  candidates: readonly FileRow[],
  standing: readonly Rotation[],
  asking: Asking,
  rejected: RejectedRow[],
): Single {
  const left = new Set(candidates);
  const remove = new Set<Rotation>();
  for (const [block, own] of byBlock(candidates, ({ fields }) => fields.block)) {
    const theirs = standing.filter((row) => row.block === block);
    const rows = [...theirs, ...own.map(({ fields }) => fields)];
    for (const { references, older_ma, younger_ma } of findParallel(block, rows)) {
      const among = ({ age_ma, relative_to }: Row): boolean =>
        references.includes(relative_to) && age_ma >= younger_ma && age_ma <= older_ma;
      if (!own.some(({ fields }) => among(fields))) continue;
      const span = `between ${younger_ma} and ${older_ma} Ma`;
      const ask = `${block} has rows in ${references.join(' and in ')} side by side ${span}. Which are to hold there?`;
      const id = `parallel:${block}:${younger_ma}-${older_ma}`;
      const chosen = asking.ask(id, ask, references);
      if (chosen === null) continue;
      const goes = (row: Row): boolean =>
        among(row) && row.relative_to !== chosen && !goesOnBeyond(rows, row, older_ma, younger_ma);
      for (const row of theirs) if (goes(row)) remove.add(row);
      for (const row of own) {
        if (!goes(row.fields)) continue;
        left.delete(row);
        rejected.push({
          line: row.line,
          column: 'relative_to',
          read: row.fields.relative_to,
          problem: `beside the rows in ${chosen}, which were chosen ${span}`,
          hint: 'Keep one reference between two hand-overs.',
        });
      }
    }
  }
  return { candidates: [...left], remove: [...remove] };
}

function byBlock<T>(rows: readonly T[], blockOf: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(blockOf(row));
    if (group) group.push(row);
    else groups.set(blockOf(row), [row]);
  }
  return groups;
}

function goesOnBeyond(
  rows: readonly Row[],
  { age_ma, relative_to }: Row,
  older_ma: number,
  younger_ma: number,
): boolean {
  if (age_ma !== older_ma && age_ma !== younger_ma) return false;
  const ages = groupByAge(rows);
  const at = ages.findIndex((group) => group[0]?.age_ma === age_ma);
  const beyond = ages[age_ma === older_ma ? at + 1 : at - 1];
  return beyond?.some((row) => row.relative_to === relative_to) ?? false;
}

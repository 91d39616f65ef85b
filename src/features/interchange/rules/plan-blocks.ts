import type { Block } from '../../ledger/contract';
import { checkGeometry, isFieldError } from '../../ledger/geometry-rules';
import type { RejectedRow } from '../contract';
import type { Asking } from './ask';
import type { BlockCandidate, BlocksReading, OutlineCandidate } from './blocks';
import { DRAFTS, existingQuestion, Planner, type ImportPlan } from './plan';
import { sameFields } from './resolve-rotations';

interface Hashed extends OutlineCandidate {
  readonly sha256: string;
  readonly vertices: number;
}

/** Blocks of a file against the draft's: new ones made, others replaced with their outlines as the user says. */
export function planBlocks(reading: BlocksReading, existing: readonly Block[]): ImportPlan {
  const planner = new Planner();
  const rejected: RejectedRow[] = [...reading.rejected];
  const byCode = new Map(existing.map((block) => [block.code, block]));
  for (const { line, fields: candidate } of reading.candidates) {
    const outlines = hashOutlines(candidate, rejected);
    if (!outlines) continue;
    const there = byCode.get(candidate.fields.code);
    const change = !there
      ? 'new'
      : same(candidate, outlines, there)
        ? 'unchanged'
        : keep(reading.asking, line, there)
          ? 'kept'
          : 'replaces';
    planner.show(line, change, cells(candidate, outlines));
    if (change === 'new') planner.create('blocks', { ...candidate.fields });
    if (change === 'replaces') {
      const { code: _code, ...fields } = candidate.fields;
      planner.update('blocks', there!.id, fields);
      for (const outline of there!.outlines) planner.remove('outlines', outline.id);
    }
    if (change === 'new' || change === 'replaces')
      for (const outline of outlines) createOutline(planner, candidate, outline);
  }
  return planner.plan(rejected);
}

function hashOutlines(candidate: BlockCandidate, rejected: RejectedRow[]): Hashed[] | null {
  const hashed: Hashed[] = [];
  for (const outline of candidate.outlines) {
    const checked = checkGeometry(outline.geometry);
    if (isFieldError(checked)) {
      rejected.push({
        line: outline.line,
        column: 'geometry',
        read: checked.read ?? '',
        problem: checked.problem,
        hint: checked.hint ?? 'Save the outline again.',
      });
      return null;
    }
    hashed.push({ ...outline, sha256: checked.sha256, vertices: checked.vertices });
  }
  return hashed;
}

function createOutline(planner: Planner, candidate: BlockCandidate, outline: Hashed): void {
  const { outline_older_ma, outline_younger_ma, inside, source, geometry } = outline;
  planner.create('outlines', {
    block: candidate.fields.code,
    outline_older_ma,
    outline_younger_ma,
    inside,
    source,
    geometry,
  });
}

const outlineKey = (
  o: Pick<Hashed, 'sha256' | 'inside' | 'outline_older_ma' | 'outline_younger_ma' | 'source'>,
): string => JSON.stringify([o.sha256, o.inside, o.outline_older_ma, o.outline_younger_ma, o.source]);

function same(candidate: BlockCandidate, outlines: readonly Hashed[], block: Block): boolean {
  const [a, b] = [outlines, block.outlines].map((list) => list.map(outlineKey).sort().join('\n'));
  return a === b && sameFields(candidate.fields, block);
}

function keep(asking: Asking, line: number | null, block: Block): boolean {
  const [id, ask, choices] = existingQuestion;
  return asking.ask(id, ask, choices, `line ${line}: ${block.code}`) === DRAFTS;
}

function cells(
  { fields }: BlockCandidate,
  outlines: readonly Hashed[],
): Record<string, string | number | null> {
  const { code, name, kind, appears_ma, disappears_ma, evidence, source } = fields;
  const vertices = outlines.reduce((sum, o) => sum + o.vertices, 0);
  return {
    code,
    name,
    kind,
    outlines: outlines.length,
    vertices,
    appears_ma,
    disappears_ma,
    evidence,
    source,
  };
}

import type { RotationFields } from '../../ledger/contract';
import { Planner, type ImportPlan } from './plan';
import { resolveRotations, type DraftForRotations } from './resolve-rotations';
import type { FileReading } from './rotations';

/** Rotations of a file against the draft's, with the frames and blocks that the user had added for them. */
export function planRotations(reading: FileReading<RotationFields>, draft: DraftForRotations): ImportPlan {
  const resolved = resolveRotations(reading.candidates, draft, reading.asking);
  const planner = new Planner();
  const blank = {
    appears_ma: null,
    disappears_ma: null,
    evidence: 'unconstrained',
    source: null,
    note: null,
  };
  for (const code of resolved.addFrames)
    planner.create('blocks', { code, name: nameOf(code), kind: 'frame', ...blank });
  for (const code of resolved.addBlocks)
    planner.create('blocks', { code, name: nameOf(code), kind: 'other', ...blank });
  for (const { id, ...fields } of resolved.remove) {
    planner.show(null, 'removed', cells(fields));
    planner.remove('rotations', id);
  }
  const replaced = new Map(resolved.replace.map((candidate) => [candidate.line, candidate.id]));
  const unchanged = new Set(resolved.unchanged.map((candidate) => candidate.line));
  const kept = new Set(resolved.kept.map((candidate) => candidate.line));
  const taken = [...resolved.create, ...resolved.replace, ...resolved.unchanged, ...resolved.kept];
  for (const { line, fields } of taken.sort((a, b) => (a.line ?? 0) - (b.line ?? 0))) {
    const id = replaced.get(line);
    const change = id ? 'replaces' : unchanged.has(line) ? 'unchanged' : kept.has(line) ? 'kept' : 'new';
    planner.show(line, change, cells(fields));
    if (change === 'new') planner.create('rotations', { ...fields });
    if (id) planner.update('rotations', id, { ...fields });
  }
  return planner.plan([...reading.rejected, ...resolved.rejected]);
}

/** "spin-axis" reads "Spin axis". */
const nameOf = (code: string): string => code.charAt(0).toUpperCase() + code.slice(1).replaceAll('-', ' ');

function cells(fields: RotationFields): Record<string, string | number | null> {
  const { block, relative_to, age_ma, pole_lat, pole_lon, angle_deg, chron, evidence, covariance, source } =
    fields;
  return {
    block,
    relative_to,
    age_ma,
    pole_lat,
    pole_lon,
    angle_deg,
    chron,
    evidence,
    covariance: covariance ? 'given' : null,
    source,
  };
}

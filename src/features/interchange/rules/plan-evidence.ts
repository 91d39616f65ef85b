import type { Direction, DirectionFields, Feature } from '../../ledger/contract';
import { checkGeometry, isFieldError } from '../../ledger/geometry-rules';
import type { RejectedRow } from '../contract';
import type { FeatureCandidate } from './features';
import { DRAFTS, existingQuestion, Planner, type ImportPlan } from './plan';
import { sameFields } from './resolve-rotations';
import type { FileReading } from './rotations';

/** Features have no name of their own to meet by: those alike in every property and shape are left alone. */
export function planFeatures(
  reading: FileReading<FeatureCandidate>,
  existing: readonly Feature[],
): ImportPlan {
  const planner = new Planner();
  const rejected: RejectedRow[] = [...reading.rejected];
  const byShape = new Map<string, Feature[]>();
  for (const feature of existing)
    byShape.set(feature.sha256, [...(byShape.get(feature.sha256) ?? []), feature]);
  for (const { line, fields: candidate } of reading.candidates) {
    const checked = checkGeometry(candidate.geometry as Parameters<typeof checkGeometry>[0]);
    if (isFieldError(checked)) {
      rejected.push({
        line,
        column: 'geometry',
        read: checked.read ?? '',
        problem: checked.problem,
        hint: checked.hint ?? 'Save the feature again.',
      });
      continue;
    }
    const fields = { ...candidate.fields, sha256: checked.sha256 };
    const there = (byShape.get(checked.sha256) ?? []).some((feature) => sameFields(fields, feature));
    const { block, kind, name, age_ma, appears_ma, disappears_ma, source } = candidate.fields;
    planner.show(line, there ? 'unchanged' : 'new', {
      block,
      kind,
      name,
      vertices: checked.vertices,
      age_ma,
      appears_ma,
      disappears_ma,
      source,
    });
    if (!there) planner.create('features', { ...candidate.fields, geometry: candidate.geometry });
  }
  return planner.plan(rejected);
}

/** Sites meet by name and age. */
export function planDirections(
  reading: FileReading<DirectionFields>,
  existing: readonly Direction[],
): ImportPlan {
  const planner = new Planner();
  const key = (row: Pick<DirectionFields, 'site' | 'age_ma'>): string => `${row.site}\n${row.age_ma}`;
  const byKey = new Map(existing.map((row) => [key(row), row]));
  for (const { line, fields } of reading.candidates) {
    const there = byKey.get(key(fields));
    const [id, ask, choices] = existingQuestion;
    const kept = (): boolean =>
      reading.asking.ask(id, ask, choices, `line ${line}: ${fields.site}`) === DRAFTS;
    const change = !there ? 'new' : sameFields(fields, there) ? 'unchanged' : kept() ? 'kept' : 'replaces';
    const { site, lat, lon, block, age_ma, declination, inclination, n, alpha95, rock } = fields;
    planner.show(line, change, { site, lat, lon, block, age_ma, declination, inclination, n, alpha95, rock });
    if (change === 'new') planner.create('directions', { ...fields });
    if (change === 'replaces') planner.update('directions', there!.id, { ...fields });
  }
  return planner.plan(reading.rejected);
}

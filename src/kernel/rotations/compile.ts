import { toDegrees } from '../sphere/angles';
import { findCycles } from './cycles';
import { stageBetween } from './interpolate';
import { rowsToLegs } from './legs';
import { findParallel } from './parallel';
import { fromPole } from './pole';
import { angleOf, IDENTITY } from './quaternion';
import type {
  BlockInput,
  CompiledBlock,
  CompiledRow,
  Leg,
  Model,
  ModelProblem,
  RotationInput,
} from './types';

/** A row at 0 Ma turned by more than this, degrees, is not the identity. */
export const PRESENT_TOLERANCE_DEG = 1e-9;
/** A stage whose angle is within this of 180°, degrees, may turn either way round: a problem. */
export const HALF_TURN_MARGIN_DEG = 1;

/** Exists at the present: no end of life, or one at 0 Ma. */
export const isPresent = (block: BlockInput): boolean => !block.disappears_ma;

/** A rotation by no angle at 0 Ma. */
export const isIdentityAtPresent = (row: CompiledRow): boolean =>
  row.age_ma === 0 && toDegrees(angleOf(row.quaternion)) <= PRESENT_TOLERANCE_DEG;

/**
 * Orders rows into legs, prepares their stages and lists what is wrong. Never throws, whatever a draft holds:
 * a row that cannot be used is left out and named in `problems`, and the rest works. Of duplicates the first
 * given is used.
 */
export function compileModel(blocks: readonly BlockInput[], rotations: readonly RotationInput[]): Model {
  const problems: ModelProblem[] = [];
  const byCode = new Map<string, BlockInput>();
  for (const block of blocks) {
    if (byCode.has(block.code)) problems.push({ name: 'DuplicateBlock', block: block.code });
    else byCode.set(block.code, block);
  }

  const rowsOf = new Map<string, RotationInput[]>();
  for (const row of rotations) {
    if (!byCode.has(row.block)) problems.push({ name: 'UnknownBlock', block: row.block, rotation: row.id });
    else if (isValid(row, problems)) {
      const rows = rowsOf.get(row.block);
      if (rows) rows.push(row);
      else rowsOf.set(row.block, [row]);
    }
  }

  const compiled = [...byCode.values()].map((block) =>
    compileBlock(block, rowsOf.get(block.code) ?? [], problems),
  );
  for (const block of compiled) {
    for (const { relative_to, older_ma, younger_ma } of block.legs) {
      if (!byCode.has(relative_to))
        problems.push({ name: 'MissingReference', block: block.code, relative_to, older_ma, younger_ma });
    }
  }
  problems.push(...findCycles(compiled));
  const oldest_ma = Math.max(0, ...compiled.map((block) => block.legs.at(-1)?.older_ma ?? 0));
  return { blocks: compiled, problems, oldest_ma };
}

function isValid(row: RotationInput, problems: ModelProblem[]): boolean {
  const wrong = (quantity: 'age_ma' | 'pole_lat' | 'pole_lon' | 'angle_deg'): boolean => {
    problems.push({
      name: 'InvalidRow',
      block: row.block,
      rotation: row.id,
      quantity,
      read: String(row[quantity]),
    });
    return false;
  };
  if (!(row.age_ma >= 0 && row.age_ma < Infinity)) return wrong('age_ma');
  if (!(Math.abs(row.pole_lat) <= 90)) return wrong('pole_lat');
  if (!Number.isFinite(row.pole_lon)) return wrong('pole_lon');
  return Number.isFinite(row.angle_deg) || wrong('angle_deg');
}

function compileBlock(
  block: BlockInput,
  given: readonly RotationInput[],
  problems: ModelProblem[],
): CompiledBlock {
  const rows = withoutDuplicates(given, problems);
  problems.push(...findParallel(block.code, rows));
  const runs = rowsToLegs(rows);
  const legs = runs.map(({ relative_to, rows: run }, i): Leg => {
    const first = run[0];
    const compiled = run.map(compileRow);
    if (i === 0 && isPresent(block) && first && first.age_ma > 0) compiled.unshift(impliedRow(first));
    return compileLeg(block.code, relative_to, compiled, problems);
  });
  legs.forEach((leg, i) => {
    const next = legs[i + 1];
    if (next && next.younger_ma > leg.older_ma) {
      problems.push({
        name: 'LegGap',
        block: block.code,
        older_ma: next.younger_ma,
        younger_ma: leg.older_ma,
      });
    }
    for (const row of leg.rows) {
      if (row.age_ma === 0 && !isIdentityAtPresent(row))
        problems.push({ name: 'NonIdentityAtPresent', block: block.code, rotation: row.id });
    }
  });
  const { code, kind, appears_ma, disappears_ma } = block;
  return { code, kind, appears_ma, disappears_ma, legs };
}

function withoutDuplicates(rows: readonly RotationInput[], problems: ModelProblem[]): RotationInput[] {
  const groups = new Map<string, RotationInput[]>();
  for (const row of rows) {
    const key = `${row.age_ma} ${row.relative_to}`;
    const group = groups.get(key);
    if (group) group.push(row);
    else groups.set(key, [row]);
  }
  return [...groups.values()].flatMap((group) => {
    const [first] = group;
    if (!first) return [];
    const { block, relative_to, age_ma } = first;
    if (group.length > 1) {
      problems.push({
        name: 'DuplicateRow',
        block,
        relative_to,
        age_ma,
        rotations: group.map((row) => row.id),
      });
    }
    return [first];
  });
}

function compileRow({ block: _block, relative_to: _reference, ...row }: RotationInput): CompiledRow {
  return { ...row, quaternion: fromPole(row.pole_lat, row.pole_lon, row.angle_deg), implied: false };
}

function impliedRow(first: RotationInput): CompiledRow {
  return {
    id: `implied:${first.block}`,
    age_ma: 0,
    pole_lat: 90,
    pole_lon: 0,
    angle_deg: 0,
    evidence: first.evidence,
    covariance: null,
    cov_dof: null,
    age_two_sigma_ma: null,
    source: null,
    quaternion: IDENTITY,
    implied: true,
  };
}

function compileLeg(
  block: string,
  relative_to: string,
  rows: readonly CompiledRow[],
  problems: ModelProblem[],
): Leg {
  const stages = rows.slice(1).flatMap((older, i) => {
    const younger = rows[i];
    return younger ? [stageBetween(younger, older)] : [];
  });
  for (const { older_ma, younger_ma, rate } of stages) {
    const angle_deg = toDegrees(rate * (older_ma - younger_ma));
    if (angle_deg > 180 - HALF_TURN_MARGIN_DEG) {
      problems.push({ name: 'NearHalfTurnStage', block, relative_to, older_ma, younger_ma, angle_deg });
    }
  }
  return { relative_to, younger_ma: rows[0]?.age_ma ?? 0, older_ma: rows.at(-1)?.age_ma ?? 0, rows, stages };
}

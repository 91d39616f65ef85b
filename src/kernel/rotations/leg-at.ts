import { evaluateStage } from './interpolate';
import type { CompiledBlock, CompiledRow, Leg, Quaternion, Stage } from './types';

/** What to answer beyond the oldest row of a block: nothing, or the last stage going on at its rate. */
export type Beyond = 'none' | 'hold last stage';

/**
 * The leg that gives a block's rotation at an age: the youngest that reaches it, so the younger one at a
 * hand-over; null in a gap, beyond the rows and without any. With `hold last stage` the oldest leg goes on
 * where it has a stage.
 */
export function legAt({ legs }: CompiledBlock, age_ma: number, beyond: Beyond = 'none'): Leg | null {
  for (const leg of legs) if (age_ma <= leg.older_ma) return age_ma >= leg.younger_ma ? leg : null;
  const last = legs.at(-1);
  return beyond === 'hold last stage' && last && last.stages.length > 0 ? last : null;
}

export interface Evaluated {
  readonly quaternion: Quaternion;
  readonly younger: CompiledRow;
  readonly older: CompiledRow;
  readonly fraction: number;
  readonly stage: Stage | null;
  readonly extrapolated: boolean;
}

/**
 * The rotation of a leg at an age that it covers (or beyond its oldest row, held). At a row's age it is the
 * row's own, and the stage is the younger of its two, the only one at an end, null where the leg is one row.
 */
export function evaluateLeg({ rows, stages }: Leg, age_ma: number): Evaluated {
  const i = stageIndex(stages, age_ma);
  const stage = stages[i] ?? null;
  const atRow =
    rows[i]?.age_ma === age_ma ? rows[i] : rows[i + 1]?.age_ma === age_ma ? rows[i + 1] : undefined;
  if (atRow)
    return {
      quaternion: atRow.quaternion,
      younger: atRow,
      older: atRow,
      fraction: 0,
      stage,
      extrapolated: false,
    };
  const [younger, older] = [rows[i], rows[i + 1]];
  if (!stage || !younger || !older)
    throw new RangeError(`a leg of ages ${rows[0]?.age_ma}–${rows.at(-1)?.age_ma} does not cover ${age_ma}`);
  return {
    quaternion: evaluateStage(stage, age_ma),
    younger,
    older,
    fraction: (age_ma - younger.age_ma) / (older.age_ma - younger.age_ma),
    stage,
    extrapolated: age_ma > older.age_ma,
  };
}

/** Index of the youngest stage that reaches an age; the oldest beyond them all, 0 when there is none. */
function stageIndex(stages: readonly Stage[], age_ma: number): number {
  const i = stages.findIndex((stage) => age_ma <= stage.older_ma);
  return i >= 0 ? i : Math.max(0, stages.length - 1);
}

/** What the overview says of a state in five lines, each with the figure it rests on. */
import { handOverJumps, poseAt } from '../../kernel/rotations';
import type { Model } from '../../kernel/rotations/types';
import type { Block, Direction, Rotation } from '../ledger/contract';
import { count, kilometres, number, shortAge } from './format';
import { observedOn } from './log/observed';
import { latitudeAt } from './log/series';
import { shortName } from './names';
import { problemWords } from './notebook/rests';

export interface Check {
  readonly verdict: 'holds' | 'check' | 'note' | 'blocker';
  readonly statement: string;
  readonly figure: string;
}

/** A hand-over that jumps further is worth a look. Common practice, no source. */
const JUMP_KM = 10;

interface State {
  readonly blocks: readonly Block[];
  readonly rotations: readonly Rotation[];
  readonly directions: readonly Direction[];
}

/** Oldest age to which a block, frames aside, has rotations; 0 for none. */
export const historyOldest = (model: Model): number =>
  Math.max(
    0,
    ...model.blocks
      .filter(({ kind }) => kind !== 'frame')
      .flatMap(({ legs }) => legs.map(({ older_ma }) => older_ma)),
  );

/** @param frame the frame whose north pole is the spin axis; latitudes mean something in it alone. */
export function checksOf(model: Model, state: State, frame: string | null): Check[] {
  if (state.blocks.length === 0) return [];
  const nameOf = (code: string): string => {
    const block = state.blocks.find((b) => b.code === code);
    return block ? shortName(block) : code;
  };
  return [
    circuits(model, state, frame, nameOf),
    jumps(model, nameOf),
    ...(frame === null ? [] : directions(model, state, frame)),
    covariances(state),
    sources(state),
  ];
}

function circuits(model: Model, state: State, frame: string | null, nameOf: (code: string) => string): Check {
  const [problem] = model.problems;
  if (problem) {
    const { severity, words } = problemWords(problem, nameOf);
    return {
      verdict: severity,
      statement: words.replace(/\.$/, ''),
      figure: count(model.problems.length, 'problem'),
    };
  }
  const outlined = state.blocks.filter((block) => block.kind !== 'frame');
  const loose =
    frame === null
      ? []
      : outlined.filter(
          ({ code, disappears_ma }) =>
            poseAt(model, code, disappears_ma ? disappears_ma + 1e-6 : 0, frame).status !== 'placed',
        );
  const statement =
    loose.length > 0
      ? `${nameOf(loose[0]!.code)} has no circuit to the frame`
      : 'Every circuit ends in a frame, without a loop';
  return {
    verdict: loose.length > 0 ? 'check' : 'holds',
    statement,
    figure: `0 to ${shortAge(historyOldest(model))} Ma`,
  };
}

function jumps(model: Model, nameOf: (code: string) => string): Check {
  const all = handOverJumps(model);
  const found = all.filter((jump) => jump.greatest_km !== null);
  const worst = found.sort((a, b) => b.greatest_km! - a.greatest_km!)[0];
  const statement = `No hand-over jumps more than ${number(JUMP_KM)} km`;
  if (!worst && all.length > 0)
    return {
      verdict: 'note',
      statement: 'No hand-over can be measured',
      figure: `${nameOf(all[0]!.block)} at ${shortAge(all[0]!.age_ma)} Ma: no circuit between the two`,
    };
  if (!worst) return { verdict: 'holds', statement, figure: 'no hand-over' };
  const figure = `${nameOf(worst.block)}, up to ${kilometres(worst.greatest_km!)} at ${shortAge(worst.age_ma)} Ma`;
  return { verdict: worst.greatest_km! > JUMP_KM ? 'check' : 'holds', statement, figure };
}

/** A direction agrees where the predicted latitude lies within its limits from I ± α95. */
function directions(model: Model, state: State, frame: string): Check[] {
  let agree = 0;
  let all = 0;
  for (const { code } of state.blocks) {
    for (const datum of observedOn(state.directions, code)) {
      const { lat, lon } = state.directions.find(({ id }) => id === datum.id)!;
      const predicted = latitudeAt(
        model,
        { block: code, lat, lon, name: null, subject: '', plural: false },
        frame,
        datum.age,
      );
      if (!predicted) continue;
      all++;
      if (predicted.lat >= datum.lower && predicted.lat <= datum.upper) agree++;
    }
  }
  if (all === 0) return [];
  // At 95 % one in twenty lies outside by chance alone.
  const verdict = agree >= 0.9 * all ? 'holds' : 'check';
  return [
    {
      verdict,
      statement: 'Predicted latitudes agree with the directions',
      figure: `${agree} of ${all} within α95`,
    },
  ];
}

function covariances({ rotations }: State): Check {
  const rows = rotations.filter((row) => row.age_ma > 0);
  const without = rows.filter((row) => row.covariance === null).length;
  const figure = `${number(without)} of ${number(rows.length)} without`;
  return {
    verdict: without === 0 ? 'holds' : 'note',
    statement: 'Every rotation carries a covariance',
    figure,
  };
}

function sources({ rotations }: State): Check {
  const without = rotations.filter((row) => !row.source).length;
  return {
    verdict: without === 0 ? 'holds' : 'check',
    statement: 'Every rotation names its source',
    figure: `${number(without)} without`,
  };
}

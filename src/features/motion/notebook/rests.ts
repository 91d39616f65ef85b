/** What a reader should know before leaning on the position: hand-overs, rows without covariance, what hangs on it. */
import { jumpKm } from '../../../kernel/rotations';
import { handOverJumps, poseAt } from '../scene/tolerant';
import { toVector } from '../../../kernel/sphere';
import type { Model, ModelProblem } from '../../../kernel/rotations/types';
import { ageValue, kilometres, list, NBSP, number, shortAge } from '../format';
import type { Observed } from '../log/observed';
import { latitudeAt } from '../log/series';
import type { NamedPoint } from '../scene/points';

export interface Remark {
  readonly severity: 'note' | 'check' | 'blocker';
  readonly words: string;
}

/** Smaller jumps than this, km, are below what is drawn. */
const LEAST_JUMP_KM = 0.5;

/** Blocks that a block's circuit passes at any age, itself included. */
export function circuitOf(model: Model, block: string): ReadonlySet<string> {
  const found = new Set<string>();
  const waiting = [block];
  for (let code = waiting.pop(); code !== undefined; code = waiting.pop()) {
    if (found.has(code)) continue;
    found.add(code);
    for (const { relative_to } of model.blocks.find((b) => b.code === code)?.legs ?? [])
      waiting.push(relative_to);
  }
  return found;
}

export function restsOn(
  model: Model,
  point: NamedPoint,
  heldStill: string,
  frame: string,
  observed: readonly Observed[],
  nameOf: (code: string) => string,
): Remark[] {
  const circuit = circuitOf(model, point.block);
  return [
    ...problems(model, circuit, nameOf),
    ...jumps(model, point, nameOf),
    ...shallow(model, point, frame, observed),
    ...gaps(model, circuit, nameOf),
    ...hangers(model, point.block, heldStill, nameOf),
  ];
}

function jumps(model: Model, { block, lat, lon }: NamedPoint, nameOf: (code: string) => string): Remark[] {
  return handOverJumps(model)
    .filter((jump) => jump.block === block)
    .flatMap((jump): Remark[] => {
      const km = jumpKm(jump, toVector(lat, lon));
      const from = `${nameOf(jump.older_reference)} to ${nameOf(jump.younger_reference)}`;
      if (km === null) {
        return [
          {
            severity: 'check',
            words: `Hand-over at ${ageValue(jump.age_ma)} Ma, ${from}: no circuit between the two.`,
          },
        ];
      }
      if (km < LEAST_JUMP_KM) return [];
      return [
        { severity: 'check', words: `Hand-over at ${ageValue(jump.age_ma)} Ma jumps ${kilometres(km)}.` },
      ];
    });
}

/** Rows without covariance make the ages up to their neighbours "at least"; neighbouring rows are named together. */
function gaps(model: Model, circuit: ReadonlySet<string>, nameOf: (code: string) => string): Remark[] {
  return model.blocks
    .filter(({ code }) => circuit.has(code))
    .flatMap(({ code, legs }) =>
      legs.flatMap(({ rows }) => bareRuns(rows).map((run) => bareWords(nameOf(code), rows, run))),
    );
}

type Rows = Model['blocks'][number]['legs'][number]['rows'];

/** First and last index of each run of rows without covariance. */
function bareRuns(rows: Rows): [first: number, last: number][] {
  const runs: [number, number][] = [];
  rows.forEach((row, i) => {
    if (row.covariance !== null || row.implied || row.age_ma === 0) return;
    const run = runs[runs.length - 1];
    if (run && run[1] === i - 1) run[1] = i;
    else runs.push([i, i]);
  });
  return runs;
}

function bareWords(name: string, rows: Rows, [first, last]: [number, number]): Remark {
  const age = (i: number) => rows[i]?.age_ma ?? 0;
  const which =
    first === last
      ? `row ${ageValue(age(first))}, carries`
      : `rows ${ageValue(age(first))} to ${ageValue(age(last))}, carry`;
  const span = `${shortAge(age(Math.max(0, first - 1)))}–${shortAge(age(Math.min(rows.length - 1, last + 1)))}`;
  return { severity: 'note', words: `${name}, ${which} no covariance: ages ${span} read “at least”.` };
}

/** Sediments whose limits miss the predicted latitude, with the flattening that would explain it: tan I = f tan I′. */
function shallow(model: Model, point: NamedPoint, frame: string, observed: readonly Observed[]): Remark[] {
  return observed.flatMap((datum): Remark[] => {
    const predicted = datum.mayBeShallow ? latitudeAt(model, point, frame, datum.age) : null;
    if (!predicted || (predicted.lat >= datum.lower && predicted.lat <= datum.upper)) return [];
    const tangent = (lat: number) => Math.tan((lat * Math.PI) / 180);
    const f = tangent(datum.lat) / tangent(predicted.lat);
    if (!(f > 0 && f < 1)) return [];
    return [
      {
        severity: 'note',
        words: `${datum.site}, ${ageValue(datum.age)} Ma: inclination reads shallow, f${NBSP}=${NBSP}${number(f, 2)}.`,
      },
    ];
  });
}

function hangers(model: Model, block: string, heldStill: string, nameOf: (code: string) => string): Remark[] {
  const carried = model.blocks.filter(
    ({ code, legs }) => code !== block && legs.some(({ relative_to }) => relative_to === block),
  );
  const names = carried
    .filter(({ code }) => poseAt(model, code, 0, heldStill).status === 'placed')
    .map(({ code }) => nameOf(code));
  return names.length === 0
    ? []
    : [
        {
          severity: 'note',
          words: `${list(names)} ${names.length === 1 ? 'moves' : 'move'} with ${nameOf(block)}.`,
        },
      ];
}

function problems(model: Model, circuit: ReadonlySet<string>, nameOf: (code: string) => string): Remark[] {
  return model.problems.flatMap((problem): Remark[] => {
    const blocks = problem.name === 'Cycle' ? problem.loop : [problem.block];
    return blocks.some((code) => circuit.has(code)) ? [problemWords(problem, nameOf)] : [];
  });
}

export function problemWords(problem: ModelProblem, nameOf: (code: string) => string): Remark {
  const span = (p: { younger_ma: number; older_ma: number }) =>
    `between ${shortAge(p.younger_ma)} and ${shortAge(p.older_ma)} Ma`;
  switch (problem.name) {
    case 'Cycle':
      return {
        severity: 'blocker',
        words: `The circuit runs in a loop, ${list(problem.loop.map(nameOf))}, ${span(problem)}.`,
      };
    case 'MissingReference':
      return {
        severity: 'blocker',
        words: `${nameOf(problem.block)} refers to ${problem.relative_to}, which does not exist, ${span(problem)}.`,
      };
    case 'DuplicateBlock':
      return { severity: 'blocker', words: `Two blocks have the code ${problem.block}.` };
    case 'UnknownBlock':
      return { severity: 'blocker', words: `A rotation names ${problem.block}, which does not exist.` };
    case 'DuplicateRow':
      return {
        severity: 'blocker',
        words: `${nameOf(problem.block)} has ${problem.rotations.length} rows at ${ageValue(problem.age_ma)} Ma in ${nameOf(problem.relative_to)}.`,
      };
    case 'NonIdentityAtPresent':
      return { severity: 'check', words: `${nameOf(problem.block)}: the row at 0 Ma is not the identity.` };
    case 'InvalidRow':
      return {
        severity: 'blocker',
        words: `${nameOf(problem.block)}: a row reads ${problem.read} for ${problem.quantity}.`,
      };
    case 'LegGap':
      return { severity: 'check', words: `${nameOf(problem.block)} has no rotations ${span(problem)}.` };
    case 'ParallelSequences':
      return {
        severity: 'blocker',
        words: `${nameOf(problem.block)} has rows in ${list(problem.references.map(nameOf))} side by side ${span(problem)}: which of them holds is not said. Keep one reference between two hand-overs.`,
      };
    case 'NearHalfTurnStage':
      return {
        severity: 'check',
        words: `${nameOf(problem.block)} turns nearly half round ${span(problem)}: either way would do.`,
      };
  }
}

/** Under which names the rows that place, move or trace something are cited. */
import { poseAt, type DriftPoint } from '../../../kernel/rotations';
import type { CompiledRow, Link, Model, Pose } from '../../../kernel/rotations/types';

type Cited = string | null;

/** Each name once, in alphabetical order. */
export const inOrder = (names: readonly Cited[]): string[] =>
  [...new Set(names)]
    .filter((name): name is string => name !== null && name !== '')
    .sort((a, b) => a.localeCompare(b, 'en'));

const cited = (row: CompiledRow): Cited => (row.implied ? null : row.source);

/** Of the rows on either side of the age, along the circuit. */
export const poseSources = ({ links }: Pose): Cited[] =>
  links.flatMap(({ younger, older }) => [cited(younger), cited(older)]);

/** Of the rows that bound the stages by which a block moves: at a row's age, that is the younger stage. */
export const motionSources = (model: Model, { links }: Pose): Cited[] =>
  links.flatMap((link) => stageRows(model, link).map(cited));

function stageRows(model: Model, { block, stage }: Link): CompiledRow[] {
  if (!stage) return [];
  const legs = model.blocks.find(({ code }) => code === block)?.legs ?? [];
  return legs
    .filter(({ stages }) => stages.includes(stage))
    .flatMap(({ rows }) =>
      rows.filter(({ age_ma }) => age_ma === stage.younger_ma || age_ma === stage.older_ma),
    );
}

/** Of every row along the circuit of a drift path, wherever it has a place. */
export function pathSources(
  model: Model,
  block: string,
  points: readonly DriftPoint[],
  relative_to: string,
): string[] {
  const ages = points.filter(({ status }) => status === 'placed').map(({ age_ma }) => age_ma);
  return inOrder(ages.flatMap((age_ma) => poseSources(poseAt(model, block, age_ma, relative_to))));
}

/** One click for a project on the real Earth: present coasts cut by the blocks' present outlines, as their layers. */
import type { MultiPolygon, Polygon } from 'geojson';
import type { Edit } from '~/features/ledger/contract';
import { editDraft, type ExpectedRevision } from '~/features/ledger/server';
import { loadShapes } from '~/features/ledger/shapes';
import { loadState, type State } from '~/features/ledger/state';
import { demand, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { runInWorker } from '~/server/workers';
import type { CoastJob, CutCoast } from './coast.task';
import coastTask from './coast.task.ts?nodeworker';

export const COAST_SOURCE = 'Natural Earth, land 1:50 million (world-atlas 2.0.2)';

/**
 * Replaces the layers of an earlier cut in the same step of the change log.
 * @throws Problem `Conflict` for a project that is not on the real Earth or has no outlines
 */
export async function cutCoasts(
  access: Access,
  expected: ExpectedRevision,
  signal?: AbortSignal,
): Promise<{ blocks: number; vertices: number; revision: number }> {
  demand(access, 'ledger.edit');
  if (!access.project.real_earth)
    throw new Problem('Conflict', {
      detail: 'The project is not on the real Earth: say so in its settings first.',
    });
  const state = await loadState(access, 'draft');
  const blocks = await presentOutlines(state);
  if (blocks.length === 0)
    throw new Problem('Conflict', { detail: 'No block has an outline at 0 Ma to cut the coast by.' });
  const cut = await runInWorker<CoastJob, CutCoast[]>(coastTask, { blocks }, signal);
  const kept = cut.filter(({ lines }) => lines.length > 0);
  const { revision } = await editDraft(
    access,
    [...removals(state), ...kept.map((one) => creation(state, one))],
    {
      expected,
      action: 'edit',
      label: 'Cut the present coast by the outlines',
    },
  );
  return {
    blocks: kept.length,
    vertices: kept.reduce((sum, { lines }) => sum + lines.flat().length, 0),
    revision,
  };
}

async function presentOutlines(state: State): Promise<CoastJob['blocks']> {
  const shape = await loadShapes(state.outlines.map(({ sha256 }) => sha256));
  const present = state.blocks.filter(({ disappears_ma }) => !disappears_ma);
  return present
    .map(({ code, outlines }) => ({
      code,
      outlines: outlines
        .filter(({ outline_younger_ma }) => !outline_younger_ma)
        .map(({ sha256, inside }) => ({ geometry: shape(sha256) as Polygon | MultiPolygon, inside })),
    }))
    .filter(({ outlines }) => outlines.length > 0);
}

const removals = (state: State): Edit[] =>
  state.features
    .filter(({ kind, source }) => kind === 'layer' && source === COAST_SOURCE)
    .map(({ id }) => ({ op: 'delete', table: 'features', id }));

function creation(state: State, { code, lines }: CutCoast): Edit {
  const name = `${state.blocks.find((block) => block.code === code)?.name ?? code}, present coast`;
  const geometry = { type: 'MultiLineString', coordinates: lines };
  return {
    op: 'create',
    table: 'features',
    fields: { block: code, kind: 'layer', name, source: COAST_SOURCE, geometry },
  };
}

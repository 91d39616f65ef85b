/** What the workbench's page reads before it is drawn. */
import { loadState, type State } from '~/features/ledger/state';
import type { Project } from '~/features/projects/contract';
import { may } from '~/server/access';
import { openPage } from '~/server/page';
import { Problem } from '~/server/problem';
import { queryVersion } from '~/server/queries';
import type { WorkbenchIslandProps } from './components/WorkbenchIsland';
import type { Payload } from './components/pictures/payload';
import { modelOf } from './model';

/** Larger states than this are fetched by the island, so that the page itself stays light. */
const MOST_ROWS = 3000;

interface Opened extends Pick<WorkbenchIslandProps, 'version' | 'initial' | 'readOnly'> {
  readonly project: Project;
}

/** @returns null where the actor may not see the project, or no such version. */
export async function openWorkbench(
  locals: App.Locals,
  slug: string | undefined,
  asked: string | null,
): Promise<Opened | null> {
  const opened = await openPage(locals, slug, 'project.view');
  if (!opened) return null;
  const requested = queryVersion.safeParse(asked ?? undefined);
  if (!requested.success) {
    locals.refused = noVersion(opened.project.slug, asked);
    return null;
  }
  try {
    const state = await loadState(opened.access, requested.data);
    const { version, revision, blocks, features, directions, rotations } = state;
    const initial = {
      motions: { ...modelOf(state), version, revision },
      tables: { blocks, features, directions },
    };
    const light = rotations.length + features.length + directions.length <= MOST_ROWS;
    const readOnly =
      version !== 'draft'
        ? 'A released version is frozen.'
        : may(opened.access, 'ledger.edit')
          ? null
          : 'Leads and researchers of the project edit.';
    return { project: opened.project, version, readOnly, ...(light ? { initial } : {}) };
  } catch (error) {
    if (!(error instanceof Problem)) throw error;
    locals.refused = noVersion(opened.project.slug, asked);
    return null;
  }
}

/** What is said in place of a version that is not there, or not for the actor to see. */
export const noVersion = (slug: string, asked: string | null | undefined) => ({
  words: asked
    ? `The project has no version ${asked.slice(0, 20)} that you can see.`
    : 'No version is released yet.',
  slug,
});

/** What the picture islands draw from: one state of a project as plain data. */
export const payloadOf = (title: string, state: State): Payload => ({
  title,
  model: modelOf(state),
  blocks: state.blocks,
  features: state.features,
  directions: state.directions,
});

/**
 * How a page opens a project: the actor's project for an action, or nothing, which the page answers as 404; where the
 * actor may see the project, the reason is kept for that page to say.
 */
import type { Project } from '~/features/projects/contract';
import { readProject } from '~/features/projects/server';
import type { Access } from './access';
import { openProject } from './access';
import type { ProjectAction } from './policy';
import { Problem } from './problem';

export interface OpenedPage {
  readonly access: Access;
  readonly project: Project;
}

/** @returns null where the actor may not see the project or may not do this in it. */
export async function openPage(
  locals: App.Locals,
  slug: string | undefined,
  action: ProjectAction,
): Promise<OpenedPage | null> {
  try {
    const access = await openProject(locals.actor, slug ?? '', action);
    return { access, project: await readProject(access) };
  } catch (error) {
    if (!(error instanceof Problem) || (error.name !== 'NotFound' && error.name !== 'Forbidden')) throw error;
    if (error.name === 'Forbidden') locals.refused = { words: error.message, slug: slug ?? '' };
    return null;
  }
}

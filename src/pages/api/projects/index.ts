import { z } from 'zod';
import { createProject, project, projectList } from '~/features/projects/contract';
import { listProjects, makeProject } from '~/features/projects/server';
import { queryPage } from '~/server/queries';
import { route } from '~/server/route';

const query = z.object({ ...queryPage, mine: z.stringbool().optional() });

export const GET = route(
  { action: 'project.list', summary: 'My projects and the public ones', query, answer: projectList },
  ({ actor, query: { limit, cursor, mine } }) =>
    listProjects(actor, { limit, cursor, ...(mine === undefined ? {} : { mine }) }),
);

export const POST = route(
  {
    action: 'project.create',
    summary: 'Make a project and lead it',
    body: createProject,
    answer: project,
    status: 201,
  },
  ({ actor, body }) => makeProject(actor, body),
);

import { patchProject, project } from '~/features/projects/contract';
import { changeProject, deleteProject, readProject } from '~/features/projects/server';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  { action: 'project.view', summary: 'A project, and what I may do in it', answer: project },
  ({ access }) => readProject(access),
);

export const PATCH = projectRoute(
  {
    action: 'project.settings',
    summary: 'Change title, summary, visibility, licence',
    body: patchProject,
    answer: project,
  },
  ({ access, body }) => changeProject(access, body),
);

export const DELETE = projectRoute(
  { action: 'project.delete', summary: 'Delete a project that has released nothing', status: 204 },
  ({ access }) => deleteProject(access).then(() => undefined),
);

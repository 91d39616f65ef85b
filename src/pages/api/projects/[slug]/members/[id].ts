import { members, patchMember } from '~/features/projects/contract';
import { changeRole, listMembers, removeMember } from '~/features/projects/team';
import { projectRoute } from '~/server/route';

export const PATCH = projectRoute(
  { action: 'team.manage', summary: 'Change a member’s role', body: patchMember, answer: members },
  async ({ access, params, body }) => {
    await changeRole(access, params['id']!, body.role);
    return { items: await listMembers(access) };
  },
);

export const DELETE = projectRoute(
  { action: 'team.leave', summary: 'Remove a member, or leave', status: 204 },
  ({ access, params }) => removeMember(access, params['id']!).then(() => undefined),
);

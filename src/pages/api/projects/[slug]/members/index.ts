import { addMember, member, members } from '~/features/projects/contract';
import { joinMember, listMembers } from '~/features/projects/team';
import { projectRoute } from '~/server/route';

export const GET = projectRoute(
  { action: 'team.view', summary: 'The team', answer: members },
  async ({ access }) => ({ items: await listMembers(access) }),
);

export const POST = projectRoute(
  {
    action: 'team.manage',
    summary: 'Take someone who has an account into the team',
    body: addMember,
    answer: member,
    status: 201,
  },
  ({ access, body }) => joinMember(access, body),
);

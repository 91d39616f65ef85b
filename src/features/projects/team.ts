import { and, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { database, type Transaction } from '~/db/client';
import { membership, project, user } from '~/db/schema';
import { byEmail } from '~/features/accounts/server';
import { demand, may, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { countTry } from '~/server/rate-limit';
import type { addMember, Member, Role } from './contract';
import { keepsALead } from './rules';

/** Leads first, then as they joined. */
export async function listMembers(access: Access): Promise<Member[]> {
  demand(access, 'team.view');
  const rows = await database()
    .select({
      id: user.id,
      name: user.name,
      email: user.email,
      role: membership.role,
      at: membership.created_at,
    })
    .from(membership)
    .innerJoin(user, eq(user.id, membership.user_id))
    .where(eq(membership.project_id, access.project.id))
    .orderBy(membership.created_at, user.name);
  const emails = may(access, 'team.emails');
  return rows.map(({ id, name, email, role, at }) => ({
    id,
    name,
    email: emails ? email : null,
    role,
    joined_at: at.toISOString(),
  }));
}

/** Takes someone who has an account into the team. @throws Problem `UnknownAccount` or `AlreadyMember` */
export async function joinMember(
  access: Access,
  { email, role }: z.output<typeof addMember>,
): Promise<Member> {
  demand(access, 'team.manage');
  await countTry('team by account', access.actor.user!.id);
  const [found] = await database().select().from(user).where(byEmail(email));
  if (!found) throw new Problem('UnknownAccount', { detail: 'Ask them to make an account first.' });
  const [row] = await database()
    .insert(membership)
    .values({ project_id: access.project.id, user_id: found.id, role })
    .returning();
  return {
    id: found.id,
    name: found.name,
    email: found.email,
    role,
    joined_at: row!.created_at.toISOString(),
  };
}

/** @throws Problem `NotFound` or `LastLead` */
export async function changeRole(access: Access, userId: string, role: Role): Promise<void> {
  demand(access, 'team.manage');
  await changeTeam(access, (tx) =>
    tx.update(membership).set({ role }).where(isMember(access, userId)).returning({ id: membership.user_id }),
  );
}

/** A lead removes anyone; everyone may leave. @throws Problem `NotFound` or `LastLead` */
export async function removeMember(access: Access, userId: string): Promise<void> {
  demand(access, userId === access.actor.user?.id ? 'team.leave' : 'team.manage');
  await changeTeam(access, (tx) =>
    tx.delete(membership).where(isMember(access, userId)).returning({ id: membership.user_id }),
  );
}

const isMember = ({ project: { id } }: Access, userId: string) =>
  and(eq(membership.project_id, id), eq(membership.user_id, userId));

/** The project's row is locked meanwhile, so that two leads cannot both be the last to go. */
function changeTeam(access: Access, change: (tx: Transaction) => Promise<{ id: string }[]>): Promise<void> {
  return database().transaction(async (tx) => {
    const { id } = access.project;
    await tx.select({ id: project.id }).from(project).where(eq(project.id, id)).for('update');
    if ((await change(tx)).length === 0) throw new Problem('NotFound');
    const left = await tx
      .select({ role: membership.role })
      .from(membership)
      .where(eq(membership.project_id, id));
    if (!keepsALead(left.map(({ role }) => role))) {
      throw new Problem('LastLead', { detail: 'Make someone else a lead first.' });
    }
  });
}

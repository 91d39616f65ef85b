import type { Role } from '~/features/projects/contract';
import type { Actor } from './actor';
import { Problem } from './problem';

const everyone: readonly Role[] = ['lead', 'researcher', 'reviewer', 'instructor'];
const builders: readonly Role[] = ['lead', 'researcher'];
const leads: readonly Role[] = ['lead'];

interface ProjectRule {
  readonly roles: readonly Role[];
  /** Which projects let those do it who have no role: signed in elsewhere, or not at all. */
  readonly visitors?: 'of public projects' | 'where the draft is public';
  readonly changes?: true;
}

/** Who may do what in a project. `link` visibility opens nothing by itself: its links carry their own right. */
export const PROJECT_POLICY = {
  'project.view': { roles: everyone, visitors: 'of public projects' },
  'version.view': { roles: everyone, visitors: 'of public projects' },
  'draft.view': { roles: everyone, visitors: 'where the draft is public' },
  'team.view': { roles: everyone, visitors: 'of public projects' },
  'team.emails': { roles: everyone },
  'history.view': { roles: everyone },
  export: { roles: everyone, visitors: 'of public projects' },
  compute: { roles: everyone, visitors: 'of public projects' },
  /** Minutes of computing are for who has a name here. */
  'job.start': { roles: everyone },
  'ledger.edit': { roles: builders, changes: true },
  import: { roles: builders, changes: true },
  'sheet.edit': { roles: ['lead', 'researcher', 'instructor'], changes: true },
  'version.release': { roles: leads, changes: true },
  'team.manage': { roles: leads, changes: true },
  'team.leave': { roles: everyone, changes: true },
  'project.settings': { roles: leads, changes: true },
  'project.delete': { roles: leads, changes: true },
} as const satisfies Record<string, ProjectRule>;

interface SiteRule {
  readonly to: 'anyone' | 'signed in' | 'site admin';
  /** Changes what the account is; a token, which lives in scripts, never may. */
  readonly inPersonOnly?: true;
  readonly changes?: true;
}

/** Who may do what outside a project. */
export const SITE_POLICY = {
  public: { to: 'anyone' },
  'account.view': { to: 'signed in' },
  'account.manage': { to: 'signed in', inPersonOnly: true, changes: true },
  'project.list': { to: 'anyone' },
  'project.create': { to: 'signed in', changes: true },
  'geometry.view': { to: 'anyone' },
  'job.own': { to: 'signed in' },
  'admin.outbox': { to: 'site admin', inPersonOnly: true },
} as const satisfies Record<string, SiteRule>;

export type ProjectAction = keyof typeof PROJECT_POLICY;
export type SiteAction = keyof typeof SITE_POLICY;
export type Action = ProjectAction | SiteAction;
export const PROJECT_ACTIONS = Object.keys(PROJECT_POLICY) as ProjectAction[];

/** What the policy has to know of a project. */
export interface Standing {
  readonly visibility: 'private' | 'link' | 'public';
  readonly draft_public: boolean;
  /** The caller's role; null without one. */
  readonly role: Role | null;
}

/** May the actor do this in the project? A read token may change nothing. */
export function can(
  actor: Actor,
  action: ProjectAction,
  { visibility, draft_public, role }: Standing,
): boolean {
  const rule: ProjectRule = PROJECT_POLICY[action];
  if (rule.changes && actor.scope === 'read') return false;
  if (role) return rule.roles.includes(role);
  if (visibility !== 'public' || !rule.visitors) return false;
  return rule.visitors === 'of public projects' || draft_public;
}

/** @throws Problem `NotFound` for a project the actor may not see, `Forbidden` or `ReadOnlyToken` for one it may. */
export function requireCan(actor: Actor, action: ProjectAction, standing: Standing): void {
  if (can(actor, action, standing)) return;
  if (!can(actor, 'project.view', standing)) throw new Problem('NotFound');
  if (can({ ...actor, scope: 'write' }, action, standing))
    throw new Problem('ReadOnlyToken', {
      detail: 'Make a token with the scope "write" in the account page.',
    });
  throw new Problem('Forbidden', {
    detail: actor.user ? refusal(action, standing.role) : `You are not signed in. ${refusal(action, null)}`,
  });
}

/** A button that cannot act says why beside it. */
export function refusal(action: ProjectAction, role: Role | null): string {
  const { roles } = PROJECT_POLICY[action];
  return `This takes the role ${roles.join(' or ')}; ${role ? `yours is ${role}` : 'you are not in the team'}.`;
}

/** @throws Problem `SignInRequired`, `ReadOnlyToken` or `Forbidden` */
export function requireSite(actor: Actor, action: SiteAction): void {
  const rule: SiteRule = SITE_POLICY[action];
  if (rule.to === 'anyone') return;
  if (!actor.user) throw new Problem('SignInRequired');
  if (rule.inPersonOnly && actor.via === 'token')
    throw new Problem('Forbidden', { detail: 'This is done signed in, not with a token.' });
  if (rule.changes && actor.scope === 'read') throw new Problem('ReadOnlyToken');
  if (rule.to === 'site admin' && actor.user.site_role !== 'admin')
    throw new Problem('Forbidden', { detail: 'This takes the site role admin.' });
}

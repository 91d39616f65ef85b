/** The title block's data of one project page, made on the server. */
import { paths } from '../../../../paths';
import type { Project } from '../../../projects/contract';
import { count } from '../../format';
import type { Head } from './head';

interface User {
  readonly name: string;
  readonly email: string;
  readonly site_role?: string | null | undefined;
}

export function headOf(project: Project, version: 'draft' | number, user: User | null, here: string): Head {
  const { slug, can, latest_version: latest } = project;
  const pages = [
    { id: 'overview', label: 'Overview', href: paths.overview(slug) },
    { id: 'workbench', label: 'Workbench', href: paths.workbench(slug) },
    { id: 'print', label: 'Print', href: paths.print(slug) },
    ...(can['import'] ? [{ id: 'import', label: 'Import', href: paths.import(slug) }] : []),
    { id: 'versions', label: 'Versions', href: paths.versions(slug) },
    { id: 'sources', label: 'Sources', href: paths.sources(slug) },
    ...(can['history.view'] ? [{ id: 'history', label: 'History', href: paths.history(slug) }] : []),
    { id: 'team', label: 'Team', href: paths.team(slug) },
    ...(can['project.settings'] ? [{ id: 'settings', label: 'Settings', href: paths.settings(slug) }] : []),
  ];
  const since = latest
    ? `${count(project.changes_since_version, 'change')} since v${latest.number}`
    : 'no version released yet';
  const draft = { id: 'draft', label: 'Draft', detail: since, href: paths.workbench(slug) };
  const newest = latest && {
    id: `v${latest.number}`,
    label: `v${latest.number}`,
    detail: latest.title,
    href: paths.workbench(slug, `?version=${latest.number}`),
  };
  return {
    title: project.title,
    home: paths.home,
    pages,
    version: {
      value: version === 'draft' ? 'Draft' : `v${version}`,
      detail:
        version === 'draft'
          ? since
          : `frozen${newest && version === latest?.number ? `, ${hash(latest.sha256)}` : ''}`,
      choices: [
        ...(can['draft.view'] ? [draft] : []),
        ...(newest ? [newest] : []),
        { id: 'versions', label: 'All versions', href: paths.versions(slug) },
      ],
    },
    shown: version,
    frozen: version !== 'draft',
    print: paths.print(slug),
    signIn: paths.signIn(here),
    account: user && { name: user.name, email: user.email, links: accountLinks(user) },
  };
}

/** "d630 be0a": enough of a hash to tell versions apart by eye. */
export const hash = (sha256: string): string => `${sha256.slice(0, 4)} ${sha256.slice(4, 8)}`;

function accountLinks({ site_role }: User) {
  return [
    { id: 'projects', label: 'Your projects', href: paths.projects },
    { id: 'account', label: 'Account and sessions', href: paths.account },
    ...(site_role === 'admin' ? [{ id: 'admin', label: 'Site: mail and health', href: paths.admin }] : []),
    { id: 'sign-out', label: 'Sign out' },
  ];
}

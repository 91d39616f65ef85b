/** Every address of the site, so that a link is never spelt by hand. */
const project = (slug: string): string => `/projects/${encodeURIComponent(slug)}`;

export const paths = {
  home: '/',
  signIn: (next?: string) => (next ? `/sign-in?next=${encodeURIComponent(next)}` : '/sign-in'),
  signUp: '/sign-up',
  forgotten: '/reset',
  reset: (token: string) => `/reset/${encodeURIComponent(token)}`,
  account: '/account',
  projects: '/projects',
  newProject: '/projects/new',
  released: '/released',
  methods: '/methods',
  apiReference: '/docs/api',
  admin: '/admin',
  overview: project,
  workbench: (slug: string, query = '') => `${project(slug)}/workbench${query}`,
  import: (slug: string) => `${project(slug)}/import`,
  print: (slug: string, query = '') => `${project(slug)}/print${query}`,
  versions: (slug: string) => `${project(slug)}/versions`,
  history: (slug: string) => `${project(slug)}/history`,
  sources: (slug: string) => `${project(slug)}/sources`,
  team: (slug: string) => `${project(slug)}/team`,
  settings: (slug: string) => `${project(slug)}/settings`,
} as const;

/** A local address to return to after signing in, or the fallback where it leads elsewhere. */
export function localPath(next: string | null | undefined, fallback: string): string {
  return next && /^\/(?![/\\])[^\s\\]*$/.test(next) ? next : fallback;
}

import type { APIRoute } from 'astro';
import type { DescribedRoute } from '~/server/route';

type Endpoint = Readonly<Record<string, APIRoute | DescribedRoute>>;

/** Every endpoint file of the site, as the framework would find them. */
const FILES = import.meta.glob<Endpoint>('/src/pages/api/**/*.ts');

export interface ApiFile {
  /** As in the API reference: /api/projects/[slug]/blocks */
  readonly pattern: string;
  readonly load: () => Promise<Endpoint>;
  readonly match: (pathname: string) => Record<string, string> | null;
}

const patternOf = (file: string) => file.replace('/src/pages', '').replace(/(\/index)?\.ts$/, '');

/** Static segments before dynamic ones, those before rest parameters: the framework's order of routes. */
function rank(pattern: string): string {
  return pattern
    .split('/')
    .map((segment) => (segment.includes('[...') ? '2' : segment.includes('[') ? '1' : '0'))
    .join('');
}

function matcher(pattern: string): ApiFile['match'] {
  const names: string[] = [];
  const source = pattern.replace(
    /\[(\.\.\.)?(\w+)\]|[.*+?^${}()|\\]/g,
    (found, rest: string | undefined, name?: string) => {
      if (!name) return `\\${found}`;
      names.push(name);
      return rest ? '(.*?)' : '([^/]+?)';
    },
  );
  const regex = new RegExp(`^${source}/?$`);
  return (pathname) => {
    const found = regex.exec(pathname);
    return found && Object.fromEntries(names.map((name, i) => [name, decodeURIComponent(found[i + 1]!)]));
  };
}

export const API_FILES: readonly ApiFile[] = Object.entries(FILES)
  .map(([file, load]) => ({ pattern: patternOf(file), load, match: matcher(patternOf(file)) }))
  .sort((a, b) =>
    rank(a.pattern) < rank(b.pattern)
      ? -1
      : rank(a.pattern) > rank(b.pattern)
        ? 1
        : b.pattern.length - a.pattern.length,
  );

export const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE', 'ALL'] as const;

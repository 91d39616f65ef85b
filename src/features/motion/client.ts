/** What the workbench asks of the server, as queries: outlines once by hash, the rest by project and version. */
import { QueryClient, useQueries, useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { type Block, type Direction, type Feature } from '../ledger/contract';
import { type Project } from '../projects/contract';
import { type MotionsAnswer } from './contract';
import { decodeShape, type Decoded } from './scene/decode';
import { sceneOf, type Scene } from './scene/scene';

export type Version = 'draft' | number;

/** A problem document of the server (RFC 9457) as an error. */
export class AnswerError extends Error {
  constructor(
    readonly status: number,
    title: string,
    readonly detail: string,
  ) {
    super(title);
  }
}

async function answerOf(address: string, accept = 'application/json'): Promise<Response> {
  const response = await fetch(address, { headers: { accept }, credentials: 'same-origin' });
  if (response.ok) return response;
  const problem = (await response.json().catch(() => ({}))) as { title?: string; detail?: string };
  throw new AnswerError(response.status, problem.title ?? 'The server did not answer', problem.detail ?? '');
}

export async function getJson<T>(address: string): Promise<T> {
  return (await answerOf(address)).json() as Promise<T>;
}

interface Page<T> {
  readonly items: readonly T[];
  readonly next_cursor: string | null;
}

/** All pages of a list. */
export async function getAll<T>(address: string): Promise<T[]> {
  const items: T[] = [];
  for (let cursor: string | null = ''; cursor !== null;) {
    const page: Page<T> = await getJson(
      `${address}&limit=500${cursor ? `&cursor=${encodeURIComponent(cursor)}` : ''}`,
    );
    items.push(...page.items);
    cursor = page.next_cursor;
  }
  return items;
}

export const api = (slug: string, path: string, version: Version): string =>
  `/api/projects/${encodeURIComponent(slug)}/${path}?version=${version}`;

/** A numbered version never changes; the draft is asked for again when the page is looked at again. */
const fresh = (version: Version) => ({ staleTime: version === 'draft' ? 0 : Infinity });

export const keys = {
  project: (slug: string) => ['project', slug] as const,
  table: (slug: string, version: Version, table: string) => ['project', slug, version, table] as const,
  geometry: (sha256: string, inside: string) => ['geometry', sha256, inside] as const,
};

export const useProject = (slug: string, initial?: Project) =>
  useQuery({
    queryKey: keys.project(slug),
    queryFn: () => getJson<Project>(`/api/projects/${encodeURIComponent(slug)}`),
    ...(initial ? { initialData: initial } : {}),
  });

export function useTable<T>(slug: string, version: Version, table: string) {
  return useQuery({
    queryKey: keys.table(slug, version, table),
    queryFn: () => getAll<T>(api(slug, table, version)),
    ...fresh(version),
  });
}

export const useMotions = (slug: string, version: Version) =>
  useQuery({
    queryKey: keys.table(slug, version, 'motions'),
    queryFn: () => getJson<MotionsAnswer>(api(slug, 'motions', version)),
    ...fresh(version),
  });

async function getShape(sha256: string, inside: 'smaller' | 'larger'): Promise<Decoded> {
  const answer = await answerOf(`/api/geometry/${sha256}`, 'application/octet-stream');
  return decodeShape(new Uint8Array(await answer.arrayBuffer()), inside);
}

interface Wanted {
  readonly sha256: string;
  readonly inside: 'smaller' | 'larger';
}

const nameOf = ({ sha256, inside }: Wanted): string => `${sha256} ${inside}`;

/** Shapes by hash and inside, as they arrive. */
export function useShapes(wanted: readonly Wanted[]): {
  shapes: ReadonlyMap<string, Decoded>;
  missing: number;
  error: Error | null;
} {
  const unique = useMemo(() => [...new Map(wanted.map((want) => [nameOf(want), want])).values()], [wanted]);
  return useQueries({
    queries: unique.map((want) => ({
      queryKey: keys.geometry(want.sha256, want.inside),
      queryFn: () => getShape(want.sha256, want.inside),
      staleTime: Infinity,
      gcTime: Infinity,
    })),
    combine: (results) => ({
      shapes: new Map(
        results.flatMap(({ data }, i) => (data && unique[i] ? [[nameOf(unique[i]), data] as const] : [])),
      ),
      missing: results.filter(({ data }) => !data).length,
      error: results.find(({ error }) => error)?.error ?? null,
    }),
  });
}

export interface SceneAnswer {
  readonly scene: Scene | null;
  /** Outlines still on their way. */
  readonly missing: number;
  readonly error: Error | null;
  readonly retry: () => void;
}

/** The scene of one state of a project; drawn as soon as motions and lists are there, outlines as they come. */
export function useScene(slug: string, version: Version, title: string): SceneAnswer {
  const motions = useMotions(slug, version);
  const blocks = useTable<Block>(slug, version, 'blocks');
  const features = useTable<Feature>(slug, version, 'features');
  const directions = useTable<Direction>(slug, version, 'directions');
  const wanted = useMemo(
    (): Wanted[] => [
      ...(blocks.data ?? []).flatMap(({ outlines }) =>
        outlines.map(({ sha256, inside }) => ({ sha256, inside })),
      ),
      ...(features.data ?? []).map(({ sha256 }) => ({ sha256, inside: 'smaller' as const })),
    ],
    [blocks.data, features.data],
  );
  const { shapes, missing, error } = useShapes(wanted);
  const scene = useMemo(() => {
    if (!motions.data || !blocks.data || !features.data || !directions.data) return null;
    return assemble(title, motions.data, blocks.data, features.data, directions.data, shapes);
  }, [title, motions.data, blocks.data, features.data, directions.data, shapes]);
  const failed = [motions, blocks, features, directions].filter((query) => query.error);
  return {
    scene,
    missing,
    error: failed[0]?.error ?? error,
    retry: () => failed.forEach((query) => void query.refetch()),
  };
}

function assemble(
  title: string,
  model: MotionsAnswer,
  blocks: readonly Block[],
  features: readonly Feature[],
  directions: readonly Direction[],
  shapes: ReadonlyMap<string, Decoded>,
): Scene {
  return sceneOf({
    title,
    model,
    directions,
    blocks: blocks.map(({ code, name, kind, evidence, outlines }) => ({
      ...{ code, name, kind, evidence },
      outlines: outlines.flatMap(
        ({ outline_older_ma: older_ma, outline_younger_ma: younger_ma, ...want }) => {
          const shape = shapes.get(nameOf(want))?.shape;
          return shape ? [{ shape, older_ma, younger_ma }] : [];
        },
      ),
    })),
    lines: features.flatMap((feature) => {
      const shape = shapes.get(nameOf({ sha256: feature.sha256, inside: 'smaller' }))?.shape;
      return shape ? [{ ...feature, shape }] : [];
    }),
    points: features.flatMap((feature) => {
      const found = shapes.get(nameOf({ sha256: feature.sha256, inside: 'smaller' }));
      return found && !found.shape ? [{ ...feature, lat: found.lat, lon: found.lon }] : [];
    }),
  });
}

export const createClient = (): QueryClient =>
  new QueryClient({ defaultOptions: { queries: { retry: 1, refetchOnWindowFocus: true } } });

/** What the workbench asks of the server, as queries: outlines once by hash, the rest by project and version. */
import { keepPreviousData, QueryClient, useQuery, useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Model } from '../../kernel/rotations/types';
import type { Block, Direction, Feature } from '../ledger/contract';
import type { Project } from '../projects/contract';
import type { MotionsAnswer } from './contract';
import { NOT_YET } from './globe/shape';
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
const fresh = (version: Version) => ({ staleTime: version === 'draft' ? DRAFT_FRESH_MS : Infinity });
const DRAFT_FRESH_MS = 5_000;

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

/** The geometries that a state's outlines and features name. */
export const wantedBy = (blocks: readonly Block[], features: readonly Feature[]): Wanted[] => [
  ...blocks.flatMap(({ outlines }) => outlines.map(({ sha256, inside }) => ({ sha256, inside }))),
  ...features.map(({ sha256 }) => ({ sha256, inside: 'smaller' as const })),
];

interface Progress {
  readonly arrived: number;
  readonly wanted: number;
}

const UNKNOWN: Progress = { arrived: 0, wanted: 0 };
const PROGRESS = ['geometry', 'progress'] as const;

interface Shapes {
  readonly shapes: ReadonlyMap<string, Decoded>;
  /** Those that could not be fetched. */
  readonly lost: number;
}

const NONE: Shapes = { shapes: new Map(), lost: 0 };

/** Shapes by hash and inside. Each is fetched once, however the list changes; the picture is made anew once, not for each. */
export function useShapes(wanted: readonly Wanted[]): Shapes & Progress & { waiting: boolean } {
  const client = useQueryClient();
  const unique = useMemo(() => [...new Map(wanted.map((want) => [nameOf(want), want])).values()], [wanted]);
  const { data = NONE, isFetching } = useQuery({
    queryKey: ['geometry', unique.map(nameOf)],
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    queryFn: async (): Promise<Shapes> => {
      let arrived = 0;
      const tell = () => client.setQueryData<Progress>(PROGRESS, { arrived, wanted: unique.length });
      tell();
      const answers = await Promise.allSettled(
        unique.map(({ sha256, inside }) =>
          client
            .fetchQuery({
              queryKey: keys.geometry(sha256, inside),
              queryFn: () => getShape(sha256, inside),
              staleTime: Infinity,
              gcTime: Infinity,
            })
            .finally(() => {
              arrived++;
              tell();
            }),
        ),
      );
      const shapes = new Map<string, Decoded>();
      answers.forEach((answer, i) => {
        const want = unique[i];
        if (answer.status === 'fulfilled' && want) shapes.set(nameOf(want), answer.value);
      });
      return { shapes, lost: unique.length - shapes.size };
    },
  });
  const { data: progress = UNKNOWN } = useQuery<Progress>({
    queryKey: PROGRESS,
    queryFn: () => UNKNOWN,
    enabled: false,
  });
  return { ...data, ...progress, waiting: isFetching };
}

export interface SceneAnswer {
  readonly scene: Scene | null;
  /** True while outlines are on their way. */
  readonly waiting: boolean;
  readonly arrived: number;
  readonly wanted: number;
  /** Outlines that could not be fetched. */
  readonly lost: number;
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
    () => wantedBy(blocks.data ?? [], features.data ?? []),
    [blocks.data, features.data],
  );
  const { shapes, lost, ...progress } = useShapes(wanted);
  const scene = useMemo(() => {
    if (!motions.data || !blocks.data || !features.data || !directions.data) return null;
    return assemble(title, motions.data, blocks.data, features.data, directions.data, shapes);
  }, [title, motions.data, blocks.data, features.data, directions.data, shapes]);
  const failed = [motions, blocks, features, directions].filter((query) => query.error);
  return {
    scene,
    ...progress,
    lost,
    error: failed[0]?.error ?? null,
    retry: () => failed.forEach((query) => void query.refetch()),
  };
}

/** A scene from lists and the shapes that have arrived. */
export function assemble(
  title: string,
  model: Model,
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
      outlines: outlines.map(({ outline_older_ma: older_ma, outline_younger_ma: younger_ma, ...want }) => ({
        ...{ older_ma, younger_ma },
        shape: shapes.get(nameOf(want))?.shape ?? NOT_YET,
      })),
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

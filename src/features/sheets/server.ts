/** Time slices of a state: the page as SVG, PNG or PDF, and the same positions as GeoJSON. */
import { loadShapes } from '~/features/ledger/shapes';
import { loadState, type State } from '~/features/ledger/state';
import { modelOf } from '~/features/motion/model';
import { driftPath } from '~/features/motion/scene/tolerant';
import { openingFrame } from '~/features/motion/usual-frame';
import { shortHash } from '~/features/versions/hash';
import type { DriftPoint } from '~/kernel/rotations';
import { createIndex, requireBlock } from '~/kernel/rotations/model-index';
import { demand, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { runInWorker } from '~/server/workers';
import { coordinates } from '~/features/motion/format';
import type { SliceQuery } from './contract';
import type { RenderJob } from './render.task';
import renderTask from './render.task.ts?nodeworker';
import { carry } from './slice/carried';
import { drawnOf, type SlicePath } from './slice/drawn';
import { sliceGeojson } from './slice/geojson';
import { sliceFileName } from './slice/file-name';
import { slicePage, type Page } from './slice/page';
import { pathSources } from './slice/sources';
import type { SliceSubject } from './slice/subject';

export const SLICE_FORMATS = {
  svg: 'image/svg+xml',
  png: 'image/png',
  pdf: 'application/pdf',
  geojson: 'application/geo+json',
} as const;
export type SliceFormat = keyof typeof SLICE_FORMATS;

export interface Slice {
  readonly body: string | Uint8Array;
  readonly name: string;
  readonly state: State;
}

const day = new Intl.DateTimeFormat('en-GB', {
  day: 'numeric',
  month: 'long',
  year: 'numeric',
  timeZone: 'UTC',
});

/** @throws KernelError for an unknown frame or block, Problem where the version may not be seen */
export async function drawSlice(
  access: Access,
  query: SliceQuery,
  format: SliceFormat,
  signal?: AbortSignal,
): Promise<Slice> {
  demand(access, 'compute');
  const state = await loadState(access, query.version);
  const subject = await subjectOf(access, state, query);
  const carried = carry(subject, query.age_ma, subject.frame.code);
  const name = sliceFileName(access.project.slug, String(state.version), query.age_ma, format);
  const path = pathOf(subject, query);
  if (format === 'geojson') {
    const drawn = drawnOf(carried, path, query.layers, null);
    return { body: JSON.stringify(sliceGeojson(subject, drawn, query)), name, state };
  }
  const page = slicePage({ subject, carried, query, path });
  if (format === 'svg') return { body: page.svg, name, state };
  return { body: await render(page, format, query, subject.title, signal), name, state };
}

function render(
  page: Page,
  format: 'png' | 'pdf',
  query: SliceQuery,
  title: string,
  signal?: AbortSignal,
): Promise<Uint8Array> {
  return runInWorker<RenderJob, Uint8Array>(renderTask, { ...page, format, dpi: query.dpi, title }, signal);
}

async function subjectOf(access: Access, state: State, query: SliceQuery): Promise<SliceSubject> {
  const model = modelOf(state);
  const code = query.relative_to ?? openingFrame(model, access.project.held_still) ?? '';
  requireBlock(model, code, 'relative_to');
  const frame = state.blocks[createIndex(model).get(code)!]!;
  const coasts = state.features.filter((feature) => feature.kind === 'layer');
  const hashes = [...state.outlines, ...coasts].map((row) => row.sha256);
  return {
    title: access.project.title,
    version:
      state.sha256 === null
        ? `Draft, revision ${state.revision}`
        : `Version ${state.version}, sha256 ${shortHash(state.sha256)}`,
    licence: access.project.licence,
    date: day.format(new Date()),
    model,
    frame: { code: frame.code, name: frame.name },
    blocks: state.blocks,
    coasts,
    geometryOf: await loadShapes(hashes),
  };
}

function pathOf(subject: SliceSubject, query: SliceQuery): SlicePath | null {
  const { path_block: block, path_lat: lat, path_lon: lon, path_step_ma: step_ma } = query;
  if (block === undefined && lat === undefined && lon === undefined) return null;
  if (block === undefined || lat === undefined || lon === undefined) {
    const path = block === undefined ? 'path_block' : lat === undefined ? 'path_lat' : 'path_lon';
    const problem =
      'missing: a drift path takes a block and a point of it, path_block, path_lat and path_lon';
    throw new Problem('InvalidQuery', { detail: problem, errors: [{ path, read: '', problem }] });
  }
  const { model, frame } = subject;
  const between = (younger_ma: number, older_ma: number): DriftPoint[] =>
    driftPath(model, { block, lat, lon, younger_ma, older_ma, step_ma, relative_to: frame.code });
  const points = between(0, Math.max(model.oldest_ma, step_ma));
  const [here = null] = between(query.age_ma, query.age_ma);
  const name = subject.blocks.find((one) => one.code === block)?.name ?? block;
  const sources = pathSources(model, block, points, frame.code);
  return { block, name: `${name} at ${coordinates(lat, lon)}`, points, here, sources };
}

/** What the print page reads before it is drawn. */
import { loadShapes } from '~/features/ledger/shapes';
import { loadState, type State, type VersionName } from '~/features/ledger/state';
import { modelOf } from '~/features/motion/model';
import { openingFrame } from '~/features/motion/usual-frame';
import type { Project } from '~/features/projects/contract';
import { listVersions } from '~/features/versions/server';
import type { Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { queryVersion } from '~/server/queries';
import type { PrintDeskProps } from './components/PrintDesk';
import { firstAge } from './first-age';
import { sliceFromLink } from './from-workbench';
import { knownPoints } from './known-points';
import { settingsFromLink } from './settings-from-link';

type Query = Readonly<Record<string, string>>;

export interface OpenedPrint {
  readonly version: VersionName;
  /** null where there is nothing to print. */
  readonly desk: PrintDeskProps | null;
}

/** @returns null where the link names no version that the actor may see. */
export async function openPrint(access: Access, project: Project, query: Query): Promise<OpenedPrint | null> {
  const asked = queryVersion.safeParse(query['version']);
  if (!asked.success) return null;
  try {
    const state = await loadState(access, asked.data ?? unasked(project, query));
    const desk = state.blocks.length === 0 ? null : await deskOf(access, project, state, query);
    return { version: state.version, desk };
  } catch (error) {
    if (error instanceof Problem) return null;
    throw error;
  }
}

/** A link of the workbench without a version is of the state that the workbench opens; else the latest release is printed. */
const unasked = (project: Project, query: Query): VersionName | undefined =>
  query['age'] === undefined ? project.latest_version?.number : undefined;

async function deskOf(access: Access, project: Project, state: State, query: Query): Promise<PrintDeskProps> {
  const model = modelOf(state);
  const named = state.blocks.map(({ code, name, kind }) => ({ code, name, kind }));
  const frames = [...named].sort((a, b) => Number(b.kind === 'frame') - Number(a.kind === 'frame'));
  const codes = named.map(({ code }) => code);
  const frame = openingFrame(model, project.held_still) ?? '';
  const rocks = state.features.filter(({ kind }) => kind === 'rock');
  const points = knownPoints(
    state,
    await loadShapes([...rocks, ...state.outlines].map(({ sha256 }) => sha256)),
  );
  const age_ma = firstAge(model, state.blocks, frame);
  const { settings, refused } = settingsFromLink(sliceFromLink(query, points), { age_ma, frame, codes });
  const released = (await listVersions(access)).map(({ number, title }) => ({
    code: String(number),
    name: `v${number}, ${title}`,
  }));
  return {
    slug: project.slug,
    version: String(state.version),
    versions: [...(project.can['draft.view'] ? [{ code: 'draft', name: 'Draft' }] : []), ...released],
    settings,
    refused,
    frames,
    blocks: named.filter(({ kind }) => kind !== 'frame'),
    points,
    oldest_ma: model.oldest_ma,
  };
}

/** The released reconstruction that the site shows to whoever comes: the public project released last, in its newest version. */
import { loadState, type State } from '~/features/ledger/state';
import { modelOf } from '~/features/motion/model';
import { openProject, type Access } from '~/server/access';
import type { Actor } from '~/server/actor';
import type { Project } from './contract';
import { listProjects } from './server';

export interface Showcase {
  readonly project: Project;
  readonly access: Access;
  readonly state: State;
  readonly shown: { readonly age: number; readonly heldStill?: string };
}

/** The age shown first, as a share of the history: late enough for blocks to be apart. */
const SHARE = 0.312;

export const firstAge = (oldest_ma: number): number => Math.round(SHARE * oldest_ma * 10) / 10;

/** @returns null where nothing is released to everyone. */
export async function showcase(actor: Actor): Promise<Showcase | null> {
  const { items } = await listProjects(actor, { limit: 500 });
  const released = items.filter(
    ({ visibility, latest_version }) => visibility === 'public' && latest_version,
  );
  const [project] = released.sort((a, b) =>
    b.latest_version!.released_at.localeCompare(a.latest_version!.released_at),
  );
  if (!project) return null;
  const access = await openProject(actor, project.slug, 'version.view');
  const state = await loadState(access, project.latest_version!.number);
  const heldStill = project.held_still ?? undefined;
  return {
    project,
    access,
    state,
    shown: { age: firstAge(modelOf(state).oldest_ma), ...(heldStill ? { heldStill } : {}) },
  };
}

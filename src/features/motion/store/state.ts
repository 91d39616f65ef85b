/** What a workbench shows, and nothing that can be worked out from it. */
import { createStore, type StoreApi } from 'zustand/vanilla';
import { EVIDENCE, type Evidence, type Model } from '../../../kernel/rotations/types';
import type { Centre } from '../globe/matrix';
import type { Cursor } from '../scene/cursor';

export const VIEWS = ['globe', 'map', 'then-and-now'] as const;
export type View = (typeof VIEWS)[number];

export const DRAWN = ['path', 'ellipse', 'velocity', 'separation', 'coast', 'graticule', 'names'] as const;
export type Drawn = (typeof DRAWN)[number];
export type Layer = Drawn | Evidence;
export const LAYERS: readonly Layer[] = [...DRAWN, ...EVIDENCE];

/** A place on a block, in the block's present coordinates. */
export interface Point {
  readonly lat: number;
  readonly lon: number;
}

/** Span and step of the drift path; null ages mean the present and the oldest rotation. */
export interface PathSpan {
  readonly younger_ma: number | null;
  readonly older_ma: number | null;
  readonly step_ma: number;
}

/** The part that a link restores. */
export interface Linked {
  readonly age: number;
  /** Code of the block or frame held still. */
  readonly heldStill: string;
  /** Code of the selected block. */
  readonly block: string | null;
  /** null: the block's own point, see `scene/points.ts`. */
  readonly point: Point | null;
  readonly view: View;
  readonly centre: Centre;
  readonly zoom: number;
  readonly off: ReadonlySet<Layer>;
  readonly path: PathSpan;
}

/** The part that ends with the gesture or the visit. */
export interface Passing {
  /** True while the age line or the globe is being moved: drawing may be coarser. */
  readonly moving: boolean;
  readonly cursor: Cursor | null;
  /** A model compiled from rows as they are being edited; shown instead of the saved one. */
  readonly draftModel: Model | null;
  readonly open: 'jump' | 'keys' | null;
  /** Strips shown as tables. */
  readonly asTable: boolean;
}

export type WorkbenchState = Linked & Passing;
export type WorkbenchStore = StoreApi<WorkbenchState>;

export const ZOOM = { least: 0.6, most: 24 } as const;

export const LINKED: Linked = {
  age: 0,
  heldStill: '',
  block: null,
  point: null,
  view: 'globe',
  centre: { lat: 0, lon: 0, roll: 0 },
  zoom: 1,
  off: new Set(),
  path: { younger_ma: null, older_ma: null, step_ma: 10 },
};

const PASSING: Passing = { moving: false, cursor: null, draftModel: null, open: null, asTable: false };

export const createWorkbench = (linked: Partial<Linked> = {}): WorkbenchStore =>
  createStore<WorkbenchState>(() => ({ ...LINKED, ...PASSING, ...linked }));

const shared = new Map<string, WorkbenchStore>();

/** One store for all islands of a page that name the same key. On the server every call makes its own. */
export function sharedWorkbench(key: string, linked: Partial<Linked>): WorkbenchStore {
  if (typeof window === 'undefined') return createWorkbench(linked);
  const known = shared.get(key);
  if (known) return known;
  const store = createWorkbench(linked);
  shared.set(key, store);
  return store;
}

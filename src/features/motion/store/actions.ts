/** Every change of a workbench's state, by name. */
import type { Model } from '../../../kernel/rotations/types';
import type { Centre } from '../globe/matrix';
import {
  ZOOM,
  type Layer,
  type Passing,
  type PathSpan,
  type Point,
  type View,
  type WorkbenchStore,
} from './state';

/** Ages are kept to a tenth of a thousand years, so that steps of 0.1 Myr don't drift. */
const tidy = (age: number): number => Math.round(age * 1e4) / 1e4;

export function setAge(store: WorkbenchStore, age: number, oldest: number): void {
  const next = tidy(Math.min(oldest, Math.max(0, age)));
  if (Number.isFinite(next) && next !== store.getState().age) store.setState({ age: next });
}

export const stepAge = (store: WorkbenchStore, by: number, oldest: number): void =>
  setAge(store, store.getState().age + by, oldest);

export const holdStill = (store: WorkbenchStore, code: string): void => store.setState({ heldStill: code });

/** Selects a block, and a point on it or its own point. */
export const select = (store: WorkbenchStore, block: string | null, point: Point | null = null): void =>
  store.setState({ block, point });

export const setView = (store: WorkbenchStore, view: View): void => store.setState({ view, cursor: null });

export const turnTo = (store: WorkbenchStore, centre: Centre): void => store.setState({ centre });

export function zoomTo(store: WorkbenchStore, zoom: number): void {
  store.setState({ zoom: Math.min(ZOOM.most, Math.max(ZOOM.least, zoom)) });
}

export const zoomBy = (store: WorkbenchStore, factor: number): void =>
  zoomTo(store, store.getState().zoom * factor);

export function toggleLayer(store: WorkbenchStore, layer: Layer): void {
  const off = new Set(store.getState().off);
  if (!off.delete(layer)) off.add(layer);
  store.setState({ off });
}

export const setPathSpan = (store: WorkbenchStore, span: Partial<PathSpan>): void =>
  store.setState(({ path }) => ({ path: { ...path, ...span } }));

/** Shows what rows under edit would do; null goes back to the saved rows. */
export const previewModel = (store: WorkbenchStore, draftModel: Model | null): void =>
  store.setState({ draftModel });

export const setMoving = (store: WorkbenchStore, moving: boolean): void => store.setState({ moving });

export const setCursor = (store: WorkbenchStore, cursor: Passing['cursor']): void =>
  store.setState({ cursor });

export const open = (store: WorkbenchStore, what: Passing['open']): void =>
  store.setState((state) => ({ open: state.open === what ? null : what }));

export const toggleTables = (store: WorkbenchStore): void =>
  store.setState(({ asTable }) => ({ asTable: !asTable }));

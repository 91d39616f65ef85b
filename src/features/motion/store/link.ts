/**
 * A link restores version, age, view and selection: `?version=7&age=62.4&frame=spin-axis&block=sable&lat=-29.6&lon=41.2&view=globe
 * &centre=-16,34&zoom=1.5&off=velocity,coast&path=0,178,10`. What is left out takes the project's own value.
 */
import { LAYERS, LINKED, VIEWS, ZOOM, type Layer, type Linked, type View } from './state';

const text = (value: number, digits: number): string => String(Number(value.toFixed(digits)));

/** Query string without its question mark; keys stand in a fixed order. The version is named: who may see the draft opens it otherwise. */
export function toQuery(state: Linked, version: 'draft' | number): string {
  const query = new URLSearchParams();
  query.set('version', String(version));
  query.set('age', text(state.age, 4));
  if (state.heldStill) query.set('frame', state.heldStill);
  if (state.block) query.set('block', state.block);
  if (state.block && state.point) {
    query.set('lat', text(state.point.lat, 4));
    query.set('lon', text(state.point.lon, 4));
  }
  query.set('view', state.view);
  const { lat, lon, roll } = state.centre;
  query.set('centre', [lat, lon, ...(Math.abs(roll) < 0.05 ? [] : [roll])].map((n) => text(n, 1)).join(','));
  if (state.zoom !== 1) query.set('zoom', text(state.zoom, 3));
  if (state.off.size > 0) query.set('off', LAYERS.filter((layer) => state.off.has(layer)).join(','));
  const { younger_ma, older_ma, step_ma } = state.path;
  if (younger_ma !== null || older_ma !== null || step_ma !== LINKED.path.step_ma) {
    query.set('path', [younger_ma ?? '', older_ma ?? '', step_ma].join(','));
  }
  return query.toString().replaceAll('%2C', ',');
}

/** Reads what a query states and what makes sense; the rest is left out. */
export function fromQuery(search: string | URLSearchParams): Partial<Linked> {
  const query = new URLSearchParams(search);
  const numbers = (key: string): number[] =>
    (query.get(key) ?? '').split(',').map((part) => (part.trim() === '' ? NaN : Number(part)));
  const within = (n: number | undefined, least: number, most: number): n is number =>
    n !== undefined && n >= least && n <= most;
  const linked: { -readonly [K in keyof Linked]?: Linked[K] } = {};
  const [age] = numbers('age');
  if (within(age, 0, 4600)) linked.age = age;
  const frame = query.get('frame');
  if (frame) linked.heldStill = frame;
  const block = query.get('block');
  if (block) linked.block = block;
  const [lat] = numbers('lat');
  const [lon] = numbers('lon');
  if (block && within(lat, -90, 90) && within(lon, -360, 360)) linked.point = { lat, lon };
  const view = query.get('view');
  if (VIEWS.includes(view as View)) linked.view = view as View;
  const [centreLat, centreLon, roll] = numbers('centre');
  if (within(centreLat, -90, 90) && within(centreLon, -360, 360)) {
    linked.centre = { lat: centreLat, lon: centreLon, roll: within(roll, -180, 180) ? roll : 0 };
  }
  const [zoom] = numbers('zoom');
  if (within(zoom, ZOOM.least, ZOOM.most)) linked.zoom = zoom;
  const off = (query.get('off') ?? '').split(',').filter((name) => LAYERS.includes(name as Layer));
  if (off.length > 0) linked.off = new Set(off as Layer[]);
  if (query.has('path')) {
    const [younger, older, step] = numbers('path');
    linked.path = {
      younger_ma: within(younger, 0, 4600) ? younger : null,
      older_ma: within(older, 0, 4600) ? older : null,
      step_ma: within(step, 0.1, 500) ? step : LINKED.path.step_ma,
    };
  }
  return linked;
}

const DELAY_MS = 250;

/** Keeps the address bar in step with the store, replacing, never pushing. Answers a function that stops it. */
export function followInAddress(
  store: { getState: () => Linked; subscribe: (listener: () => void) => () => void },
  page: Window,
  version: 'draft' | number,
): () => void {
  let timer: number | undefined;
  const write = () => {
    const query = toQuery(store.getState(), version);
    if (`?${query}` !== page.location.search) {
      page.history.replaceState(
        page.history.state,
        '',
        `${page.location.pathname}?${query}${page.location.hash}`,
      );
    }
  };
  const stop = store.subscribe(() => {
    page.clearTimeout(timer);
    timer = page.setTimeout(write, DELAY_MS);
  });
  return () => {
    page.clearTimeout(timer);
    stop();
  };
}

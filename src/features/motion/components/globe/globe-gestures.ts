/** What gestures over a globe or map do to the workbench. */
import { flatDrag } from '../../globe/flat-drag';
import { Gestures } from '../../globe/gesture';
import { discOf } from '../../globe/ground-globe';
import { hitAt } from '../../globe/hit';
import { viewOf, type XY } from '../../globe/pen';
import type { Stage } from '../../globe/stage';
import { drag, grab } from '../../globe/turning';
import { select, setCursor, setMoving, turnTo, zoomTo } from '../../store/actions';
import type { WorkbenchStore } from '../../store/state';

const hundredth = (deg: number): number => Math.round(deg * 100) / 100;

export function globeGestures(
  store: WorkbenchStore,
  stage: () => Stage | null,
  when: 'then' | 'now',
): Gestures {
  const under = (at: XY) => {
    const picture = stage()?.picture();
    const v = picture && stage()?.studio.ground(picture).under(at);
    return picture && v ? { at: v, hit: hitAt(picture.scene, picture.frame, v, picture.selected) } : null;
  };
  return new Gestures({
    view: () => store.getState(),
    grab(at) {
      const picture = stage()?.picture();
      if (!picture) return null;
      if (picture.flat) return flatDrag(picture, at);
      const disc = discOf(picture);
      const first = viewOf(disc, at);
      if (!first.onGlobe) return null;
      let held = grab(picture.centre, first.v);
      return (to) => (held = drag(held, viewOf(disc, to).v)).centre;
    },
    turnTo: (centre) => turnTo(store, centre),
    zoomTo: (zoom) => zoomTo(store, zoom),
    pick(at) {
      const hit = under(at)?.hit;
      if (hit) select(store, hit.block, { lat: hundredth(hit.lat), lon: hundredth(hit.lon) });
    },
    hover(at) {
      const found = at && under(at);
      setCursor(store, found ? { ...found, on: when } : null);
    },
    moving: (now) => setMoving(store, now),
  });
}

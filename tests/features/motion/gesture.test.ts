import { describe, expect, it } from 'vitest';
import { Gestures, type GestureHost } from '../../../src/features/motion/globe/gesture';
import type { Centre } from '../../../src/features/motion/globe/matrix';

function bench() {
  const seen = {
    centre: { lat: 5, lon: 10, roll: 0 } as Centre,
    zoom: 1.5,
    picks: [] as string[],
    moving: [] as boolean[],
  };
  const host: GestureHost = {
    view: () => ({ centre: seen.centre, zoom: seen.zoom }),
    grab: ([x]) => (x > 500 ? null : (to) => ({ lat: to[1], lon: to[0], roll: 0 })),
    turnTo: (centre) => (seen.centre = centre),
    zoomTo: (zoom) => (seen.zoom = zoom),
    pick: (at) => seen.picks.push(at.join(' ')),
    hover: () => undefined,
    moving: (now) => seen.moving.push(now),
  };
  return { seen, gestures: new Gestures(host) };
}

describe('gestures', () => {
  it('pick where a press hardly moves', () => {
    const { seen, gestures } = bench();
    gestures.down(1, [40, 50]);
    gestures.move(1, [42, 51]);
    gestures.up(1, [42, 51]);
    expect(seen.picks).toEqual(['42 51']);
    expect(seen.centre).toEqual({ lat: 5, lon: 10, roll: 0 });
  });

  it('turn once a press has moved, and pick nothing then', () => {
    const { seen, gestures } = bench();
    gestures.down(1, [40, 50]);
    gestures.move(1, [60, 45]);
    gestures.move(1, [70, 30]);
    gestures.up(1, [70, 30]);
    expect(seen).toMatchObject({ centre: { lat: 30, lon: 70 }, picks: [], moving: [true, false] });
  });

  it('put everything back on Escape, and let the rest of the press be', () => {
    const { seen, gestures } = bench();
    gestures.down(1, [40, 50]);
    gestures.move(1, [90, 20]);
    expect(gestures.cancel()).toBe(true);
    gestures.move(1, [95, 10]);
    gestures.up(1, [95, 10]);
    expect(seen).toMatchObject({ centre: { lat: 5, lon: 10 }, zoom: 1.5, picks: [], moving: [true, false] });
    expect(gestures.cancel()).toBe(false);
  });

  it('zoom by the distance of two fingers, whichever came first', () => {
    const { seen, gestures } = bench();
    gestures.down(1, [100, 100]);
    gestures.down(2, [130, 140]);
    gestures.move(2, [160, 180]);
    expect(seen.zoom).toBeCloseTo(3, 10);
    gestures.up(1, [100, 100]);
    expect(seen.moving.at(-1)).toBe(false);
  });

  it('do not begin off the globe', () => {
    const { seen, gestures } = bench();
    gestures.down(1, [600, 50]);
    gestures.move(1, [560, 90]);
    expect(seen.moving).toEqual([]);
    expect(gestures.busy).toBe(false);
  });
});

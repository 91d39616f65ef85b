import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromQuery, toQuery } from '../../../src/features/motion/store/link';
import { LAYERS, LINKED, VIEWS, ZOOM, type Linked } from '../../../src/features/motion/store/state';

const decimal = (min: number, max: number, digits: number) =>
  fc
    .integer({ min: Math.ceil(min * 10 ** digits), max: Math.floor(max * 10 ** digits) })
    .map((n) => Number((n / 10 ** digits).toFixed(digits)));

const linked: fc.Arbitrary<Linked> = fc.record({
  age: decimal(0, 4600, 4),
  heldStill: fc.constantFrom('spin-axis', 'old-harrow'),
  block: fc.constantFrom('sable', 'quill'),
  point: fc.option(fc.record({ lat: decimal(-90, 90, 4), lon: decimal(-180, 180, 4) })),
  view: fc.constantFrom(...VIEWS),
  centre: fc.record({
    lat: decimal(-90, 90, 1),
    lon: decimal(-180, 180, 1),
    roll: fc.constantFrom(0, 12.5, -140.3),
  }),
  zoom: decimal(ZOOM.least, ZOOM.most, 3),
  off: fc.subarray([...LAYERS]).map((layers) => new Set(layers)),
  path: fc.record({
    younger_ma: fc.option(decimal(0, 50, 1)),
    older_ma: fc.option(decimal(60, 200, 1)),
    step_ma: fc.constantFrom(0.5, 10, 25),
  }),
});

describe('a link', () => {
  it('restores age, view and selection', () => {
    fc.assert(
      fc.property(linked, (state) => {
        expect({ ...LINKED, ...fromQuery(toQuery(state, 7)) }).toEqual(state);
        expect(new URLSearchParams(toQuery(state, 7)).get('version')).toBe('7');
        expect(new URLSearchParams(toQuery(state, 'draft')).get('version')).toBe('draft');
      }),
      { numRuns: 300, seed: 11 },
    );
  });

  it('reads the form that is documented', () => {
    expect(
      fromQuery('?age=62.4&frame=spin-axis&block=sable&lat=-29.6&lon=41.2&view=globe&centre=-16,34'),
    ).toEqual({
      age: 62.4,
      heldStill: 'spin-axis',
      block: 'sable',
      point: { lat: -29.6, lon: 41.2 },
      view: 'globe',
      centre: { lat: -16, lon: 34, roll: 0 },
    });
  });

  it('leaves out what makes no sense', () => {
    expect(fromQuery('age=-4&view=sideways&centre=95,10&zoom=900&lat=3&lon=4&off=everything')).toEqual({});
    expect(fromQuery('age=&centre=,&zoom=')).toEqual({});
  });
});

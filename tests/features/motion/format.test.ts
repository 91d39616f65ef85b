/** Expected texts: notes.md of the design ("Voice", "Type") and tokens; forms not shown there are common practice, no source. */
import { describe, expect, it } from 'vitest';
import * as format from '../../../src/features/motion/format';

describe('numbers', () => {
  it('writes a true minus, thin spaces in thousands, and never minus zero', () => {
    expect(format.number(-13.82, 2)).toBe('−13.82');
    expect(format.number(1038)).toBe('1\u2009038');
    expect(format.number(-1234567.25, 1)).toBe('−1\u2009234\u2009567.3');
    expect(format.number(-0.04, 1)).toBe('0.0');
    expect(format.number(NaN)).toBe('–');
  });
  it('signs what is above zero', () => {
    expect([format.signed(2.3, 1), format.signed(-0.9, 1), format.signed(0.01, 1)]).toEqual([
      '+2.3',
      '−0.9',
      '0.0',
    ]);
  });
  it('rounds shares to whole percents that add up to 100', () => {
    expect(format.percents([0.2449, 0.5266, 0.2285])).toEqual([24, 53, 23]);
    expect(format.percents([1 / 3, 1 / 3, 1 / 3])).toEqual([34, 33, 33]);
  });
});

describe('places and ages', () => {
  it('writes hemisphere letters', () => {
    expect(format.coordinates(-21.14, 36.62)).toBe('21.1°\u00a0S, 36.6°\u00a0E');
    expect(format.coordinates(0, -38)).toBe('0.0°\u00a0N, 38.0°\u00a0W');
  });
  it('reads every way of writing a longitude', () => {
    expect([200, -160, 560].map((lon) => format.longitude(lon, 0))).toEqual(Array(3).fill('160°\u00a0W'));
    expect([180, -180, 179.97].map((lon) => format.longitude(lon))).toEqual(Array(3).fill('180.0°\u00a0E'));
    expect(format.longitude(-0.04)).toBe('0.0°\u00a0E');
  });
  it('has no longitude at a pole', () => {
    expect(format.coordinates(89.97, 12)).toBe('90.0°\u00a0N, longitude undefined');
    expect(format.coordinates(-89.9, 12)).toBe('89.9°\u00a0S, 12.0°\u00a0E');
  });
  it('labels graticules and ages', () => {
    expect([60, 0, -30].map(format.parallel)).toEqual(['60°\u00a0N', '0°', '30°\u00a0S']);
    expect([-30, 0, 90, 180].map(format.meridian)).toEqual(['30°\u00a0W', '0°', '90°\u00a0E', '180°']);
    expect([format.age(62.4), format.shortAge(178), format.shortAge(55.2)]).toEqual([
      '62.4\u00a0Ma',
      '178',
      '55.2',
    ]);
  });
  it('names an ellipse with its level', () => {
    expect(format.ellipse(297.6, 220.3)).toBe('298 × 220\u00a0km (95\u00a0%)');
  });
});

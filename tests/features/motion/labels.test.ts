import { describe, expect, it } from 'vitest';
import { placeLabels } from '../../../src/features/motion/globe/labels';

const box = (x: number, y: number) => ({ x, y, w: 40, h: 12 });
const anywhere = () => true;

describe('labels', () => {
  it('take the first place that is free, the more important label first', () => {
    const wishes = [
      { key: 'small', priority: 2, places: [box(10, 0), box(10, 30)] },
      { key: 'large', priority: 1, places: [box(0, 0), box(90, 0)] },
    ];
    expect([...placeLabels(wishes, [], anywhere)]).toEqual([['large', 0], ['small', 1]]); // prettier-ignore
  });
  it('keep the place they had while it is free, and give it up when it is not', () => {
    const wishes = [{ key: 'a', priority: 1, places: [box(0, 0), box(0, 30)] }];
    const last = new Map([['a', 1]]);
    expect(placeLabels(wishes, [], anywhere, last).get('a')).toBe(1);
    expect(placeLabels(wishes, [box(5, 35)], anywhere, last).get('a')).toBe(0);
  });
  it('stay away rather than cover, unless they must be shown', () => {
    const crowded = [box(0, 0)];
    const wish = { key: 'a', priority: 1, places: [box(3, 3)] };
    expect(placeLabels([wish], crowded, anywhere).size).toBe(0);
    expect(placeLabels([{ ...wish, must: true }], crowded, anywhere).get('a')).toBe(0);
  });
  it('cover as little of other blocks as they can, and nothing of their own counts', () => {
    const wish = { key: 'a', priority: 1, places: [box(0, 0), box(100, 0)] };
    const other = { key: 'b', x: 10, y: -5, w: 16, h: 30 };
    expect(placeLabels([wish], [], anywhere, new Map(), [other]).get('a')).toBe(1);
    expect(placeLabels([wish], [], anywhere, new Map(), [{ ...other, key: 'a' }]).get('a')).toBe(0);
  });
});

import { describe, expect, it } from 'vitest';
import { ageStep, ALL_COMMANDS, runKey, type KeyLike } from '../../../src/features/motion/store/commands';
import { jumpsFor, parseAge } from '../../../src/features/motion/store/jump';
import { createWorkbench } from '../../../src/features/motion/store/state';
import { lanternSea } from '../../support/lantern-sea';

const scene = lanternSea();

describe('jump', () => {
  it('reads ages with point, comma and unit, and nothing else as an age', () => {
    expect(['62.4', '62,4', ' 62.4 Ma', '0'].map(parseAge)).toEqual([62.4, 62.4, 62.4, 0]);
    expect(['-3', 'Eocene', '62.4 ka', '1.2.3', ''].map(parseAge)).toEqual([null, null, null, null, null]);
  });
  it('finds blocks by name and units of the chart; "plate" finds every block', () => {
    expect(jumpsFor('harrow', scene)[0]).toMatchObject({ kind: 'block', code: 'old-harrow' });
    // Base of the Danian: 66.0 Ma, ICS chart v2023/09.
    expect(jumpsFor('danian', scene)[0]).toMatchObject({ kind: 'age', age: 66 });
    expect(jumpsFor('plate', scene).filter(({ kind }) => kind === 'block')).toHaveLength(9);
    expect(jumpsFor('nothing like it', scene)).toEqual([]);
  });
  it('does not offer an age beyond the column', () => {
    expect(jumpsFor('201', scene)).toEqual([]);
    expect(jumpsFor('200', scene)).toHaveLength(1);
  });
});

const key = (name: string, held: Partial<KeyLike> = {}): KeyLike => ({
  ...{ key: name, shiftKey: false, altKey: false, ctrlKey: false, metaKey: false },
  ...held,
});

describe('keys', () => {
  it('step the age by 1, 10 and 0.1 Myr, within the column', () => {
    const store = createWorkbench({ age: 62.4 });
    const context = { store, oldest: 200, home: { lat: 0, lon: 0, roll: 0 } };
    runKey(key('ArrowDown'), context);
    runKey(key('ArrowDown', { shiftKey: true }), context);
    runKey(key('ArrowUp', { altKey: true }), context);
    expect(store.getState().age).toBe(73.3);
    for (let i = 0; i < 40; i++) runKey(key('ArrowUp', { shiftKey: true }), context);
    expect(store.getState().age).toBe(0);
    expect(ageStep(key('ArrowUp'))).toBe(1);
  });
  it('belong to one command each', () => {
    const events = ['ArrowUp', '/', '?', '+', '-', 'Home', 't', '.', '1', '2', '3'].map((name) => key(name));
    events.push(key('ArrowDown', { shiftKey: true }), key('ArrowDown', { altKey: true }));
    for (const event of events) expect(ALL_COMMANDS.filter(({ matches }) => matches(event))).toHaveLength(1);
    expect(ALL_COMMANDS.filter(({ matches }) => matches(key('t', { ctrlKey: true })))).toEqual([]);
  });
});

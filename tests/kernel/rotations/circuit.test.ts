import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  BATCH_ERROR_RAD,
  between,
  circuitAt,
  compileModel,
  fromPole,
  IDENTITY,
  interpolate,
  inverse,
  KernelError,
  LINK_ERROR_RAD,
  multiply,
  poseAt,
  posesAt,
  STATUSES,
  toPole,
} from '../../../src/kernel';
import { block, frame, model as anyModel, placed, row, turnBetween } from '../support';

const spin = frame('spin');
const code = fc.constantFrom('b0', 'b1', 'b2', 'b3', 'b4', 'b5', 'b6', 'spin', 'mantle');
const age = fc.double({ min: 0, max: 60, noNaN: true });
const thrown = (act: () => unknown): KernelError => {
  try {
    act();
  } catch (error) {
    if (error instanceof KernelError) return error;
  }
  throw new Error('no kernel error');
};

describe('circuits', () => {
  it('give the inverse when both ends change places', () => {
    fc.assert(
      fc.property(anyModel, code, code, age, (model, a, b, t) => {
        const there = poseAt(model, a, t, b);
        const back = poseAt(model, b, t, a);
        expect(there.status).toBe(back.status);
        if (there.status !== 'placed' || back.status !== 'placed') return;
        expect(turnBetween(multiply(there.quaternion, back.quaternion), IDENTITY)).toBeLessThan(
          8 * LINK_ERROR_RAD,
        );
      }),
    );
  });

  it('leave relative motions alone, whichever block is held still', () => {
    fc.assert(
      fc.property(anyModel, code, code, code, code, age, (model, a, b, x, y, t) => {
        const seen = (still: string) => [poseAt(model, a, t, still), poseAt(model, b, t, still)] as const;
        const [[ax, bx], [ay, by]] = [seen(x), seen(y)];
        fc.pre([ax, bx, ay, by].every(({ status }) => status === 'placed'));
        const relative = (from: typeof ax, to: typeof ax) =>
          multiply(inverse(placed(from).quaternion), placed(to).quaternion);
        expect(turnBetween(relative(ax, bx), relative(ay, by))).toBeLessThan(16 * LINK_ERROR_RAD);
        expect(placed(poseAt(model, x, t, x)).quaternion).toEqual(IDENTITY);
      }),
    );
  });

  it('are the product of their links, from the block to the reference', () => {
    fc.assert(
      fc.property(anyModel, code, code, age, (model, a, b, t) => {
        const pose = poseAt(model, a, t, b);
        if (pose.status !== 'placed') return;
        const product = pose.links.reduce((q, link) => multiply(link.quaternion, q), IDENTITY);
        expect(turnBetween(product, pose.quaternion)).toBeLessThan(LINK_ERROR_RAD);
        const walked = pose.links.map((link) =>
          link.direction === 'up' ? [link.block, link.relative_to] : [link.relative_to, link.block],
        );
        walked.forEach(([from], i) => expect(from).toBe(i === 0 ? a : walked[i - 1]?.[1]));
        if (walked.length > 0) expect(walked.at(-1)?.[1]).toBe(b);
      }),
    );
  });

  it('cancel common links: what lies above the common ancestor does not matter', () => {
    const rows = [
      row(['brant', 'avon', 60, 12, 34, 20]),
      row(['corrie', 'avon', 60, -30, 50, 15]),
      row(['avon', 'spin', 20, 70, 10, 9]),
    ];
    const model = compileModel([block('avon'), block('brant'), block('corrie'), spin], rows);
    const pose = placed(poseAt(model, 'brant', 45, 'corrie'));
    expect(pose.links.map(({ block: b, direction }) => [b, direction])).toEqual([
      ['brant', 'up'],
      ['corrie', 'down'],
    ]);
    expect(poseAt(model, 'brant', 45, 'spin')).toMatchObject({ status: 'outside rotations', at: 'avon' });
  });

  it('interpolate links, not products: a product of constant rates has none', () => {
    const rows = [row(['avon', 'spin', 10, 0, 90, 40]), row(['brant', 'avon', 10, 0, 0, 40])];
    const model = compileModel([block('avon'), block('brant'), spin], rows);
    const half = placed(poseAt(model, 'brant', 5, 'spin')).quaternion;
    const wrong = interpolate(IDENTITY, placed(poseAt(model, 'brant', 10, 'spin')).quaternion, 0.5);
    expect(turnBetween(half, multiply(fromPole(0, 90, 20), fromPole(0, 0, 20)))).toBeLessThan(
      2 * LINK_ERROR_RAD,
    );
    expect((turnBetween(half, wrong) * 180) / Math.PI).toBeGreaterThan(1);
  });

  it('say which rows and what share of the way they took', () => {
    const rows = [row(['avon', 'spin', 10, 20, 30, 4]), row(['avon', 'spin', 30, 25, 33, 9])];
    const model = compileModel([block('avon'), spin], rows);
    const [link] = placed(poseAt(model, 'avon', 15, 'spin')).links;
    expect(link).toMatchObject({
      fraction: 0.25,
      extrapolated: false,
      younger: { id: rows[0]?.id },
      older: { id: rows[1]?.id },
    });
    expect(link?.stage).toMatchObject({ younger_ma: 10, older_ma: 30 });
    const [atRow] = placed(poseAt(model, 'avon', 10, 'spin')).links;
    expect(atRow?.younger).toBe(atRow?.older);
    expect(atRow).toMatchObject({
      fraction: 0,
      younger: { id: rows[0]?.id },
      stage: { younger_ma: 0, older_ma: 10 },
    });
    expect(atRow?.quaternion).toEqual(fromPole(20, 30, 4));
  });
});

describe('hand-overs', () => {
  const rows = [
    row(['corrie', 'avon', 30, 20, 30, 8]),
    row(['corrie', 'brant', 30, 40, 31, 19]),
    row(['corrie', 'brant', 50, 25, 28, 14]),
    row(['corrie', 'avon', 50, 14, 27, -13]),
    row(['corrie', 'avon', 80, 30, 20, 25]),
    row(['avon', 'spin', 100, 50, 60, 30]),
    row(['brant', 'spin', 100, 48, 66, 28]),
  ];
  const model = compileModel([block('avon'), block('brant'), block('corrie'), spin], rows);
  const reference = (t: number) => placed(poseAt(model, 'corrie', t, 'spin')).links[0]?.relative_to;

  it('let the younger leg apply at their own age', () => {
    expect([0, 29.9, 30, 30.1, 50, 50.1, 80].map(reference)).toEqual([
      'avon',
      'avon',
      'avon',
      'brant',
      'brant',
      'avon',
      'avon',
    ]);
  });

  it('compose through the reference of each leg', () => {
    const at = (t: number) => placed(poseAt(model, 'corrie', t, 'spin')).quaternion;
    const expected = [
      [15, fromPole(50, 60, 4.5), fromPole(20, 30, 4)],
      [40, fromPole(48, 66, 11.2), interpolate(fromPole(40, 31, 19), fromPole(25, 28, 14), 0.5)],
      [65, fromPole(50, 60, 19.5), interpolate(fromPole(14, 27, -13), fromPole(30, 20, 25), 0.5)],
    ] as const;
    for (const [t, below, above] of expected)
      expect(turnBetween(at(t), multiply(below, above))).toBeLessThan(2 * LINK_ERROR_RAD);
  });
});

describe('why there is no pose', () => {
  const blocks = [
    block('avon', { appears_ma: 90, disappears_ma: 20 }),
    block('brant', { disappears_ma: 0 }),
    block('corrie', { appears_ma: 55 }),
    block('dunlin'),
    block('eider'),
    block('fulmar'),
    spin,
    frame('mantle'),
  ];
  const rows = [
    row(['avon', 'spin', 30, 10, 20, 5]),
    row(['avon', 'spin', 80, 10, 20, 15]),
    row(['brant', 'spin', 60, 20, 20, 12]),
    row(['dunlin', 'limbo', 60, 20, 20, 12]),
    row(['eider', 'spin', 10, 5, 6, 3]),
    row(['eider', 'brant', 40, 5, 6, 3]),
    row(['eider', 'brant', 70, 5, 6, 8]),
  ];
  const model = compileModel(blocks, rows);
  const status = (b: string, t: number, x = 'spin'): string => poseAt(model, b, t, x).status;

  it('existence comes first: disappears_ma < age ≤ appears_ma', () => {
    expect([19, 20, 20.5, 90, 90.5].map((t) => status('avon', t))).toEqual([
      'younger than block',
      'younger than block',
      'outside rotations',
      'outside rotations',
      'older than block',
    ]);
    expect([0, 55, 56].map((t) => status('corrie', t))).toEqual([
      'placed',
      'outside rotations',
      'older than block',
    ]);
    expect(status('brant', 0)).toBe('placed');
  });

  it('rotations run out: beyond the oldest row, before the youngest of a block gone, in a gap', () => {
    expect([29.9, 30, 55, 80, 80.1].map((t) => status('avon', t))).toEqual([
      'outside rotations',
      'placed',
      'placed',
      'placed',
      'outside rotations',
    ]);
    expect([10, 10.1, 39.9, 40, 60, 60.1].map((t) => status('eider', t))).toEqual([
      'placed',
      'outside rotations',
      'outside rotations',
      'placed',
      'placed',
      'outside rotations',
    ]);
    expect(poseAt(model, 'eider', 60.1, 'spin')).toMatchObject({ at: 'brant', quaternion: null, links: [] });
    expect(poseAt(model, 'eider', 20, 'spin')).toMatchObject({ at: 'eider' });
  });

  it('chains do not meet', () => {
    expect(poseAt(model, 'dunlin', 30, 'spin')).toMatchObject({ status: 'not connected', at: 'dunlin' });
    expect(poseAt(model, 'spin', 30, 'dunlin')).toMatchObject({ status: 'not connected', at: 'dunlin' });
    expect(status('brant', 30, 'mantle')).toBe('not connected');
    expect(status('mantle', 0, 'spin')).toBe('not connected');
  });

  it('a block without rotations is placed at 0 only, as identity', () => {
    expect(placed(poseAt(model, 'fulmar', 0, 'spin')).quaternion).toEqual(IDENTITY);
    expect(placed(poseAt(model, 'fulmar', 0, 'brant')).quaternion).toEqual(IDENTITY);
    expect(poseAt(model, 'fulmar', 0.1, 'spin')).toMatchObject({ status: 'outside rotations', at: 'fulmar' });
    expect(poseAt(model, 'brant', 0.1, 'fulmar')).toMatchObject({
      status: 'outside rotations',
      at: 'fulmar',
    });
    expect(placed(poseAt(model, 'fulmar', 35, 'fulmar')).quaternion).toEqual(IDENTITY);
  });

  it('the reference may be seen from where it does not exist, so long as it has rotations', () => {
    const later = compileModel(
      [block('avon', { appears_ma: 50, disappears_ma: 40 }), block('brant'), spin],
      rows.slice(0, 3),
    );
    expect(status('brant', 35, 'avon')).toBe('placed');
    expect(poseAt(later, 'brant', 60, 'avon').status).toBe('placed');
    expect(poseAt(later, 'brant', 25, 'avon')).toMatchObject({ status: 'outside rotations', at: 'avon' });
  });

  it('unless the last stage is to be held, and there is one', () => {
    const held = placed(poseAt(model, 'brant', 90, 'spin', { beyond: 'hold last stage' }));
    expect(toPole(held.quaternion).angle_deg).toBeCloseTo(18, 12);
    expect(held.links[0]).toMatchObject({ extrapolated: true, fraction: 1.5 });
    expect(poseAt(model, 'fulmar', 5, 'spin', { beyond: 'hold last stage' }).status).toBe(
      'outside rotations',
    );
    expect(poseAt(model, 'eider', 20, 'spin', { beyond: 'hold last stage' }).status).toBe(
      'outside rotations',
    );
  });
});

describe('questions that make no sense', () => {
  const model = compileModel(
    [block('avon'), block('brant'), block('corrie'), spin],
    [
      row(['avon', 'brant', 40, 1, 2, 3]),
      row(['brant', 'avon', 40, 1, 2, 3]),
      row(['corrie', 'spin', 40, 1, 2, 3]),
    ],
  );

  it('are errors with a name, the quantity and what was read', () => {
    expect(thrown(() => poseAt(model, 'limbo', 1, 'spin'))).toMatchObject({
      name: 'UnknownBlock',
      quantity: 'block',
      value: 'limbo',
    });
    expect(thrown(() => poseAt(model, 'avon', 1, 'limbo'))).toMatchObject({
      name: 'UnknownBlock',
      quantity: 'relative_to',
    });
    expect(thrown(() => poseAt(model, 'avon', -0.5, 'spin'))).toMatchObject({
      name: 'NegativeAge',
      value: -0.5,
      title: 'Age below zero',
    });
    expect(thrown(() => poseAt(model, 'avon', NaN, 'spin')).name).toBe('NonFinite');
    expect(thrown(() => poseAt(model, 'avon', Infinity, 'spin')).name).toBe('NonFinite');
  });

  it('loops among them, with the blocks of the loop', () => {
    expect(thrown(() => poseAt(model, 'avon', 12, 'spin'))).toMatchObject({
      name: 'CircuitCycle',
      loop: ['avon', 'brant'],
    });
    expect(thrown(() => poseAt(model, 'corrie', 12, 'brant')).loop).toEqual(['brant', 'avon']);
    expect(poseAt(model, 'corrie', 12, 'spin').status).toBe('placed');
  });
});

describe('every block at once', () => {
  it('agrees with the exact circuit, status for status, to BATCH_ERROR_RAD', () => {
    fc.assert(
      fc.property(
        anyModel,
        code,
        fc.oneof(age, fc.constant(0)),
        fc.constantFrom('none', 'hold last stage'),
        (model, still, t, beyond) => {
          const quaternions = new Float64Array(4 * model.blocks.length);
          const statuses = new Uint8Array(model.blocks.length);
          posesAt(model, t, still, quaternions, statuses, { beyond });
          model.blocks.forEach((b, i) => {
            const pose = poseAt(model, b.code, t, still, { beyond });
            expect(STATUSES[statuses[i] ?? -1]).toBe(pose.status);
            const [w = NaN, x = NaN, y = NaN, z = NaN] = quaternions.subarray(4 * i, 4 * i + 4);
            if (pose.status === 'placed')
              expect(turnBetween([w, x, y, z], pose.quaternion)).toBeLessThan(BATCH_ERROR_RAD);
            else expect([w, x, y, z]).toEqual([NaN, NaN, NaN, NaN]);
          });
        },
      ),
    );
  });

  it('answers loops with a status', () => {
    const looped = compileModel(
      [block('avon'), block('brant'), block('corrie'), block('dunlin'), spin],
      [
        row(['avon', 'brant', 40, 1, 2, 3]),
        row(['brant', 'avon', 40, 1, 2, 3]),
        row(['corrie', 'spin', 40, 1, 2, 3]),
        row(['dunlin', 'avon', 40, 1, 2, 3]),
      ],
    );
    const statuses = new Uint8Array(5);
    posesAt(looped, 10, 'spin', new Float64Array(20), statuses);
    expect([...statuses].map((s) => STATUSES[s])).toEqual([
      'not connected',
      'not connected',
      'placed',
      'not connected',
      'placed',
    ]);
    posesAt(looped, 10, 'avon', new Float64Array(20), statuses);
    expect(new Set(statuses)).toEqual(new Set([STATUSES.indexOf('not connected')]));
    expect(() => posesAt(looped, 10, 'limbo', new Float64Array(20), statuses)).toThrow(/limbo/);
  });

  it('does not ask whether the blocks on the way exist', () => {
    const model = compileModel(
      [block('avon', { appears_ma: 5 }), block('brant'), spin],
      [row(['avon', 'spin', 40, 1, 2, 30]), row(['brant', 'avon', 40, 1, 2, 10])],
    );
    expect(
      turnBetween(placed(poseAt(model, 'brant', 20, 'spin')).quaternion, fromPole(1, 2, 20)),
    ).toBeLessThan(2 * LINK_ERROR_RAD);
    expect(
      turnBetween(
        between(placed(circuitAt(model, 'avon', 20, 'spin')).quaternion, fromPole(1, 2, 15)),
        IDENTITY,
      ),
    ).toBeLessThan(LINK_ERROR_RAD);
  });
});

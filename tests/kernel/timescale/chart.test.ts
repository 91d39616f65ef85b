import { describe, expect, it } from 'vitest';
import cases from '../../cases/chronostratigraphic-chart.json';
import { CHRONOSTRATIGRAPHIC_CHART, RANKS, unitAt, unitsBetween } from '../../../src/kernel';

const { units, edition } = CHRONOSTRATIGRAPHIC_CHART;

describe(`the chart (${cases.source})`, () => {
  it('names its edition', () => expect(edition).toBe('ICS 2023/09'));

  it.each(cases.units)('has $name as published', ({ rank, name, older_ma, younger_ma, colour }) => {
    expect(units.filter((unit) => unit.rank === rank && unit.name === name)).toEqual([
      { rank, name, older_ma, younger_ma, colour },
    ]);
  });

  it('leaves no gap within a rank, from the present on', () => {
    for (const rank of RANKS) {
      const ofRank = units.filter((unit) => unit.rank === rank);
      ofRank.forEach((unit, i) => {
        expect(unit.younger_ma).toBe(i === 0 ? 0 : ofRank[i - 1]?.older_ma);
        expect(unit.older_ma).toBeGreaterThan(unit.younger_ma);
        expect(unit.colour).toMatch(/^#[0-9A-F]{6}$/);
      });
    }
  });

  it('nests: every boundary of a rank is one of the next finer, as far back as that is divided', () => {
    for (const [coarse, fine] of [
      ['eon', 'era'],
      ['era', 'period'],
      ['period', 'epoch'],
      ['epoch', 'stage'],
    ] as const) {
      const finer = units.filter((unit) => unit.rank === fine).map((unit) => unit.older_ma);
      const divided = units.filter((unit) => unit.rank === coarse && unit.older_ma <= Math.max(...finer));
      expect(divided.length).toBeGreaterThan(0);
      for (const unit of divided) expect(finer).toContain(unit.older_ma);
    }
  });

  it('answers for an age: the older end belongs to a unit, the younger to the next', () => {
    expect(RANKS.map((rank) => unitAt(62.4, rank)?.name)).toEqual([
      'Phanerozoic',
      'Cenozoic',
      'Paleogene',
      'Paleocene',
      'Danian',
    ]);
    expect([66, 66.0001].map((age) => unitAt(age, 'period')?.name)).toEqual(['Paleogene', 'Cretaceous']);
    expect(unitAt(0, 'stage')?.name).toBe('Meghalayan');
    expect(unitAt(600, 'epoch')).toBeNull();
    expect(unitAt(3000, 'period')).toBeNull();
    expect(unitAt(4600, 'eon')).toBeNull();
    expect(() => unitAt(-1, 'eon')).toThrow(expect.objectContaining({ name: 'NegativeAge' }));
  });

  it('answers for a span, without units that only touch it', () => {
    expect(unitsBetween(66, 2.58, 'period').map(({ name }) => name)).toEqual(['Neogene', 'Paleogene']);
    expect(unitsBetween(66.1, 2.5, 'period').map(({ name }) => name)).toEqual([
      'Quaternary',
      'Neogene',
      'Paleogene',
      'Cretaceous',
    ]);
    expect(unitsBetween(1200, 400, 'epoch').at(-1)?.name).toBe('Terreneuvian');
    expect(unitsBetween(5000, 4700, 'eon')).toEqual([]);
  });
});

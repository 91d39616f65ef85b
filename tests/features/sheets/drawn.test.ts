import { describe, expect, it } from 'vitest';
import type { Layer } from '~/features/sheets/choices';
import { carry } from '~/features/sheets/slice/carried';
import { drawnOf, type SlicePath } from '~/features/sheets/slice/drawn';
import { pathSources } from '~/features/sheets/slice/sources';
import { fitProjection } from '~/kernel/cartography/projections';
import { driftPath } from '~/kernel/rotations';
import { twoBlocks } from './two-blocks';

const { model } = twoBlocks;
const points = driftPath(model, {
  block: 'sable', lat: 0, lon: 20, younger_ma: 0, older_ma: 120, step_ma: 10, relative_to: 'axis',
}); // prettier-ignore
const path: SlicePath = {
  block: 'sable',
  name: 'Sable',
  points,
  here: null,
  sources: pathSources(model, 'sable', points, 'axis'),
};
const globe = fitProjection('orthographic', { lat: 0, lon: 30 }, { x: 0, y: 0, width: 9, height: 9 });
const sources = (age: number, layers: Layer[], projection: typeof globe | null = null) =>
  drawnOf(carry(twoBlocks, age, 'axis'), path, layers, projection).sources;
const TARN = ['Tarn at 100', 'Tarn’s outline'];
const SABLE = ['Sable at 20', 'Sable at 60', 'Sable itself', 'Sable’s outline'];

describe('sources of a slice are those of what is drawn', () => {
  it('outlines, blocks and the rows on either side of the age', () => {
    expect(sources(40, [])).toEqual([...SABLE, ...TARN, 'Wether at 100']);
  });

  it('coasts where they are drawn, and only there', () => {
    expect(sources(40, ['coasts'])).toEqual(['Coast', ...SABLE, ...TARN, 'Wether at 100']);
  });

  it('every row along the drift path’s circuit', () => {
    expect(sources(40, ['path'])).toContain('Sable at 100');
    expect(sources(10, ['path'], globe)).toEqual(['Sable at 100', ...SABLE, 'Wether at 100']);
  });

  it('both rows of the stage by which a block moves at a row’s age', () => {
    expect(sources(60, [], globe)).not.toContain('Sable at 20');
    expect(sources(60, ['velocity'], globe)).toContain('Sable at 20');
  });

  it('nothing of what lies beyond the map’s reach', () => {
    expect(sources(40, ['coasts'], globe)).toEqual(['Coast', ...SABLE, 'Wether at 100']);
  });
});

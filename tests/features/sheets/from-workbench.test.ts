import { describe, expect, it } from 'vitest';
import { sliceQuery } from '~/features/sheets/contract';
import { sliceFromLink } from '~/features/sheets/from-workbench';

const points = { sable: { lat: -29.6, lon: 41.2, words: 'Gannet beds' } };

describe('a link of the workbench opens the print page on the same map', () => {
  it('with age, frame, centre and the block’s own rock', () => {
    const link = {
      age: '62.4',
      frame: 'spin-axis',
      block: 'sable',
      view: 'globe',
      centre: '-21.2,32.1',
      path: '0,178,20',
    };
    expect(sliceQuery.parse(sliceFromLink(link, points))).toMatchObject({
      age_ma: 62.4, relative_to: 'spin-axis', projection: 'lambert-azimuthal', centre_lat: -21.2, centre_lon: 32.1,
      path_block: 'sable', path_lat: -29.6, path_lon: 41.2, path_step_ma: 20,
    }); // prettier-ignore
  });

  it('with the link’s own point, and a slice’s own query as it is', () => {
    expect(sliceFromLink({ age: '5', block: 'tarn', lat: '1.5', lon: '-2' }, points)).toMatchObject({
      path_block: 'tarn',
      path_lat: '1.5',
      path_lon: '-2',
    });
    expect(sliceFromLink({ age_ma: '5', projection: 'robinson' }, points)).toEqual({
      age_ma: '5',
      projection: 'robinson',
    });
    expect(sliceFromLink({ age: '5', block: 'tarn' }, points)).not.toHaveProperty('path_block');
  });
});

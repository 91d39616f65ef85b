import type { Geometry } from 'geojson';
import { describe, expect, it } from 'vitest';
import { sliceSearch } from '~/features/sheets/address';
import { firstAge } from '~/features/sheets/first-age';
import { knownPoints } from '~/features/sheets/known-points';
import { pointWords } from '~/features/sheets/point-words';
import { settingsFromLink } from '~/features/sheets/settings-from-link';
import { twoBlocks } from './two-blocks';

const { model, blocks, geometryOf } = twoBlocks;
const usual = { age_ma: 50, frame: 'axis', codes: ['sable', 'wether', 'tarn', 'axis'] };

describe('the age at which a sheet opens', () => {
  it('is half of the oldest', () => expect(firstAge(model, blocks, 'axis')).toBe(50));

  it('is another where nothing is drawn then', () => {
    const young = blocks.map((block) => ({
      ...block,
      outlines: block.outlines.map((outline) => ({ ...outline, outline_older_ma: 30 })),
    }));
    expect(firstAge(model, young, 'axis')).toBe(25);
    expect(firstAge(model, [], 'axis')).toBe(0);
  });
});

describe('what the print page takes from its link', () => {
  it('is what the link says, else the usual', () => {
    const { settings, refused } = settingsFromLink({ paper: 'a5', relative_to: 'wether' }, usual);
    expect(settings).toMatchObject({
      age_ma: 50,
      paper: 'a5',
      relative_to: 'wether',
      orientation: 'landscape',
    });
    expect(refused).toEqual([]);
  });

  it('without what cannot be used, which it names', () => {
    const link = { age_ma: '62,4', projection: 'robinson', relative_to: 'nobody', title: 'Parting' };
    const { settings, refused } = settingsFromLink(link, usual);
    expect(settings).toMatchObject({
      age_ma: 50,
      projection: 'robinson',
      relative_to: 'axis',
      title: 'Parting',
    });
    expect(refused).toHaveLength(2);
    expect(refused[0]).toContain('age_ma: read “62,4”');
    expect(refused[1]).toBe('relative_to: read “nobody”, no such block or frame in this version');
  });
});

describe('the point whose path is offered', () => {
  const outline = { id: '', vertices: 5, outline_older_ma: null, outline_younger_ma: null, inside: 'smaller', source: null }; // prettier-ignore
  const ledger: any = {
    blocks: ['sable', 'tarn', 'wether'].map((code) => ({ code, outlines: code === 'wether' ? [] : [{ ...outline, sha256: code }] })),
    features: [{ block: 'sable', kind: 'rock', sha256: 'rock', name: 'Gannet beds' }],
    directions: [],
  }; // prettier-ignore
  const rock: Geometry = { type: 'Point', coordinates: [21, 1] };
  const points = knownPoints(ledger, (sha256) => (sha256 === 'rock' ? rock : geometryOf(sha256)));

  it('is a block’s rock, else the middle of its outline, and is named', () => {
    expect(points['sable']).toEqual({ lat: 1, lon: 21, words: 'Gannet beds' });
    expect(points['tarn']).toEqual({ lat: 0, lon: -160, words: 'the middle of its outline' });
    expect(points['wether']).toBeUndefined();
  });

  it('is said in the form, as is a point of the link', () => {
    const of = (path_block: string, path_lat: number | null, path_lon: number | null) => ({ path_block, path_lat, path_lon }); // prettier-ignore
    expect(pointWords(of('sable', 1, 21), of('', null, null), points['sable'])).toContain('Gannet beds');
    expect(pointWords(of('sable', 2, 20), of('sable', 2, 20), points['sable'])).toContain(
      'that the link passes',
    );
    expect(pointWords(of('sable', 3, 20), of('sable', 2, 20), points['sable'])).toContain('typed here');
    expect(pointWords(of('wether', null, null), of('', null, null), undefined)).toContain('No point yet');
  });

  it('and keeps its block in the address only with a point', () => {
    const { settings } = settingsFromLink({}, usual);
    expect(sliceSearch({ ...settings, path_block: 'tarn', path_lat: 0, path_lon: -160 }, '7')).toContain('path_block=tarn'); // prettier-ignore
    expect(sliceSearch({ ...settings, path_block: 'tarn' }, '7')).not.toContain('path_block');
  });
});

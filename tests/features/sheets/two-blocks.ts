/** A small subject: Sable turns with Wether about the axis, Tarn lies on the other side of the globe. */
import type { Geometry } from 'geojson';
import { compileModel, type RotationInput } from '~/kernel/rotations';
import type { SliceSubject } from '~/features/sheets/slice/subject';

const square = (lon: number, lat: number): Geometry => ({
  type: 'Polygon',
  coordinates: [[[lon - 5, lat - 5], [lon + 5, lat - 5], [lon + 5, lat + 5], [lon - 5, lat + 5], [lon - 5, lat - 5]]],
}); // prettier-ignore

const SHAPES: Readonly<Record<string, Geometry>> = {
  sable: square(20, 0),
  tarn: square(-160, 0),
  coast: { type: 'LineString', coordinates: [[18, -2], [22, 2]] },
}; // prettier-ignore

const row = (block: string, relative_to: string, age_ma: number, source: string): RotationInput => ({
  id: `${block} ${age_ma}`, block, relative_to, age_ma, pole_lat: 80, pole_lon: 0, angle_deg: age_ma / 4, source,
  evidence: 'published', covariance: null, cov_dof: null, age_two_sigma_ma: null,
}); // prettier-ignore

const life = { appears_ma: null, disappears_ma: null };
const outline = (sha256: string, source: string) => ({
  sha256, source, inside: 'smaller' as const, outline_older_ma: null, outline_younger_ma: null,
}); // prettier-ignore

export const twoBlocks: SliceSubject = {
  title: 'Two blocks',
  version: 'Version 1, sha256 0000 0000',
  licence: 'CC BY 4.0',
  date: '1 May 2024',
  model: compileModel(
    [
      { code: 'sable', kind: 'terrane', ...life },
      { code: 'wether', kind: 'craton', ...life },
      { code: 'tarn', kind: 'terrane', ...life },
      { code: 'axis', kind: 'frame', ...life },
    ],
    [
      row('sable', 'wether', 20, 'Sable at 20'),
      row('sable', 'wether', 60, 'Sable at 60'),
      row('sable', 'wether', 100, 'Sable at 100'),
      row('wether', 'axis', 100, 'Wether at 100'),
      row('tarn', 'axis', 100, 'Tarn at 100'),
    ],
  ),
  frame: { code: 'axis', name: 'Axis' },
  blocks: [
    { code: 'sable', name: 'Sable', evidence: 'published', source: 'Sable itself', outlines: [outline('sable', 'Sable’s outline')] },
    { code: 'wether', name: 'Wether', evidence: 'published', source: 'Wether itself', outlines: [] },
    { code: 'tarn', name: 'Tarn', evidence: 'fitted', source: null, outlines: [outline('tarn', 'Tarn’s outline')] },
    { code: 'axis', name: 'Axis', evidence: 'unconstrained', source: null, outlines: [] },
  ],
  coasts: [{ block: 'sable', sha256: 'coast', source: 'Coast', appears_ma: null, disappears_ma: null }],
  geometryOf: (sha256) => SHAPES[sha256]!,
}; // prettier-ignore

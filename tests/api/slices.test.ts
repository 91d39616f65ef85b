/** Time slices over HTTP: what stands on the page, in each format. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { seedIfEmpty } from '~/db/seed';
import { CAUTION_LINE } from '~/features/sheets/slice/caution';
import { closeWorkers } from '~/server/workers';
import { createTestApp, type TestApp } from '../support/app';
import { readPdf, readPng } from '../support/picture';

let app: TestApp;
const slice = (format: string, query: string) =>
  app.respond('GET', `/api/projects/lantern-sea/slice.${format}?${query}`);
const PATH = 'path_block=sable&path_lat=-29.6&path_lon=41.2';

beforeAll(async () => {
  app = await createTestApp({ DRIFTWRIGHT_DEMO: 'on' });
  await seedIfEmpty(app.db, { demo: true });
}, 120_000);
afterAll(async () => {
  await closeWorkers();
  await app.close();
});

const words = (svg: string): string =>
  [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map((m) => m[1]!.replaceAll('&amp;', '&')).join(' ');

describe('SVG', () => {
  it('names age, frame, version, projection, sources, licence and the caution line, as text', async () => {
    const answer = await slice(
      'svg',
      `age_ma=62.4&projection=mollweide&centre_lon=36&version=7&relative_to=spin-axis&${PATH}`,
    );
    expect(answer.status).toBe(200);
    expect(answer.headers.get('content-type')).toBe('image/svg+xml');
    expect(answer.headers.get('content-security-policy')).toContain("default-src 'none'");
    expect(answer.headers.get('cache-control')).toContain('immutable');
    const svg = await answer.text();
    const text = words(svg).replace(/[\u00a0\u2009]/g, ' ');
    for (const part of [
      '62.4 Ma',
      'Danian',
      'spin axis',
      'Version 7',
      'Mollweide',
      'Tolland et al. 2021',
      'Merrow 2014',
      'CC BY 4.0',
      'ICS',
      'km at the centre',
      '30° N',
      'Sable',
    ]) {
      expect(text).toContain(part);
    }
    expect(text).toContain(CAUTION_LINE.slice(0, 60));
    expect(svg.includes('data:font/woff2;base64,')).toBe(true);
    expect([...svg.matchAll(/data-block="([\w-]+)"/g)].map((m) => m[1]).sort()).toEqual([
      'corrie',
      'fennick',
      'marl',
      'old-harrow',
      'quill',
      'sable',
      'stannard',
      'tarn',
      'tessel',
      'wether',
    ]);
    expect(svg.match(/class="row"/g)!.length).toBeGreaterThan(10);
    expect(svg.includes('class="ellipse"')).toBe(true);
  });

  it('draws nothing that was turned off, whatever else is asked', async () => {
    const svg = await (await slice('svg', 'age_ma=0&layers=')).text();
    for (const part of ['class="graticule"', 'class="coast"', 'class="velocity"'])
      expect(svg.includes(part)).toBe(false);
    expect(words(svg)).toContain('A reconstruction is a model');
    const arrows = await (await slice('svg', 'age_ma=62.4&layers=velocity')).text();
    expect(arrows.includes('class="velocity"')).toBe(true);
  });

  it('escapes what the user wrote', async () => {
    const svg = await (
      await slice('svg', `age_ma=0&title=${encodeURIComponent('<script>alert(1)</script>')}`)
    ).text();
    expect(svg.includes('<script')).toBe(false);
    expect(svg.includes('&lt;script&gt;')).toBe(true);
  });

  it.each([
    'equal-earth',
    'mollweide',
    'robinson',
    'lambert-azimuthal',
    'orthographic',
    'polar-stereographic',
    'mercator',
  ])('%s', async (projection) => {
    const answer = await slice('svg', `age_ma=100&projection=${projection}&centre_lat=-20&centre_lon=30`);
    expect(answer.status).toBe(200);
    const svg = await answer.text();
    expect(svg.match(/class="block"/g)!.length).toBeGreaterThan(3);
    expect(/NaN|Infinity/.test(svg.replace(/<style>.*?<\/style>/s, ''))).toBe(false);
  });

  it('says why it cannot', async () => {
    expect((await slice('svg', 'age_ma=-5')).status).toBe(400);
    expect((await slice('svg', 'age_ma=10&projection=flat')).status).toBe(400);
    expect((await slice('svg', 'age_ma=10&relative_to=nobody')).status).toBe(404);
    expect((await slice('gif', 'age_ma=10')).status).toBe(404);
    expect((await slice('svg', 'age_ma=10&path_block=sable&path_lat=-29')).status).toBe(400);
    const older = words(await (await slice('svg', 'age_ma=190&relative_to=mantle')).text());
    expect(older).toContain('Without a place at this age');
    expect(older).toContain('outside rotations');
  });
});

/** ISO 216, millimetres, long side first. */
const PAPERS = { a3: [420, 297], a4: [297, 210], a5: [210, 148] } as const;
const SHEETS = (['a3', 'a4', 'a5'] as const).flatMap((paper) =>
  (['landscape', 'portrait'] as const).map((orientation) => {
    const [long, short] = PAPERS[paper];
    return { paper, orientation, mm: orientation === 'landscape' ? [long, short] : [short, long] };
  }),
);
/** Where the map lies on every sheet, and where nothing is printed. */
const MAP = { left: 0.2, right: 0.8, top: 0.3, bottom: 0.5 };
const MARGIN = { left: 0.005, right: 0.02, top: 0.02, bottom: 0.97 };

describe('PNG and PDF', () => {
  it.each(SHEETS)(
    'PNG on $paper $orientation has the size of the paper and colours in the map',
    async (sheet) => {
      const answer = await slice(
        'png',
        `age_ma=62.4&dpi=72&paper=${sheet.paper}&orientation=${sheet.orientation}`,
      );
      const png = readPng(new Uint8Array(await answer.arrayBuffer()));
      const [width, height] = sheet.mm.map((mm) => (mm / 25.4) * 72);
      expect(png.width).toBe(Math.round(width!));
      expect(Math.abs(png.height - height!)).toBeLessThanOrEqual(1);
      expect(png.colours(MAP)).toBeGreaterThan(20);
      expect(png.colours(MARGIN)).toBe(1);
    },
    60_000,
  );

  it.each(SHEETS)(
    'PDF on $paper $orientation has the size of the paper and its text',
    async (sheet) => {
      const answer = await slice(
        'pdf',
        `age_ma=62.4&version=7&paper=${sheet.paper}&orientation=${sheet.orientation}&${PATH}`,
      );
      const bytes = new Uint8Array(await answer.arrayBuffer());
      expect(Buffer.from(bytes).toString('latin1').includes('/FontFile2')).toBe(true);
      const { width, height, text } = await readPdf(bytes);
      const [w, h] = sheet.mm.map((mm) => (mm / 25.4) * 72);
      expect(Math.abs(width - w!)).toBeLessThan(0.1);
      expect(Math.abs(height - h!)).toBeLessThan(0.1);
      for (const part of [
        'Closing of the Lantern Sea, 62.4 Ma',
        'Version 7',
        'Merrow 2014',
        'A reconstruction is a model',
        'Equal Earth',
        'Old Harrow',
      ])
        expect(text).toContain(part);
    },
    60_000,
  );
});

describe('GeoJSON', () => {
  it('is the same slice: outlines within ±180°, closed, with what it is said beside', async () => {
    const answer = await slice('geojson', 'age_ma=62.4');
    const data = await answer.json();
    expect(data).toMatchObject({
      type: 'FeatureCollection',
      age_ma: 62.4,
      relative_to: 'spin-axis',
      caution: CAUTION_LINE,
    });
    const outlines = data.features.filter((f: any) => f.properties.kind === 'outline');
    expect(outlines).toHaveLength(10);
    for (const { geometry } of outlines) {
      const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
      for (const ring of polygons.flat()) {
        expect(ring[0]).toEqual(ring.at(-1));
        for (const [lon, lat] of ring) {
          expect(Math.abs(lon)).toBeLessThanOrEqual(180);
          expect(Math.abs(lat)).toBeLessThanOrEqual(90);
        }
      }
    }
  });

  it('at 0 Ma holds the outlines as they were entered', async () => {
    const now = await (await slice('geojson', 'age_ma=0')).json();
    const entered = JSON.parse(
      await (await app.respond('GET', '/api/projects/lantern-sea/exports/blocks.geojson')).text(),
    );
    const at = (data: any, code: string) =>
      data.features.find((f: any) => (f.properties.block ?? f.properties.code) === code);
    const ring = (feature: any): number[][] =>
      feature.geometry.type === 'Polygon'
        ? feature.geometry.coordinates[0]
        : feature.geometry.coordinates[0][0];
    const drawn = ring(at(now, 'sable'));
    for (const [lon, lat] of ring(at(entered, 'sable'))) {
      const nearest = Math.min(...drawn.map(([x, y]) => Math.hypot(x! - lon!, y! - lat!)));
      expect(nearest).toBeLessThan(1e-5);
    }
  });
});

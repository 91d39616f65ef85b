import { describe, expect, it } from 'vitest';
import { sliceQuery } from '~/features/sheets/contract';
import { carry } from '~/features/sheets/slice/carried';
import { drawnOf, type Drawn } from '~/features/sheets/slice/drawn';
import { layOut, LEAST_MAP } from '~/features/sheets/slice/layout';
import { slicePage } from '~/features/sheets/slice/page';
import type { TextStyle } from '~/features/sheets/slice/svg';
import { textWidth } from '~/features/sheets/slice/text-width';
import { twoBlocks } from './two-blocks';

const TITLE = 'The narrow sea between the two blocks in the frame of the spin axis, with everything that is known of how they moved from one row to the next, drawn again'; // prettier-ignore
const CAPTION = 'Sable and Tarn part along a margin that nobody has dated. '.repeat(10);
const SHEETS = (['a3', 'a4', 'a5'] as const).flatMap((paper) =>
  (['landscape', 'portrait'] as const).map((orientation) => ({ paper, orientation })),
);
const names = (n: number, name: string) => Array.from({ length: n }, (_, i) => `${name} ${i + 1}`);
const query = (part: Record<string, unknown>) =>
  sliceQuery.parse({ age_ma: '40', layers: 'coasts,velocity,names,graticule', ...part });

interface Set {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly size: number;
  readonly text: string;
}

/** Texts of a page outside its map. */
function texts(svg: string): Set[] {
  const outside = svg.replace(/<g class="map">.*<\/g>(?=<path class="rule")/s, '');
  return [...outside.matchAll(/<text ([^>]*)>([^<]*)<\/text>/g)].map(([, attributes, text]) => {
    const read = (name: string) => new RegExp(` ?\\b${name}="([^"]*)"`).exec(attributes!)?.[1] ?? '';
    const style: TextStyle = {
      family: read('font-family').includes('Serif') ? 'Source Serif 4' : 'Inter',
      size: Number(read('font-size')),
      weight: Number(read('font-weight')) as 400,
      italic: read('font-style') === 'italic',
    };
    return { x: Number(read('x')), y: Number(read('y')), width: textWidth(text!, style), size: style.size, text: text! }; // prettier-ignore
  });
}

const many: Drawn = {
  ...drawnOf(carry(twoBlocks, 40, 'axis'), null, ['coasts'], null),
  missing: names(80, 'Block').map((name) => ({ name, status: 'outside rotations' as const })),
  sources: names(200, 'Author and others'),
};

describe.each(SHEETS)('$paper $orientation', (sheet) => {
  it.each([
    ['plain', {}],
    ['a title of 150 characters and a caption of 600', { title: TITLE, caption: CAPTION.slice(0, 600) }],
    ['a title without spaces', { title: 'W'.repeat(150) }],
  ])('%s: no text leaves the sheet’s margins or lies on another', (_, part) => {
    const asked = query({ ...sheet, ...part });
    const carried = { ...carry(twoBlocks, 40, 'axis'), missing: many.missing };
    const { svg, width_pt, height_pt } = slicePage({ subject: twoBlocks, carried, query: asked, path: null });
    const { margin } = layOut(twoBlocks, many, asked);
    const set = texts(svg);
    expect(set.length).toBeGreaterThan(8);
    for (const { x, y, width } of set) {
      expect(x).toBeGreaterThanOrEqual(margin - 0.01);
      expect(x + width).toBeLessThanOrEqual(width_pt - margin + 0.5);
      expect(y).toBeLessThanOrEqual(height_pt - margin);
    }
    for (const [i, a] of set.entries())
      for (const b of set.slice(i + 1)) {
        const beside = a.x + a.width <= b.x + 0.5 || b.x + b.width <= a.x + 0.5;
        const apart = Math.abs(a.y - b.y) >= 0.9 * Math.min(a.size, b.size);
        expect(beside || apart, `"${a.text}" on "${b.text}"`).toBe(true);
      }
  });

  it('the map keeps its share of the height, whatever there is to list', () => {
    for (const part of [{}, { title: TITLE, caption: CAPTION.slice(0, 600) }]) {
      const { map, height, foot } = layOut(twoBlocks, many, query({ ...sheet, ...part }));
      expect(map.height).toBeGreaterThanOrEqual(LEAST_MAP * height - 0.01);
      const said = [...foot.left.lines, ...foot.right.lines].map(({ text }) => text).join(' ');
      expect(said).toMatch(/Without a place at this age: .*\d+( more)?, see the GeoJSON\./);
      expect(said).toMatch(/Sources: .*\d+( more)?, see the GeoJSON\./);
    }
  });
});

it('a title that was cut into lines says the whole of it', () => {
  const { svg } = slicePage({ subject: twoBlocks, carried: carry(twoBlocks, 40, 'axis'), query: query({ title: TITLE }), path: null }); // prettier-ignore
  expect(texts(svg).map(({ text }) => text).join(' ')).toContain(TITLE); // prettier-ignore
});

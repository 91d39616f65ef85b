import { describe, expect, it } from 'vitest';
import { centreWords } from '~/features/sheets/slice/caption';
import { fitProjection } from '~/kernel/cartography/projections';

const plain = (text: string): string => text.replace(/\u00a0/g, ' ');

describe('where a map is centred', () => {
  it('is named by coordinates, to a tenth where a tenth was asked', () => {
    expect(plain(centreWords({ lat: -21, lon: 32 }))).toBe('21° S, 32° E');
    expect(plain(centreWords({ lat: -21.2, lon: 32 }))).toBe('21.2° S, 32.0° E');
  });

  it('at a pole by the meridian that runs straight down or up, as it is drawn', () => {
    expect(plain(centreWords({ lat: 90, lon: 20 }))).toBe('90° N, meridian 20° E down');
    expect(plain(centreWords({ lat: -90, lon: -60 }))).toBe('90° S, meridian 60° W up');
    const box = { x: 0, y: 0, width: 100, height: 100 };
    for (const [lat, lon] of [
      [90, 20],
      [-90, -60],
    ] as const) {
      const projection = fitProjection('polar-stereographic', { lat, lon }, box);
      const [x, y] = projection([lon, lat * 0.5])!;
      expect(x).toBeCloseTo(50, 6);
      expect(Math.sign(y - 50)).toBe(Math.sign(lat));
    }
  });
});

import { expect, it } from 'vitest';
import { PathBytes } from '~/features/sheets/slice/path-bytes';

const written = (value: number): string => {
  const bytes = new PathBytes();
  bytes.number(value);
  return bytes.text();
};

it('numbers of path data read as rounding to hundredths prints them', () => {
  const values = [
    0, -0, 0.004, -0.004, 0.005, -0.005, 0.05, -0.05, 0.1, 9.995, 10, -10.5, 99.999, 123.45, 841.89, 1e9,
  ];
  for (let i = 0; i < 2000; i++) values.push((i * 7919.137) % 1190, -((i * 104.729) % 50));
  for (const value of values) expect(written(value)).toBe(String(Math.round(value * 100) / 100));
});

it('grows as it is written, and begins again when cleared', () => {
  const bytes = new PathBytes();
  for (let i = 0; i < 3000; i++) bytes.number(12.25);
  expect(bytes.text()).toBe('12.25'.repeat(3000));
  bytes.clear();
  bytes.sign(90);
  expect(bytes.text()).toBe('Z');
});

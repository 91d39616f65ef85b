/**
 * Frame times of the globe in a browser without GPU: 300 moving blocks at 5,000, 20,000 and 100,000 vertices, against
 * d3-geo drawing the same blocks with the same fills. Ours drops what a pixel cannot show while it moves; the last row
 * draws every vertex, as d3-geo always does.
 */
import type { Renderer } from './page/globe';
import path from 'node:path';
import { build } from 'esbuild';
import { chromium } from 'playwright';

export interface BenchRow {
  readonly name: string;
  readonly ours: number;
  readonly reference: number;
  /** reference / ours: above 1 where ours is faster. */
  readonly ratio: number;
  readonly unit: string;
}

/** First frames, while the browser compiles. */
const WARM_UP = 10;

const FLAGS = [
  '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking',
  '--disable-component-update', '--disable-sync',
]; // prettier-ignore

export const p95 = (times: readonly number[]): number => {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(0.95 * sorted.length) - 1)] ?? NaN;
};

export default async function globe(frames = 120, size = 1000): Promise<BenchRow[]> {
  const page = await bundle();
  const browser = await chromium.launch({
    executablePath: process.env['CHROMIUM_PATH'] ?? '/usr/bin/chromium',
    args: FLAGS,
  });
  try {
    const tab = await browser.newPage();
    await tab.setContent('<!doctype html><title>bench</title><body></body>');
    await tab.addScriptTag({ content: page });
    const rows: BenchRow[] = [];
    const measure = async (which: Renderer, vertices: number) => {
      const { frames: times } = await tab.evaluate(([name, n, f, s]) => window.globeBench(name, n, f, s), [
        which,
        vertices,
        frames,
        size,
      ] as [Renderer, number, number, number]);
      return p95(times.slice(WARM_UP));
    };
    for (const vertices of [5_000, 20_000, 100_000]) {
      const reference = await measure('d3', vertices);
      const kinds: Renderer[] = vertices === 100_000 ? ['ours', 'every vertex'] : ['ours'];
      for (const which of kinds) {
        const ours = await measure(which, vertices);
        const how = which === 'ours' ? 'level of detail' : which;
        rows.push({
          name: `${vertices.toLocaleString('en')} vertices, 300 moving blocks, ${how}, p95`,
          ours: tenth(ours),
          reference: tenth(reference),
          ratio: tenth(reference / ours),
          unit: 'ms',
        });
      }
    }
    return rows;
  } finally {
    await browser.close();
  }
}

const tenth = (value: number): number => Math.round(value * 10) / 10;

/** The page's script; run from the project's folder, as npm does. */
async function bundle(): Promise<string> {
  const result = await build({
    entryPoints: [path.resolve('tests/bench/page/globe.ts')],
    bundle: true,
    format: 'iife',
    platform: 'browser',
    target: 'es2022',
    write: false,
  });
  return result.outputFiles[0]?.text ?? '';
}

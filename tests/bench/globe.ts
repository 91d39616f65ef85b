/**
 * Frame times of the globe in a browser without GPU: 300 moving blocks at 5,000, 20,000 and 100,000 vertices, ours
 * against d3-geo drawing the same blocks with the same fills.
 */
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

const FLAGS = [
  '--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking',
  '--disable-component-update', '--disable-sync',
]; // prettier-ignore

export const p95 = (times: readonly number[]): number => {
  const sorted = [...times].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.ceil(0.95 * sorted.length) - 1)] ?? NaN;
};

export async function globe(frames = 120, size = 1000): Promise<BenchRow[]> {
  const page = await bundle();
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM ?? '/usr/bin/chromium',
    args: FLAGS,
  });
  try {
    const tab = await browser.newPage();
    await tab.setContent('<!doctype html><title>bench</title><body></body>');
    await tab.addScriptTag({ content: page });
    const rows: BenchRow[] = [];
    for (const vertices of [5_000, 20_000, 100_000]) {
      const measure = async (which: 'ours' | 'd3') => {
        const { frames: times } = await tab.evaluate(([name, n, f, s]) => window.globeBench(name, n, f, s), [
          which,
          vertices,
          frames,
          size,
        ] as ['ours' | 'd3', number, number, number]);
        return p95(times.slice(10));
      };
      const ours = await measure('ours');
      const reference = await measure('d3');
      rows.push({
        name: `globe frame, ${vertices.toLocaleString('en')} vertices in 300 moving blocks, p95`,
        ours,
        reference,
        ratio: reference / ours,
        unit: 'ms',
      });
    }
    return rows;
  } finally {
    await browser.close();
  }
}

async function bundle(): Promise<string> {
  const result = await build({
    entryPoints: [new URL('./globe-page.ts', import.meta.url).pathname],
    bundle: true,
    format: 'iife',
    platform: 'browser',
    target: 'es2022',
    write: false,
  });
  return result.outputFiles[0]?.text ?? '';
}

/** npm run bench: each part measured against a reference doing the same work in the same run; prints ratios. */
import path from 'node:path';
import fs from 'node:fs';
import { pathToFileURL } from 'node:url';
import { requireChromium } from './lib/chromium.mjs';
import { install, requireNode, root } from './lib/steps.mjs';

requireNode();
await install();
process.env.CHROMIUM_PATH = requireChromium();
const { build } = await import('esbuild');
const only = process.argv[2];
const folder = path.join(root, 'tests/bench');
const cache = path.join(root, 'node_modules/.cache/bench');

for (const file of fs
  .readdirSync(folder)
  .filter((f) => /^[a-z-]+\.ts$/.test(f))
  .sort()) {
  const name = path.parse(file).name;
  if (only && only !== name) continue;
  const outfile = path.join(cache, `${name}.mjs`);
  await build({
    entryPoints: [path.join(folder, file)],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    alias: { '~': path.join(root, 'src') },
    logLevel: 'error',
  });
  const { default: bench } = await import(pathToFileURL(outfile).href);
  console.log(`\n${name}`);
  for (const row of await bench()) {
    const cells = [
      row.name,
      `${row.ours} ${row.unit}`,
      `${row.reference} ${row.unit}`,
      row.ratio === null ? '' : `× ${row.ratio}`,
    ];
    console.log('  ' + cells.map((cell, i) => String(cell).padEnd([58, 20, 20, 12][i])).join(''));
  }
}
process.exit(0);

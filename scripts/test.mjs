/** npm test: types, lint, unit and API tests, then the browser tests, with whatever they need installed. */
import { requireChromium } from './lib/chromium.mjs';
import { bin, build, install, requireNode, run } from './lib/steps.mjs';

const long = process.argv.includes('--long');

requireNode();
await install();
const chromium = requireChromium();
const env = {
  ...process.env,
  CHROMIUM_PATH: chromium,
  ASTRO_TELEMETRY_DISABLED: '1',
  ...(long ? { LONG: '1' } : {}),
};

const STEPS = [
  ['Types', () => run(bin('astro'), ['check', '--minimumFailingSeverity', 'error'], { env })],
  ['Lint', () => run(bin('eslint'), ['.', '--cache', '--cache-location', '.cache/eslint', '--max-warnings', '0'], { env })],
  ['Format', () => run(bin('prettier'), ['--check', '.', '--cache', '--cache-location', '.cache/prettier', '--log-level', 'warn'], { env })],
  ['Build', async () => { await build(); return 0; }],
  ['Unit and API tests', () => run(bin('vitest'), ['run'], { env })],
  ['Browser tests', () => run(bin('playwright'), ['test'], { env })],
]; // prettier-ignore

const failed = [];
for (const [name, step] of STEPS) {
  const started = Date.now();
  console.log(`\n${name} …`);
  if ((await step()) !== 0) failed.push(name);
  console.log(
    `${name}: ${failed.at(-1) === name ? 'failed' : 'passed'} in ${Math.round((Date.now() - started) / 1000)} s`,
  );
}
if (failed.length > 0) console.error(`\nFailed: ${failed.join(', ')}`);
console.log(`\n${STEPS.length - failed.length} passed, ${failed.length} failed`);
process.exit(failed.length > 0 ? 1 : 0);

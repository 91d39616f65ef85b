/** Steps that the start and test commands share. Plain Node: they run before anything is installed. */
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..');
const stamps = path.join(root, 'node_modules/.cache/driftwright');

/** Runs a command to its end. @returns its exit code. */
export function run(command, args, options = {}) {
  return new Promise((resolve, reject) => {
    const child = spawn(command, args, { cwd: root, stdio: 'inherit', ...options });
    child.on('error', reject);
    child.on('close', (code, signal) => resolve(code ?? (signal ? 1 : 0)));
  });
}

/** Runs a command and ends this process where it fails. */
export async function must(what, command, args, options) {
  const code = await run(command, args, options);
  if (code !== 0) {
    console.error(`${what} failed (exit code ${code}).`);
    process.exit(code);
  }
}

function* filesUnder(entry) {
  const full = path.join(root, entry);
  if (!fs.existsSync(full)) return;
  if (fs.statSync(full).isFile()) {
    yield entry;
    return;
  }
  for (const name of fs.readdirSync(full).sort()) yield* filesUnder(path.join(entry, name));
}

/** sha256 over names and contents, so that a step is done again exactly when its inputs changed. */
export function hashOf(entries) {
  const hash = createHash('sha256');
  for (const entry of entries) {
    for (const file of filesUnder(entry))
      hash
        .update(file)
        .update('\0')
        .update(fs.readFileSync(path.join(root, file)));
  }
  return hash.update(process.version).digest('hex');
}

const read = (file) => (fs.existsSync(file) ? fs.readFileSync(file, 'utf8') : null);

/** Does a step unless its stamp says that these inputs were done already and `product` is there. */
export async function once(name, inputs, product, step) {
  const file = path.join(stamps, name);
  const hash = hashOf(inputs);
  if (read(file) === hash && fs.existsSync(path.join(root, product))) return;
  await step();
  fs.mkdirSync(stamps, { recursive: true });
  fs.writeFileSync(file, hash);
}

const npm = process.platform === 'win32' ? 'npm.cmd' : 'npm';
const bin = (name) => path.join(root, 'node_modules/.bin', name);

export function requireNode() {
  const [major] = process.versions.node.split('.').map(Number);
  if (major >= 20) return;
  console.error(`Driftwright needs Node.js 20 or newer; this is ${process.version}.`);
  process.exit(1);
}

export const install = () =>
  once('installed', ['package.json', 'package-lock.json', '.npmrc'], 'node_modules/astro', () => {
    console.log('Installing packages …');
    return must('Installing', npm, ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
  });

const BUILD_INPUTS = [
  'package-lock.json', 'astro.config.mjs', 'tailwind.config.mjs', 'tsconfig.json', 'scripts/vite-node-worker.mjs',
  'scripts/precompress.mjs', 'src', 'public', 'drizzle',
]; // prettier-ignore

export const build = () =>
  once('built', BUILD_INPUTS, 'dist/server/entry.mjs', async () => {
    console.log('Building …');
    const env = { ...process.env, ASTRO_TELEMETRY_DISABLED: '1' };
    await must('Building', bin('astro'), ['build', '--silent'], { env });
    await must('Compressing', process.execPath, ['scripts/precompress.mjs']);
  });

export { bin };

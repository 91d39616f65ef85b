/** Finds Chromium, or installs Debian's package where this user may. */
import { spawnSync } from 'node:child_process';
import fs from 'node:fs';

const PLACES = [
  '/usr/bin/chromium',
  '/usr/bin/chromium-browser',
  '/usr/bin/google-chrome',
  '/snap/bin/chromium',
];

/** Flags for a machine without GPU and without a way out to the network. */
export const CHROMIUM_FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export function findChromium() {
  const named = process.env.CHROMIUM_PATH;
  return [named, ...PLACES].find((place) => place && fs.existsSync(place)) ?? null;
}

/** @returns the browser's path. Ends the process with a sentence where there is none and none can be installed. */
export function requireChromium() {
  const found = findChromium();
  if (found) return found;
  if (process.getuid?.() === 0 && fs.existsSync('/usr/bin/apt-get')) {
    console.log('Installing Chromium …');
    spawnSync('apt-get', ['update', '-qq'], { stdio: 'inherit' });
    spawnSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], {
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
  }
  const installed = findChromium();
  if (installed) return installed;
  console.error('The browser tests need Chromium: install it, or name its path in CHROMIUM_PATH.');
  process.exit(1);
}

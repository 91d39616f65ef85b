import { defineConfig } from '@playwright/test';
import { CHROMIUM_FLAGS, findChromium } from './scripts/lib/chromium.mjs';

const port = Number(process.env.E2E_PORT ?? 4390);

export default defineConfig({
  testDir: 'tests/e2e',
  timeout: 60_000,
  expect: { timeout: 10_000 },
  workers: 1,
  retries: 0,
  reporter: [['list']],
  use: {
    baseURL: `http://127.0.0.1:${port}`,
    viewport: { width: 1440, height: 900 },
    launchOptions: { executablePath: findChromium() ?? undefined, args: CHROMIUM_FLAGS },
    trace: 'retain-on-failure',
  },
  webServer: {
    command: 'node server.mjs',
    url: `http://127.0.0.1:${port}/api/health`,
    env: { PORT: String(port), DATA_DIR: 'memory://', DRIFTWRIGHT_DEMO: '1' },
    timeout: 90_000,
    reuseExistingServer: false,
  },
});

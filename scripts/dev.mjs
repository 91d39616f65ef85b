/** npm run dev: Astro's dev server with reload, on the same data folder and settings as npm start. */
import { bin, install, must, requireNode } from './lib/steps.mjs';

requireNode();
await install();
const args = ['dev', '--host', process.env.HOST ?? '127.0.0.1', '--port', process.env.PORT ?? '4321'];
await must('The dev server', bin('astro'), args, { env: { ...process.env, ASTRO_TELEMETRY_DISABLED: '1' } });

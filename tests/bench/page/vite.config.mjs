/** Serves the workbench's islands on the demo tables, without server or database: `npx vite -c tests/bench/page/vite.config.mjs`. */
import tailwindcss from '@tailwindcss/vite';
import react from '@vitejs/plugin-react';
import { defineConfig } from 'vite';

export default defineConfig({
  root: import.meta.dirname,
  plugins: [react(), tailwindcss()],
  resolve: { alias: { '~': new URL('../../../src', import.meta.url).pathname } },
  server: { port: 4420, strictPort: true, fs: { allow: ['../../..'] } },
});

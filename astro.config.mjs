import node from '@astrojs/node';
import react from '@astrojs/react';
import tailwindcss from '@tailwindcss/vite';
import { defineConfig } from 'astro/config';
import { nodeWorker } from './scripts/vite-node-worker.mjs';

export default defineConfig({
  output: 'server',
  adapter: node({ mode: 'middleware' }),
  integrations: [react()],
  devToolbar: { enabled: false },
  // The build-time host list cannot know a deployment's name; src/middleware.ts checks the
  // origin of every unsafe request instead, JSON included.
  security: { checkOrigin: false },
  experimental: {
    csp: {
      // The one style element that react-aria-components puts into the page by script.
      styleDirective: { hashes: ['sha256-38RhXrc7EdReTKsOm23ZPOCUgniTUUcjky8QOOrQx6o='] },
      directives: [
        "default-src 'self'",
        "img-src 'self' data: blob:",
        "font-src 'self'",
        "connect-src 'self'",
        "object-src 'none'",
        "base-uri 'none'",
        "form-action 'self'",
        "frame-ancestors 'none'",
      ],
    },
  },
  vite: {
    plugins: [tailwindcss(), nodeWorker()],
    ssr: { external: ['@electric-sql/pglite', '@node-rs/argon2', '@resvg/resvg-js', 'pdfkit', 'piscina'] },
  },
});

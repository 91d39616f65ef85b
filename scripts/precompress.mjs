/** After a build: static files beside their brotli and gzip forms, so that none is compressed at a request. */
import fs from 'node:fs';
import path from 'node:path';
import { brotliCompressSync, constants, gzipSync } from 'node:zlib';
import { root } from './lib/steps.mjs';

const folder = path.join(root, 'dist/client');
const LEAST_BYTES = 1024;

for (const entry of fs.readdirSync(folder, { recursive: true, withFileTypes: true })) {
  if (!entry.isFile() || !/\.(js|css|svg|html|json|txt|xml)$/.test(entry.name)) continue;
  const file = path.join(entry.parentPath ?? entry.path, entry.name);
  const bytes = fs.readFileSync(file);
  if (bytes.length < LEAST_BYTES) continue;
  const quality = { params: { [constants.BROTLI_PARAM_QUALITY]: 9 } };
  fs.writeFileSync(`${file}.br`, brotliCompressSync(bytes, quality));
  fs.writeFileSync(`${file}.gz`, gzipSync(bytes, { level: 9 }));
}

/** npm start: installs, builds, then serves; the server itself migrates and seeds, since it alone may open the data. */
import { build, install, requireNode, root } from './lib/steps.mjs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';

requireNode();
await install();
await build();
await import(pathToFileURL(path.join(root, 'server.mjs')).href);

/**
 * `npm start`: on a fresh clone installs, builds, migrates and fills in the demo; afterwards only what changed.
 * The server runs in this very process, so that a signal to it reaches it.
 */

import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ensureBuild } from './build.mjs';
import { root } from './lib/provision.mjs';

process.env.NODE_ENV ??= 'production';
await ensureBuild();
await import(pathToFileURL(join(root, 'dist', 'serve.mjs')).href);

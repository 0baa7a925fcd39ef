/** `npm run --silent expand -- FILE|- [--summary]`: see scripts/cli/expand.ts. */
import { pathToFileURL } from 'node:url';
import { ensureBundle } from './lib/provision.mjs';

const bundle = await ensureBundle('scripts/cli/expand.ts', 'cli/expand.mjs', { inline: true });
await import(pathToFileURL(bundle).href);

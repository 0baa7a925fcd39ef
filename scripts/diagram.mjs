/** `npm run --silent diagram -- FILE|-`: see scripts/cli/diagram.ts. */
import { pathToFileURL } from 'node:url';
import { ensureBundle } from './lib/provision.mjs';

const bundle = await ensureBundle('scripts/cli/diagram.ts', 'cli/diagram.mjs', { inline: true });
await import(pathToFileURL(bundle).href);

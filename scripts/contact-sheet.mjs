/** `node scripts/contact-sheet.mjs`: drawings of whole lists on one page each, in .cache/contact-sheets, to be looked at. */
import { pathToFileURL } from 'node:url';
import { ensureBundle } from './lib/provision.mjs';

const bundle = await ensureBundle('scripts/cli/contact-sheet.ts', 'cli/contact-sheet.mjs', { inline: true });
await import(pathToFileURL(bundle).href);

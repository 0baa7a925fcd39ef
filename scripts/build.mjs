/** `npm run build`: pages, our own server and the job process into dist/. `npm start` calls it when sources changed. */
import { existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { extname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { brotliCompressSync, constants, gzipSync } from 'node:zlib';
import { ensureBundle, ensureDependencies, hashOf, root, run, stampMatches, writeStamp } from './lib/provision.mjs';

const SOURCES = [
  'src',
  'db',
  'public',
  'scripts',
  'astro.config.mjs',
  'package.json',
  'package-lock.json',
  'tsconfig.json',
];
const TEXT = new Set(['.css', '.js', '.json', '.svg', '.txt', '.html', '.webmanifest']);
const LEAST_BYTES = 860;

/** Compresses the client's files once, at the highest quality, beside the originals. */
function precompress(folder) {
  for (const entry of readdirSync(folder, { recursive: true, encoding: 'utf8' })) {
    const path = join(folder, entry);
    if (!TEXT.has(extname(entry)) || statSync(path).size < LEAST_BYTES) continue;
    const content = readFileSync(path);
    const params = { [constants.BROTLI_PARAM_QUALITY]: 11, [constants.BROTLI_PARAM_SIZE_HINT]: content.length };
    writeFileSync(`${path}.br`, brotliCompressSync(content, { params }));
    writeFileSync(`${path}.gz`, gzipSync(content, { level: 9 }));
  }
}

export async function ensureBuild() {
  ensureDependencies();
  const wanted = hashOf(SOURCES);
  const made = existsSync(join(root, 'dist', 'server', 'entry.mjs')) && existsSync(join(root, 'dist', 'serve.mjs'));
  if (made && stampMatches('build', wanted)) return;
  console.error('Building …');
  run(join(root, 'node_modules', '.bin', 'astro'), ['build'], {
    env: { ...process.env, ASTRO_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' },
  });
  precompress(join(root, 'dist', 'client'));
  await ensureBundle('src/jobs/expand.ts', 'jobs/expand.mjs');
  await ensureBundle('scripts/serve.ts', 'serve.mjs', { sources: ['db', 'scripts/provide.ts'] });
  writeStamp('build', wanted);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await ensureBuild();

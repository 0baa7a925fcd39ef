/**
 * `npm run dev`: the development server with hot reload. The job process is bundled again whenever its sources change;
 * each job runs in a fresh process, so the next one uses the new code.
 */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ensureBundle, ensureDependencies, root } from './lib/provision.mjs';

ensureDependencies();
const { context } = await import(pathToFileURL(join(root, 'node_modules/esbuild/lib/main.js')).href);
const jobs = await context({
  entryPoints: [join(root, 'src/jobs/expand.ts')],
  outfile: join(root, 'dist/jobs/expand.mjs'),
  bundle: true,
  platform: 'node',
  format: 'esm',
  target: 'node20',
  packages: 'external',
  logLevel: 'warning',
  absWorkingDir: root,
});
await jobs.rebuild();
await jobs.watch();

const provide = await ensureBundle('scripts/provide-data.ts', 'provide-data.mjs', {
  sources: ['db', 'scripts/provide.ts'],
});
await import(pathToFileURL(provide).href);

const astro = spawn(
  join(root, 'node_modules/.bin/astro'),
  ['dev', '--host', process.env.HOST ?? 'localhost', '--port', process.env.PORT ?? '4321'],
  { cwd: root, stdio: 'inherit', env: { ...process.env, ASTRO_TELEMETRY_DISABLED: '1' } },
);
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => astro.kill(signal));
astro.on('exit', async (code) => {
  await jobs.dispose();
  process.exit(code ?? 0);
});

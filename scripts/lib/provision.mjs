/**
 * What a fresh clone needs before anything runs, with Node built-ins only: dependencies that match the lock file,
 * and the small bundles (command line, job processes) that match their sources. Each step compares a hash with a
 * stamp under .cache/ and does nothing when they agree. Messages go to standard error: standard output is the program's.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, lstatSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

export const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));
const cache = join(root, '.cache');

/** SHA-256 over the names and contents of files and folders, in name order. */
export function hashOf(paths) {
  const hash = createHash('sha256');
  const visit = (path) => {
    if (!existsSync(path)) return;
    if (statSync(path).isDirectory()) {
      for (const name of readdirSync(path).sort()) visit(join(path, name));
      return;
    }
    hash.update(path.slice(root.length)).update('\0').update(readFileSync(path)).update('\0');
  };
  for (const path of paths) visit(join(root, path));
  return hash.digest('hex');
}

export function stampMatches(name, value) {
  const file = join(cache, `${name}.stamp`);
  return existsSync(file) && readFileSync(file, 'utf8') === value;
}

export function writeStamp(name, value) {
  mkdirSync(cache, { recursive: true });
  writeFileSync(join(cache, `${name}.stamp`), value);
}

/** Runs a command with its output on standard error. @throws Error when it fails. */
export function run(command, args, options = {}) {
  const result = spawnSync(command, args, { cwd: root, stdio: ['ignore', 2, 2], ...options });
  if (result.error) throw result.error;
  if (result.status !== 0) throw new Error(`${command} ${args.join(' ')} ended with exit code ${result.status}`);
}

/** Installs the locked dependencies when node_modules is missing or was made from another lock file. */
export function ensureDependencies() {
  const wanted = hashOf(['package-lock.json', '.npmrc']);
  const folder = join(root, 'node_modules');
  // A link belongs to another checkout: npm would empty the folder behind it.
  if (lstatSync(folder, { throwIfNoEntry: false })?.isSymbolicLink()) return;
  // npm writes its own lock last: without it an installation was interrupted.
  if (existsSync(join(folder, '.package-lock.json')) && stampMatches('dependencies', wanted)) return;
  console.error('Installing dependencies (npm ci) …');
  run('npm', ['ci', '--include=dev', '--no-fund', '--no-audit']);
  writeStamp('dependencies', wanted);
}

/**
 * Bundles a TypeScript entry for Node into dist/<out> when its sources changed, and returns the bundle's path.
 * Packages stay outside the bundle unless `inline` is set (the command line inlines them, to start fast).
 */
export async function ensureBundle(entry, out, { inline = false, sources = [] } = {}) {
  ensureDependencies();
  const target = join(root, 'dist', out);
  const wanted = hashOf(['src/lib', 'src/jobs', ...sources, entry, 'package-lock.json', 'scripts/lib/provision.mjs']);
  const stamp = `bundle-${out.replace(/[^a-z0-9]+/gi, '-')}`;
  if (existsSync(target) && stampMatches(stamp, wanted)) return target;
  const { build } = await import(pathToFileURL(join(root, 'node_modules/esbuild/lib/main.js')).href);
  await build({
    entryPoints: [join(root, entry)],
    outfile: target,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: inline ? 'bundle' : 'external',
    logLevel: 'warning',
    absWorkingDir: root,
    banner: inline
      ? { js: "import { createRequire as __cr } from 'node:module'; const require = __cr(import.meta.url);" }
      : {},
  });
  writeStamp(stamp, wanted);
  return target;
}

/**
 * `npm test`: everything that must hold, from a fresh clone. Installs what the tests need (dependencies, Debian's
 * chromium), then format and lint, types, and the unit, API and browser tests. Ends with `N passed, N failed`.
 */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBundle, ensureDependencies, root } from './lib/provision.mjs';

const CHROMIUM = process.env.CHROME ?? '/usr/bin/chromium';
const report = join(root, '.cache', 'vitest.json');

function step(title, command, args) {
  console.log(`\n— ${title}`);
  const started = Date.now();
  const { status } = spawnSync(command, args, { cwd: root, stdio: ['ignore', 'inherit', 'inherit'] });
  console.log(`  ${status === 0 ? 'passed' : 'FAILED'} in ${((Date.now() - started) / 1000).toFixed(1)} s`);
  return status === 0;
}

function ensureChromium() {
  if (existsSync(CHROMIUM)) return;
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get')) {
    console.error(
      `The browser tests need Chromium at ${CHROMIUM}. Install it (on Debian: apt-get install chromium) or set CHROME to its path; this account may not install packages.`,
    );
    process.exit(1);
  }
  const apt = (args) =>
    spawnSync('apt-get', args, { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } }).status;
  if (apt(['update', '-q']) !== 0 || apt(['install', '-y', '-q', '--no-install-recommends', 'chromium']) !== 0) {
    console.error('Installing chromium failed: see the lines above.');
    process.exit(1);
  }
}

ensureDependencies();
ensureChromium();
mkdirSync(join(root, '.cache'), { recursive: true });
rmSync(report, { force: true });

const bin = (name) => join(root, 'node_modules', '.bin', name);
const gates = [
  step('format and lint', bin('biome'), ['ci', '.']),
  step('types', bin('astro'), ['check', '--minimumSeverity', 'error']),
];
// Built here, once: test files in processes of their own would otherwise build at the same time.
const { ensureBuild } = await import('./build.mjs');
await ensureBuild();
await ensureBundle('scripts/cli/expand.ts', 'cli/expand.mjs', { inline: true });
await ensureBundle('scripts/cli/diagram.ts', 'cli/diagram.mjs', { inline: true });
const only = process.argv.slice(2);
const testsRan = step('unit, API and browser tests', bin('vitest'), [
  'run',
  '--reporter=default',
  '--reporter=json',
  `--outputFile.json=${report}`,
  ...only,
]);

let passed = gates.filter(Boolean).length;
let failed = gates.length - passed;
if (existsSync(report)) {
  const result = JSON.parse(readFileSync(report, 'utf8'));
  passed += result.numPassedTests;
  failed += result.numFailedTests;
  // A file that fails to load has no tests to count, yet it has failed.
  failed += result.testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0).length;
} else failed += 1;
if (!testsRan && failed === 0) failed = 1;

console.log(`\n${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);

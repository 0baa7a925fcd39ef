/**
 * `npm run bench [name …]`: every measurement of scripts/bench/, one after the other. Each prints ratios taken in one run
 * on one machine; none passes or fails.
 */

import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { ensureDependencies, root } from './lib/provision.mjs';

ensureDependencies();
const folder = join(root, 'scripts', 'bench');
const wanted = process.argv.slice(2);
const entries = readdirSync(folder)
  .filter((file) => file.endsWith('.mjs'))
  .filter((file) => wanted.length === 0 || wanted.includes(file.replace('.mjs', '')));
if (entries.length === 0) {
  console.error(`No measurement of that name. There are: ${readdirSync(folder).join(', ').replaceAll('.mjs', '')}.`);
  process.exit(2);
}
let failed = 0;
for (const file of entries) {
  console.log(`\n— ${file.replace('.mjs', '')}`);
  if (spawnSync(process.execPath, [join(folder, file)], { cwd: root, stdio: 'inherit' }).status !== 0) failed++;
}
process.exit(failed === 0 ? 0 : 1);

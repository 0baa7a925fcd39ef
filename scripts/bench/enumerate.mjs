/**
 * Generation of diagrams, measured: all connected φ⁴ vacuum diagrams of order 11 with their factors against nauty's pipeline
 * for the same 316 520 multigraphs (which gives no factors), in CPU seconds of whole processes taken in turns; the growth
 * with the order; and lists of other kinds in classes per second.
 *
 * @see B. D. McKay, A. Piperno, J. Symbolic Comput. 60 (2014) 94 (nauty).
 */
import { join } from 'node:path';
import { build } from 'esbuild';
import { root } from '../lib/provision.mjs';
import { cpuOf, median } from './lib/cpu.mjs';
import { ensureNauty } from './lib/nauty.mjs';

const ROUNDS = 7;
const ORDER = 11;
const bundle = join(root, '.cache', 'bench-enumerate.mjs');
const child = join(root, 'scripts', 'bench', 'lib', 'generate.mjs');

await build({
  entryPoints: [join(root, 'src/lib/engine/expansion/enumerate.ts')],
  outfile: bundle,
  bundle: true,
  format: 'esm',
  target: 'node20',
  logLevel: 'warning',
});

const realField = (valence) => ({ partner: [0], kinds: [[valence]] });
const phi4 = (order) => ({ theory: realField(4), legs: [], contents: [[order]], options: { components: 'connected' } });
const command = (what) => `'${process.execPath}' '${child}' '${bundle}' '${JSON.stringify(what)}'`;

function generate(what) {
  const { seconds, stdout } = cpuOf(command(what));
  return { cpu: seconds, ...JSON.parse(stdout) };
}

function pipeline(order) {
  const { seconds, stderr } = cpuOf(`nauty-geng -c -D4 -q ${order} | nauty-multig -l4 -u`);
  return { cpu: seconds, classes: Number(/(\d+) multigraphs generated/.exec(stderr)[1]) };
}

function compare() {
  if (!ensureNauty()) {
    console.log('nauty-geng and nauty-multig are not installed (Debian package nauty): no comparison.');
    return;
  }
  const ours = [];
  const theirs = [];
  for (let round = 0; round < ROUNDS; round++) {
    ours.push(generate(phi4(ORDER)));
    theirs.push(pipeline(ORDER));
  }
  const classes = new Set([...ours, ...theirs].map((run) => run.classes));
  if (classes.size !== 1) throw new Error(`the lists differ in length: ${[...classes].join(', ')}`);
  const ratio = median(ours.map((run, round) => run.cpu / theirs[round].cpu));
  const seconds = (runs) => median(runs.map((run) => run.cpu)).toFixed(2);
  console.log(`φ⁴ vacuum, connected, order ${ORDER}: ${ours[0].classes} classes, ${ROUNDS} rounds in turns`);
  console.log(`  this program, with factors   ${seconds(ours)} s CPU`);
  console.log(`  nauty-geng | nauty-multig    ${seconds(theirs)} s CPU`);
  console.log(`  median ratio                 ${ratio.toFixed(2)}   (goal ≤ 1.5, hoped for ≤ 0.5)`);
}

function growth() {
  const [before, after] = [ORDER - 1, ORDER].map((order) => generate(phi4(order)));
  const time = after.seconds / before.seconds;
  const classes = after.classes / before.classes;
  console.log(`order ${ORDER - 1} → ${ORDER}: time × ${time.toFixed(2)}, classes × ${classes.toFixed(2)}`);
}

const portal = {
  partner: [0, 1],
  kinds: [
    [4, 0],
    [0, 4],
    [2, 2],
  ],
};

/** Every content of n vertices in all of a theory's kinds. */
function contents(kinds, n) {
  if (kinds === 1) return [[n]];
  return Array.from({ length: n + 1 }, (_, i) => contents(kinds - 1, n - i).map((rest) => [i, ...rest])).flat();
}

function rate(name, theory, legs, contents, options = { components: 'connected' }) {
  const { classes, seconds } = generate({ theory, legs, contents, options });
  console.log(`${name.padEnd(38)}${String(classes).padStart(8)} classes, ${Math.round(classes / seconds)} per second`);
}

compare();
growth();
rate('h⁴, s⁴, h²s² vacuum, total order 5', portal, [], contents(3, 5));
rate('h⁴, s⁴, h²s² vacuum, total order 7', portal, [], contents(3, 7));
rate('h⁴, s⁴, h²s² ⟨hhss⟩, total order 5', portal, [0, 0, 1, 1], contents(3, 5));
rate('φ⁴ four-point, order 7', realField(4), [0, 0, 0, 0], [[7]]);
rate('(φ*φ)² two-point, order 8', { partner: [1, 0], kinds: [[2, 2]] }, [0, 1], [[8]]);
rate('φ³ two-point, 1PI, order 12', realField(3), [0, 0], [[12]], { components: 'connected', noBridges: true });

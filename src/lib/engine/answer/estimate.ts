import { LimitError } from '../errors.ts';
import { add, format, type Rational, rational, ZERO } from '../exact/rational.ts';
import { expandContent } from '../expansion/expand.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import type { FieldFactor } from '../lagrangian/model.ts';
import { forbiddenBySymmetry } from '../lagrangian/symmetries.ts';
import { independentSums } from '../ledger/independent.ts';
import type { Prepared } from './prepare.ts';

/** What an expansion will cost, told before it runs. */
export interface EngineEstimate {
  readonly classes: number;
  /** exact: all were counted; estimate: extrapolated from smaller contents and the exact sum of weights. */
  readonly quality: 'exact' | 'estimate';
  /** The exact sum of weights, or "" when even that would take too long. */
  readonly weight: string;
  readonly seconds: number;
  readonly bytes: number;
  /** Why the correlator vanishes at every order (a symmetry of the model forbids it), or null. */
  readonly vanishes: string | null;
}

/** Multiplications that the exact sum may take here: some tens of milliseconds. */
const SUM_LIMIT = 150_000;
/** Labels, facts and storage of one diagram in the job process, in milliseconds; measured on a two-core machine. */
const HANDLING_MS = 0.2;
const BYTES_PER_CLASS = 260;
const BYTES_PER_LINE = 9;
/** Nothing grows faster from one order to the next than this, so that a short series is not extrapolated wildly. */
const STEEPEST = 40;

/** How much longer one class takes with each further vertex. */
const SLOWER = 1.25;

/** What was measured of one content, or one number of vertices. */
interface Sample {
  readonly vertices: number;
  readonly classes: number;
  readonly weight: Rational;
  readonly milliseconds: number;
}

const verticesOf = (content: Content): number => content.reduce((a, b) => a + b, 0);
const numeric = (value: Rational): number => Number(value.num) / Number(value.den);

/** Enumerates one content until it is done (a sample) or the time is over (null). */
function sample(request: CountingRequest, content: Content, late: () => boolean): Sample | null {
  const started = performance.now();
  let classes = 0;
  let weight = ZERO;
  for (const diagram of expandContent(request, content, late)) {
    if (late()) return null;
    classes++;
    weight = add(weight, rational(1n, diagram.symmetryFactor));
  }
  if (late()) return null;
  return { vertices: verticesOf(content), classes, weight, milliseconds: performance.now() - started };
}

/** Smaller relatives of a content, smallest first: half-lines can still be paired, proportions stay about the same. */
function smaller(content: Content, request: CountingRequest): Content[] {
  const found: Content[] = [];
  const odd = (kind: number): boolean => request.theory.kinds[kind]!.some((n) => n % 2 === 1);
  let current = [...content];
  for (;;) {
    const kind = current.indexOf(Math.max(...current));
    const step = odd(kind) ? 2 : 1;
    if (kind < 0 || current[kind]! <= step) break;
    current = current.map((n, k) => (k === kind ? n - step : n));
    found.unshift(current);
  }
  return found;
}

/** Samples merged by number of vertices, ascending. */
function bySize(samples: readonly Sample[]): Sample[] {
  const sizes = [...new Set(samples.filter(({ classes }) => classes > 0).map(({ vertices }) => vertices))];
  return sizes
    .sort((a, b) => a - b)
    .map((vertices) => {
      const own = samples.filter((entry) => entry.vertices === vertices);
      return {
        vertices,
        classes: own.reduce((total, { classes }) => total + classes, 0),
        weight: own.reduce((total, { weight }) => add(total, weight), ZERO),
        milliseconds: own.reduce((total, { milliseconds }) => total + milliseconds, 0),
      };
    });
}

/** A quantity at `vertices`, continued geometrically from its last two values. */
function continued(sizes: readonly Sample[], vertices: number, read: (entry: Sample) => number): number {
  const last = sizes.at(-1);
  if (!last) return 1;
  const before = sizes.at(-2);
  const known = sizes.find((entry) => entry.vertices === vertices);
  if (known) return read(known);
  if (!before) return read(last);
  const growth = (read(last) / Math.max(read(before), 1e-9)) ** (1 / (last.vertices - before.vertices));
  return read(last) * Math.min(Math.max(growth, 1), STEEPEST) ** (vertices - last.vertices);
}

/** Milliseconds for one class: those of the largest sample, growing gently. Small samples are too short to show a trend. */
function timePerClass(sizes: readonly Sample[], vertices: number): number {
  const last = sizes.at(-1);
  return last ? (last.milliseconds / last.classes) * SLOWER ** Math.max(0, vertices - last.vertices) : 1;
}

interface Sums {
  readonly weight: Rational;
  readonly of: ReadonlyMap<string, Rational>;
}

/** The exact sum of weights by content, or null when it takes too long here. For a cut without a closed form, the uncut sum. */
function exactSums(request: CountingRequest): Sums | null {
  try {
    const proof = independentSums(request, SUM_LIMIT);
    const totals = proof.state === 'proved' ? proof : proof.uncut;
    return { weight: totals.weight, of: new Map(totals.rows.map((row) => [row.content.join(), row.weight])) };
  } catch (error) {
    if (error instanceof LimitError) return null;
    throw error;
  }
}

function extrapolated(open: readonly Content[], sizes: readonly Sample[], sums: Sums | null) {
  let classes = 0;
  let milliseconds = 0;
  for (const content of open) {
    const vertices = verticesOf(content);
    const weight = sums ? numeric(sums.of.get(content.join()) ?? ZERO) : null;
    const expected =
      weight === null
        ? continued(sizes, vertices, (entry) => entry.classes)
        : weight * continued(sizes, vertices, (entry) => entry.classes / numeric(entry.weight));
    classes += Math.max(expected, weight === null || weight === 0 ? 0 : 1);
    milliseconds += expected * timePerClass(sizes, vertices);
  }
  return { classes: Math.ceil(classes), milliseconds };
}

/**
 * The number of diagrams of a request and the time to list them, before it runs: exact when they can be counted within `budget`
 * milliseconds, else the exact sum of weights times the classes per weight of smaller contents, continued geometrically.
 */
export function estimate(prepared: Prepared, budget: number): EngineEstimate {
  const { request } = prepared.canonical;
  const sums = exactSums(request);
  const end = performance.now() + budget;
  const late = (): boolean => performance.now() > end;
  const size = (content: Content): number =>
    sums ? numeric(sums.of.get(content.join()) ?? ZERO) : verticesOf(content);
  const rising = [...prepared.contents].sort((a, b) => size(a) - size(b));
  const done: Sample[] = [];
  for (const content of rising) {
    const next = sample(request, content, late);
    if (next === null) break;
    done.push(next);
  }
  const open = rising.slice(done.length);
  const spent = done.reduce((total, { milliseconds }) => total + milliseconds, 0);
  const counted = done.reduce((total, { classes }) => total + classes, 0);
  const relatives: Sample[] = [];
  if (open.length > 0) {
    const again = performance.now() + budget;
    const lateAgain = (): boolean => performance.now() > again;
    for (const content of smaller(open.at(-1)!, request)) {
      const next = sample(request, content, lateAgain);
      if (next === null) break;
      relatives.push(next);
    }
  }
  const rest = extrapolated(open, bySize([...done, ...relatives]), sums);
  const classes = counted + rest.classes;
  const lines = Math.max(0, ...prepared.contents.map((content) => linesOf(request, content)));
  return {
    classes,
    quality: open.length === 0 ? 'exact' : 'estimate',
    weight: sums && request.drop.length === 0 ? format(sums.weight) : '',
    seconds: (spent + rest.milliseconds + classes * HANDLING_MS) / 1000,
    bytes: classes * (BYTES_PER_CLASS + lines * BYTES_PER_LINE),
    vanishes: classes === 0 ? forbiddenBySymmetry(prepared.model, operatorsOf(prepared)) : null,
  };
}

function operatorsOf({ names }: Prepared): FieldFactor[] {
  return names.legs.map((leg) => ({ field: leg.replace('^*', ''), conjugate: leg.endsWith('^*') }));
}

function linesOf({ theory }: CountingRequest, content: Content): number {
  const halves = content.reduce((total, n, kind) => total + n * theory.kinds[kind]!.reduce((a, b) => a + b, 0), 0);
  return halves / 2;
}

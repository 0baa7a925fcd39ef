import { InputError, LimitError } from '../errors.ts';
import { add, compare, divide, multiply, type Rational, rational, sign, subtract, ZERO } from '../exact/rational.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';

/** Vertex contents that one ledger may sum, and entries (contents × kinds) that they may have together. */
export const LEDGER_CONTENTS = 100_000;
const LEDGER_ENTRIES = 20_000_000;
/** Steps of the search for them. */
const SEARCH_STEPS = 5_000_000;
/** Rounds of tightening; each propagates a bound from one kind to the next. */
const MOST_ROUNDS = 200;
/** Vertices of one kind. */
const MOST_VERTICES = 64;

/** Σ_k weights[k] n_k ≤ bound. */
interface Inequality {
  readonly weights: readonly Rational[];
  readonly bound: Rational;
}

const valence = (kind: readonly number[]): number => kind.reduce((sum, n) => sum + n, 0);

/**
 * The vertex contents that the order of a request admits, in lexicographic order, those of no balanced half-lines left out.
 *
 * Every order is a system of linear inequalities in n ≥ 0. `powers` states it as it stands. `loops`: a connected part with k-valent
 * vertices and E points on lines has 2(L − 1) + E = Σ n (k − 2), hence with L + Σ ℓ n = B: Σ n (k − 2 + 2ℓ) = 2(B − 1) + E.
 * For `all` and `normalised` loops add over C components and E′ ≤ E points are joined to vertices: the left side is 2(B − C) + E′, so it is
 * at most 2(B − 1) + E once there is a vertex; which part of such a content belongs to B is for the sum over components to say.
 * Under 1PI a one-point vertex occurs only as the single bare vertex.
 *
 * @throws InputError infinite-order when a kind stays unbounded; LimitError beyond LEDGER_CONTENTS of them.
 */
export function admittedContents(request: CountingRequest): Content[] {
  const { theory, keep, legs } = request;
  const usable = theory.kinds.map((kind) => keep !== '1PI' || valence(kind) > 1);
  const system = inequalities(request);
  const upper = upperBounds(system, usable);
  const found = new Map<string, Content>();
  const note = (content: Content): boolean => {
    const balanced = isBalanced(request, content);
    if (balanced) found.set(content.join(), content);
    return balanced;
  };
  enumerate(system, upper, note);
  const none = new Array<number>(theory.kinds.length).fill(0);
  if (request.order.by === 'loops' && (keep === 'all' || keep === 'normalised')) note(none);
  if (keep === '1PI' && legs.length === 1)
    theory.kinds.forEach((kind, k) => {
      const content = none.map((_, i) => (i === k ? 1 : 0));
      if (valence(kind) === 1 && satisfies(system, content)) note(content);
    });
  return [...found.values()];
}

function inequalities(request: CountingRequest): Inequality[] {
  const { order, theory, legs, keep } = request;
  if (order.by === 'loops') {
    const weights = theory.kinds.map((kind, k) => rational(valence(kind) - 2 + 2 * order.kindLoops[k]!));
    const bound = rational(2 * (order.bound - 1) + legs.length);
    return pair(weights, bound, order.through || keep === 'all' || keep === 'normalised');
  }
  return order.bound.flatMap((bound, c) =>
    pair(
      theory.kinds.map((_, k) => order.weights[k]![c]!),
      bound,
      order.through,
    ),
  );
}

function pair(weights: readonly Rational[], bound: Rational, through: boolean): Inequality[] {
  const below = { weights, bound };
  if (through) return [below];
  return [below, { weights: weights.map((w) => subtract(ZERO, w)), bound: subtract(ZERO, bound) }];
}

/** Largest n of each kind by repeated tightening of every inequality; null while unbounded. */
function upperBounds(system: readonly Inequality[], usable: readonly boolean[]): number[] {
  const upper = usable.map((can): number | null => (can ? null : 0));
  for (let round = 0, changed = true; changed && round < MOST_ROUNDS; round++)
    changed = system.map((inequality) => tighten(inequality, upper)).includes(true);
  upper.forEach((bound, k) => {
    if (bound === null)
      throw new InputError('infinite-order', `Nothing in the order bounds the number of vertices of kind ${k + 1}.`);
    if (bound > MOST_VERTICES)
      throw new LimitError(
        `This order admits ${bound} vertices of one kind; the bound is ${MOST_VERTICES}.`,
        MOST_VERTICES,
        bound,
      );
  });
  return upper as number[];
}

/**
 * Tightens the upper bounds by one inequality: n_k ≤ (bound − Σ_{j≠k} least w_j n_j)/w_k for every w_k > 0, provided that all kinds with
 * negative weight are bounded. True when a bound became smaller. O(kinds).
 */
function tighten({ weights, bound }: Inequality, upper: (number | null)[]): boolean {
  let room = bound;
  for (let j = 0; j < weights.length; j++) {
    if (sign(weights[j]!) >= 0) continue;
    if (upper[j] === null) return false;
    room = subtract(room, multiply(weights[j]!, rational(upper[j]!)));
  }
  let changed = false;
  for (let k = 0; k < weights.length; k++) {
    if (sign(weights[k]!) <= 0) continue;
    const quotient = divide(room, weights[k]!);
    const most = sign(room) < 0 ? 0 : Number(quotient.num / quotient.den);
    if (upper[k] !== null && upper[k]! <= most) continue;
    upper[k] = most;
    changed = true;
  }
  return changed;
}

function satisfies(system: readonly Inequality[], content: Content): boolean {
  return system.every(({ weights, bound }) => {
    let total = ZERO;
    content.forEach((n, k) => {
      if (n > 0) total = add(total, multiply(weights[k]!, rational(n)));
    });
    return compare(total, bound) <= 0;
  });
}

/**
 * Depth-first, the next kind used at each step; a branch is left as soon as an inequality cannot be met by what remains.
 * Lexicographic order. O(contents on the way × kinds), depth = kinds used.
 */
function enumerate(system: readonly Inequality[], upper: readonly number[], note: (content: Content) => boolean): void {
  const scaled = system.map(({ weights, bound }) => toIntegers([...weights, bound]));
  const least = scaled.map((row) => leastRemaining(row, upper));
  const content = new Array<number>(upper.length).fill(0);
  const room = scaled.map((row) => row[upper.length]!);
  const cheapest = scaled.map((row) => cheapestRemaining(row, upper));
  const most = Math.min(LEDGER_CONTENTS, Math.floor(LEDGER_ENTRIES / (upper.length + 1)));
  let steps = 0;
  let contents = 0;
  const spend = (k: number, n: number): void => {
    for (let c = 0; c < room.length; c++) room[c]! -= scaled[c]![k]! * BigInt(n);
  };
  /** The first inequality that kinds from k on can no longer satisfy, or −1. */
  const missed = (k: number): number => room.findIndex((left, c) => left < least[c]![k]!);
  const descend = (first: number): void => {
    if (room.every((left) => left >= 0n) && note([...content]) && ++contents > most) throw tooMany(most);
    if (room.some((left, c) => left < cheapest[c]![first]!)) return;
    for (let k = upper.length - 1; k >= first; k--) {
      let n = 0;
      while (n < upper[k]!) {
        if (++steps > SEARCH_STEPS) throw tooMany(most);
        content[k] = ++n;
        spend(k, 1);
        const inequality = missed(k + 1);
        if (inequality < 0) descend(k + 1);
        else if (scaled[inequality]![k]! > 0n) break;
      }
      spend(k, -n);
      content[k] = 0;
    }
  };
  descend(0);
}

/** least[k]: the smallest value that kinds k, k + 1, … can add to a row. */
function leastRemaining(row: readonly bigint[], upper: readonly number[]): bigint[] {
  const least = new Array<bigint>(upper.length + 1).fill(0n);
  for (let k = upper.length - 1; k >= 0; k--)
    least[k] = least[k + 1]! + (row[k]! < 0n ? row[k]! * BigInt(upper[k]!) : 0n);
  return least;
}

/** cheapest[k]: what one more vertex of any kind k, k + 1, … takes at least, where all of them take something; otherwise no limit. */
function cheapestRemaining(row: readonly bigint[], upper: readonly number[]): bigint[] {
  const unlimited = -(row.reduce((sum, w) => sum + (w < 0n ? -w : w), 0n) * BigInt(1 + Math.max(0, ...upper)));
  const cheapest = new Array<bigint>(upper.length + 1).fill(unlimited);
  for (let k = upper.length - 1, least: bigint | null = null; k >= 0; k--) {
    if (upper[k]! > 0 && (least === null || row[k]! < least)) least = row[k]!;
    if (least !== null && least > 0n) cheapest[k] = least;
  }
  return cheapest;
}

const tooMany = (most: number): LimitError =>
  new LimitError(
    `This order admits more vertex contents than the independent count looks at: the bound is ${most}.`,
    most,
  );

function toIntegers(row: readonly Rational[]): bigint[] {
  const common = row.reduce((product, { den }) => (product % den === 0n ? product : product * den), 1n);
  return row.map(({ num, den }) => (num * common) / den);
}

/** Every real field needs an even number of half-lines, every complex field as many φ as φ*. */
function isBalanced({ theory, legs }: CountingRequest, content: Content): boolean {
  const total = theory.partner.map((_, h) => legs.filter((type) => type === h).length);
  content.forEach((n, k) => {
    if (n === 0) return;
    theory.kinds[k]!.forEach((number, h) => {
      total[h]! += n * number;
    });
  });
  return theory.partner.every((partner, h) => (partner === h ? total[h]! % 2 === 0 : total[h] === total[partner]));
}

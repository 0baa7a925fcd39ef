import { multiplyNumbers } from '../exact/number.ts';
import type { FieldFactor } from './model.ts';
import { compareFactors, type Monomial, minusOne } from './monomial.ts';

type Pair = readonly [number, number];

/** Lines of a multigraph on the factors: entry [i][j] counts the contracted derivatives of i with j. */
function adjacency(size: number, pairs: readonly Pair[]): number[][] {
  const matrix = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  for (const [i, j] of pairs) {
    matrix[i]![j]!++;
    if (i !== j) matrix[j]![i]!++;
  }
  return matrix;
}

/** Replaces each value by its rank among the sorted distinct values. */
function ranks(values: readonly string[]): number[] {
  const sorted = [...new Set(values)].sort();
  const rank = new Map(sorted.map((value, i) => [value, i]));
  return values.map((value) => rank.get(value)!);
}

const padded = (n: number): string => String(n).padStart(3, '0');

/** Splits colours by the colours of neighbours until nothing changes; keeps their order. */
function refine(colours: readonly number[], matrix: readonly (readonly number[])[]): number[] {
  let current = [...colours];
  for (;;) {
    const signatures = current.map((colour, i) => {
      const around = matrix[i]!.flatMap((count, j) => (count === 0 ? [] : [`${padded(current[j]!)}x${count}`]));
      return `${padded(colour)} ${matrix[i]![i]} ${around.sort().join(' ')}`;
    });
    const next = ranks(signatures);
    if (new Set(next).size === new Set(current).size) return next;
    current = next;
  }
}

/** Exchanging twins changes nothing: same colour, same lines to everything else. */
function areTwins(matrix: readonly (readonly number[])[], i: number, j: number): boolean {
  if (matrix[i]![i] !== matrix[j]![j]) return false;
  return matrix[i]!.every((count, k) => k === i || k === j || count === matrix[j]![k]);
}

interface Ordered {
  readonly order: readonly number[];
  readonly code: string;
}

/**
 * The order of the vertices of a small coloured multigraph whose code is least: individualise and refine, twins tried once.
 * Worst case exponential, but a monomial has at most BOUNDS.derivativePairs lines.
 */
function leastOrder(colours: readonly number[], matrix: readonly (readonly number[])[]): Ordered {
  const refined = refine(colours, matrix);
  const size = refined.length;
  const cell = refined.find((colour, i) => refined.indexOf(colour) !== i);
  if (cell === undefined) {
    const order = refined.map((_, i) => i).sort((a, b) => refined[a]! - refined[b]!);
    const code = order
      .map((i, a) =>
        order
          .slice(a)
          .map((j) => matrix[i]![j])
          .join(''),
      )
      .join('.');
    return { order, code };
  }
  const members = [...Array(size).keys()].filter((i) => refined[i] === cell);
  const tried: number[] = [];
  let best: Ordered | null = null;
  for (const chosen of members) {
    if (tried.some((other) => areTwins(matrix, other, chosen))) continue;
    tried.push(chosen);
    const split = refined.map((colour, i) => 2 * colour + (colour === cell && i !== chosen ? 1 : 0));
    const found = leastOrder(split, matrix);
    if (best === null || found.code < best.code) best = found;
  }
  return best!;
}

/** Connected components of the factors under contracted derivatives. */
function components(size: number, pairs: readonly Pair[]): number[][] {
  const leader = [...Array(size).keys()];
  for (const [i, j] of pairs) {
    const [a, b] = [leader[i]!, leader[j]!];
    for (let k = 0; k < size; k++) if (leader[k] === b) leader[k] = a;
  }
  return [...new Set(leader)].map((root) => [...Array(size).keys()].filter((i) => leader[i] === root));
}

const factorText = ({ field, conjugate }: FieldFactor): string => `${field}${conjugate ? '^*' : ''}`;

/** A canonical order of the factors: by field, then conjugate; within these bare factors first, then by the shape of their derivatives. */
function canonicalOrder(m: Monomial): number[] {
  const labels = m.factors.map((factor, i) => {
    const open = m.open.filter(({ at }) => at === i).map(({ index }) => index ?? '');
    return `${factorText(factor)}/${open.sort().join(',')}`;
  });
  const colours = ranks(labels);
  const matrix = adjacency(m.factors.length, m.pairs);
  const parts = components(m.factors.length, m.pairs).map((vertices) => {
    const inner = vertices.map((i) => vertices.map((j) => matrix[i]![j]!));
    const found = leastOrder(
      vertices.map((i) => colours[i]!),
      inner,
    );
    const order = found.order.map((i) => vertices[i]!);
    const lines = inner.flat().reduce((sum, count) => sum + count, 0);
    return { order, code: `${padded(lines)} ${order.map((i) => padded(colours[i]!)).join('')} ${found.code}` };
  });
  parts.sort((a, b) => (a.code < b.code ? -1 : a.code > b.code ? 1 : 0));
  const rank = new Map(parts.flatMap(({ order }) => order).map((i, position) => [i, position]));
  return [...rank.keys()].sort((a, b) => compareFactors(m.factors[a]!, m.factors[b]!) || rank.get(a)! - rank.get(b)!);
}

const remembered = new Map<string, number[]>();
const REMEMBERED = 256;

/** The canonical order of a shape of derivatives, kept for a while: expanded products repeat a few shapes many times. */
function rememberedOrder(m: Monomial): number[] {
  const shape = shapeKey(m);
  const known = remembered.get(shape);
  if (known) return known;
  const order = canonicalOrder(m);
  if (remembered.size >= REMEMBERED) remembered.clear();
  remembered.set(shape, order);
  return order;
}

/** Fields with their derivatives, coefficient left out. */
export const shapeKey = ({ factors, pairs, open }: Monomial): string =>
  `${factors.map(factorText).join(' ')}|${pairs.join(';')}|${open.map(({ index, at }) => `${index ?? ''}@${at}`).join(';')}`;

/** Moves derivatives of a quadratic monomial so that each pair joins the two factors: φ□χ = −∂φ∂χ up to a total derivative. */
function quadratic(m: Monomial): Monomial {
  const inner = m.pairs.filter(([i, j]) => i === j).length;
  return {
    ...m,
    number: inner % 2 === 1 ? multiplyNumbers(minusOne, m.number) : m.number,
    factors: [...m.factors].sort(compareFactors),
    pairs: m.pairs.map((): Pair => [0, 1]),
  };
}

const comparePairs = (a: Pair, b: Pair): number => a[0] - b[0] || a[1] - b[1];

/**
 * The canonical form of a monomial: equal for monomials that differ in the order of factors and the names of contracted indices.
 * A quadratic one is also brought to one form by parts (only there is a total derivative dropped).
 */
export function canonical(m: Monomial): Monomial {
  if (m.pairs.length + m.open.length === 0) return m;
  if (m.factors.length === 2 && m.open.length === 0) return quadratic(m);
  const order = rememberedOrder(m);
  const position = new Map(order.map((from, to) => [from, to]));
  const pairs = m.pairs.map(([i, j]): Pair => {
    const [a, b] = [position.get(i)!, position.get(j)!];
    return a <= b ? [a, b] : [b, a];
  });
  const open = m.open.map(({ index, at }) => ({ index, at: position.get(at)! }));
  return {
    ...m,
    factors: order.map((i) => m.factors[i]!),
    pairs: pairs.sort(comparePairs),
    open: open.sort((a, b) => a.at - b.at || ((a.index ?? '') < (b.index ?? '') ? -1 : 1)),
  };
}

import type { SeriesIndex } from './seriesIndex.ts';

/** An integer polynomial Σ c_q φ^q in several variables: id of the exponent q in a SeriesIndex → c_q, zeros left out. */
export type IntegerPolynomial = ReadonlyMap<number, bigint>;

export const EMPTY_POLYNOMIAL: IntegerPolynomial = new Map();

/** Adds factor · φ^q to a polynomial under construction. */
export function accumulate(target: Map<number, bigint>, q: number, factor: bigint): void {
  const value = (target.get(q) ?? 0n) + factor;
  if (value === 0n) target.delete(q);
  else target.set(q, value);
}

/** target += factor · a · b. O(|a|·|b|). */
export function accumulateProduct(
  index: SeriesIndex,
  target: Map<number, bigint>,
  a: IntegerPolynomial,
  b: IntegerPolynomial,
  factor: bigint,
): void {
  for (const [p, x] of a) for (const [q, y] of b) accumulate(target, index.add(p, q), factor * x * y);
}

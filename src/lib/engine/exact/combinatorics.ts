/** Exact counting functions on bigint. */

const factorials: bigint[] = [1n];

/** n! for an integer n ≥ 0. O(n) multiplications the first time, cached after. @throws RangeError for n < 0. */
export function factorial(n: number): bigint {
  if (!Number.isInteger(n) || n < 0) throw new RangeError(`factorial of ${n}`);
  for (let i = factorials.length; i <= n; i++) factorials.push(factorials[i - 1]! * BigInt(i));
  return factorials[n]!;
}

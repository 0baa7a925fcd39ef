/** Square roots of integers: √n = outside · √root with root square-free. */
export interface SplitRoot {
  readonly outside: bigint;
  readonly root: bigint;
}

/** Integers up to here are split by trial division in at most 10⁵ steps. */
export const LARGEST_RADICAND = 10n ** 15n;

function integerRoot(n: number): number {
  let r = Math.floor(Math.sqrt(n));
  while (r * r > n) r--;
  while ((r + 1) * (r + 1) <= n) r++;
  return r;
}

/**
 * Splits √n for 1 ≤ n ≤ LARGEST_RADICAND.
 *
 * Trial division up to the cube root of what is left: the rest is then 1, a prime, a product of two primes, or the square of a prime,
 * and only the last has a square factor. O(n^{1/3}).
 */
export function splitRoot(n: bigint): SplitRoot {
  if (n < 1n || n > LARGEST_RADICAND) throw new RangeError(`root of ${n}`);
  let rest = Number(n);
  let outside = 1;
  let root = 1;
  for (let p = 2; p * p * p <= rest; p++) {
    while (rest % (p * p) === 0) {
      rest /= p * p;
      outside *= p;
    }
    if (rest % p === 0) {
      rest /= p;
      root *= p;
    }
  }
  const r = integerRoot(rest);
  return r * r === rest
    ? { outside: BigInt(outside) * BigInt(r), root: BigInt(root) }
    : { outside: BigInt(outside), root: BigInt(root) * BigInt(rest) };
}

/** The greatest common divisor of two integers ≥ 0. */
export function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [a, b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** √a · √b for square-free a, b: g · √(ab/g²) with g = gcd(a, b). */
export function productOfRoots(a: bigint, b: bigint): SplitRoot {
  if (a === 1n) return { outside: 1n, root: b };
  if (b === 1n) return { outside: 1n, root: a };
  const g = greatestCommonDivisor(a, b);
  return { outside: g, root: (a / g) * (b / g) };
}

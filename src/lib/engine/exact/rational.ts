/**
 * Exact rational numbers: BigInt fractions in lowest terms with a positive denominator.
 *
 * Every weight, power and coefficient of the engine is one of these (or a bigint); no float ever enters a weight.
 * The lowest-terms invariant is established by `rational` and kept by every function here, so two equal numbers
 * always have equal `num` and `den`.
 */
export interface Rational {
  readonly num: bigint;
  readonly den: bigint;
}

function gcd(a: bigint, b: bigint): bigint {
  let x = a < 0n ? -a : a;
  let y = b < 0n ? -b : b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** The fraction num/den in lowest terms. @throws RangeError when den is zero. */
export function rational(num: bigint | number, den: bigint | number = 1n): Rational {
  let n = BigInt(num);
  let d = BigInt(den);
  if (d === 0n) throw new RangeError('division by zero');
  if (d < 0n) [n, d] = [-n, -d];
  const g = gcd(n, d);
  return g <= 1n ? { num: n, den: d } : { num: n / g, den: d / g };
}

export const ZERO: Rational = { num: 0n, den: 1n };
export const ONE: Rational = { num: 1n, den: 1n };

export const add = (a: Rational, b: Rational): Rational => rational(a.num * b.den + b.num * a.den, a.den * b.den);
export const subtract = (a: Rational, b: Rational): Rational => rational(a.num * b.den - b.num * a.den, a.den * b.den);
export const multiply = (a: Rational, b: Rational): Rational => rational(a.num * b.num, a.den * b.den);
/** a / b. @throws RangeError when b is zero. */
export const divide = (a: Rational, b: Rational): Rational => rational(a.num * b.den, a.den * b.num);
export const negate = (a: Rational): Rational => ({ num: -a.num, den: a.den });
export const isZero = (a: Rational): boolean => a.num === 0n;
export const isInteger = (a: Rational): boolean => a.den === 1n;
export const equals = (a: Rational, b: Rational): boolean => a.num === b.num && a.den === b.den;
export const sign = (a: Rational): -1 | 0 | 1 => (a.num > 0n ? 1 : a.num < 0n ? -1 : 0);
/** Sign of a − b. */
export function compare(a: Rational, b: Rational): -1 | 0 | 1 {
  const difference = a.num * b.den - b.num * a.den;
  return difference > 0n ? 1 : difference < 0n ? -1 : 0;
}

/** a^n for an integer n. @throws RangeError for 0 to a negative power. */
export function power(a: Rational, n: number): Rational {
  if (!Number.isInteger(n)) throw new RangeError('integer power expected');
  if (n < 0) return power(divide(ONE, a), -n);
  return { num: a.num ** BigInt(n), den: a.den ** BigInt(n) };
}

/** "3", "-3/4": lowest terms, integers bare. */
export const format = (a: Rational): string => (a.den === 1n ? `${a.num}` : `${a.num}/${a.den}`);

/** Reads what `format` writes. @throws RangeError for anything else. */
export function parse(text: string): Rational {
  const match = /^(-?\d+)(?:\/(\d+))?$/.exec(text);
  if (!match) throw new RangeError(`not a rational number: ${text}`);
  return rational(BigInt(match[1]!), match[2] === undefined ? 1n : BigInt(match[2]));
}

/** Sum of a list; zero when empty. O(n) additions. */
export const sum = (values: Iterable<Rational>): Rational => {
  let total = ZERO;
  for (const value of values) total = add(total, value);
  return total;
};

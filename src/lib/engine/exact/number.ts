import type { Rational } from './rational.ts';
import * as Q from './rational.ts';
import { greatestCommonDivisor, productOfRoots } from './squareFree.ts';

/** (re + i·im) · π^pi · √root, with root ≥ 1 square-free and (re, im) ≠ (0, 0). */
export interface NumberPart {
  readonly re: Rational;
  readonly im: Rational;
  readonly pi: Rational;
  readonly root: bigint;
}

/**
 * An exact number: a sum of Gaussian rationals times powers of π and square roots.
 *
 * Canonical form, established by `collect` and kept by every function here: at most one part for each (pi, root), no zero part, sorted
 * by pi, then root. Square roots of different square-free integers and powers of π are linearly independent over ℚ(i), so two numbers are equal
 * exactly when their parts are. Plain data: survives structured clone.
 */
export interface ExactNumber {
  readonly parts: readonly NumberPart[];
}

const part = (re: Rational, im: Rational = Q.ZERO, pi: Rational = Q.ZERO, root = 1n): NumberPart => ({
  re,
  im,
  pi,
  root,
});

function collect(parts: readonly NumberPart[]): ExactNumber {
  const sums = new Map<string, NumberPart>();
  for (const next of parts) {
    const key = `${Q.format(next.pi)} ${next.root}`;
    const known = sums.get(key);
    sums.set(key, known ? { ...known, re: Q.add(known.re, next.re), im: Q.add(known.im, next.im) } : next);
  }
  const kept = [...sums.values()].filter(({ re, im }) => !(Q.isZero(re) && Q.isZero(im)));
  kept.sort((a, b) => Q.compare(a.pi, b.pi) || (a.root < b.root ? -1 : a.root > b.root ? 1 : 0));
  return { parts: kept };
}

export const NUMBER_ZERO: ExactNumber = { parts: [] };
export const NUMBER_ONE: ExactNumber = { parts: [part(Q.ONE)] };
export const IMAGINARY: ExactNumber = { parts: [part(Q.ZERO, Q.ONE)] };
/** π^power. */
export const powerOfPi = (power: Rational): ExactNumber => ({ parts: [part(Q.ONE, Q.ZERO, power)] });
export const fromRational = (value: Rational): ExactNumber =>
  Q.isZero(value) ? NUMBER_ZERO : { parts: [part(value)] };
export const fromInteger = (value: bigint | number): ExactNumber => fromRational(Q.rational(value));

/** √root · factor for a square-free root ≥ 1. */
export const timesRoot = (factor: Rational, root: bigint): ExactNumber => collect([part(factor, Q.ZERO, Q.ZERO, root)]);

export const addNumbers = (a: ExactNumber, b: ExactNumber): ExactNumber => collect([...a.parts, ...b.parts]);
export const negateNumber = (a: ExactNumber): ExactNumber => ({
  parts: a.parts.map((p) => ({ ...p, re: Q.negate(p.re), im: Q.negate(p.im) })),
});
export const isZeroNumber = (a: ExactNumber): boolean => a.parts.length === 0;

/** The complex conjugate: π and real roots are real. */
export const conjugateNumber = (a: ExactNumber): ExactNumber => ({
  parts: a.parts.map((p) => ({ ...p, im: Q.negate(p.im) })),
});

function multiplyParts(a: NumberPart, b: NumberPart): NumberPart {
  const { outside, root } = productOfRoots(a.root, b.root);
  const scale = Q.rational(outside);
  return {
    re: Q.multiply(scale, Q.subtract(Q.multiply(a.re, b.re), Q.multiply(a.im, b.im))),
    im: Q.multiply(scale, Q.add(Q.multiply(a.re, b.im), Q.multiply(a.im, b.re))),
    pi: Q.add(a.pi, b.pi),
    root,
  };
}

const asRational = (a: ExactNumber): Rational | null => {
  const only = a.parts[0];
  return a.parts.length === 1 && only!.root === 1n && Q.isZero(only!.im) && Q.isZero(only!.pi) ? only!.re : null;
};

/** The rational value, or null when the number is not rational. */
export const rationalValue = (a: ExactNumber): Rational | null => (a.parts.length === 0 ? Q.ZERO : asRational(a));

/** a · b. O(parts of a × parts of b). */
export function multiplyNumbers(a: ExactNumber, b: ExactNumber): ExactNumber {
  const x = asRational(a);
  const y = asRational(b);
  if (x && y) return { parts: [part(Q.multiply(x, y))] };
  return collect(a.parts.flatMap((p) => b.parts.map((q) => multiplyParts(p, q))));
}

export function equalNumbers(a: ExactNumber, b: ExactNumber): boolean {
  return (
    a.parts.length === b.parts.length &&
    a.parts.every((p, i) => {
      const q = b.parts[i]!;
      return p.root === q.root && Q.equals(p.pi, q.pi) && Q.equals(p.re, q.re) && Q.equals(p.im, q.im);
    })
  );
}

/** True when the number equals its conjugate. */
export const isRealNumber = (a: ExactNumber): boolean => a.parts.every(({ im }) => Q.isZero(im));

/** Sign of a number that is a single real part; null when it is a sum or not real (undecided without numerics). */
export function numberSign(a: ExactNumber): -1 | 0 | 1 | null {
  if (a.parts.length === 0) return 0;
  const only = a.parts[0]!;
  return a.parts.length === 1 && Q.isZero(only.im) ? Q.sign(only.re) : null;
}

/** 1 / (one part): 1/((a+ib) π^p √n) = (a−ib) √n / ((a²+b²) n π^p). */
function invertPart({ re, im, pi, root }: NumberPart): ExactNumber {
  const norm = Q.multiply(Q.add(Q.multiply(re, re), Q.multiply(im, im)), Q.rational(root));
  return { parts: [part(Q.divide(re, norm), Q.negate(Q.divide(im, norm)), Q.negate(pi), root)] };
}

/** A divisor b > 1 of some root such that every root is divisible by b or prime to it: √b → −√b is then an automorphism. */
function separator(roots: readonly bigint[]): bigint {
  let b = roots.toSorted((x, y) => Number(y - x))[0] ?? 1n;
  for (let i = 0; i < roots.length; i++) {
    const g = greatestCommonDivisor(b, roots[i]!);
    if (g === 1n || g === b) continue;
    b = g;
    i = -1;
  }
  return b;
}

/** Digits that a number may have while a sum of roots is rationalised. */
const LONGEST = 120;

/**
 * 1/a, or null where the field of these numbers has no inverse in closed form (sums with unlike powers of π), or only a very long one.
 *
 * Sums of roots are rationalised: with a = x + y√b, 1/a = (x − y√b)/(x² − b y²), whose denominator is free of √b.
 * @throws RangeError for zero.
 */
export function invertNumber(a: ExactNumber): ExactNumber | null {
  if (a.parts.length === 0) throw new RangeError('division by zero');
  if (a.parts.length === 1) return invertPart(a.parts[0]!);
  const first = a.parts[0]!.pi;
  if (a.parts.some(({ pi }) => !Q.equals(pi, first))) return null;
  const b = separator(a.parts.map(({ root }) => root));
  const flipped = collect(
    a.parts.map((p) => (p.root % b === 0n ? { ...p, re: Q.negate(p.re), im: Q.negate(p.im) } : p)),
  );
  const norm = multiplyNumbers(a, flipped);
  if (digitsOf(norm) > LONGEST) return null;
  const inverse = invertNumber(norm);
  return inverse && multiplyNumbers(flipped, inverse);
}

/** a^n for an integer n ≥ 0. */
export function powerOfNumber(a: ExactNumber, n: number): ExactNumber {
  let result = NUMBER_ONE;
  for (let i = 0; i < n; i++) result = multiplyNumbers(result, a);
  return result;
}

const SMALL = 10n ** 15n;

/** Decimal digits of the largest integer in the number, at least 15: what the bounds on growth are counted in. */
export function digitsOf(a: ExactNumber): number {
  let digits = 15;
  for (const { re, im, root } of a.parts)
    for (const value of [re.num, re.den, im.num, im.den, root])
      if (value >= SMALL || value <= -SMALL) digits = Math.max(digits, value.toString(16).length * 1.21);
  return Math.ceil(digits);
}

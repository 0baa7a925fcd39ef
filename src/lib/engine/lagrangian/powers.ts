import {
  type ExactNumber,
  fromInteger,
  IMAGINARY,
  invertNumber,
  multiplyNumbers,
  NUMBER_ONE,
  powerOfNumber,
  powerOfPi,
  rationalValue,
  timesRoot,
} from '../exact/number.ts';
import {
  equals,
  format,
  isInteger,
  isZero,
  multiply,
  negate,
  ONE,
  type Rational,
  rational,
  sign,
} from '../exact/rational.ts';
import { LARGEST_RADICAND, splitRoot } from '../exact/squareFree.ts';
import type { Arithmetic } from './arithmetic.ts';
import { BOUNDS } from './bounds.ts';
import type { Span } from './model.ts';
import { type Monomial, type Polynomial, scalePowers, unit } from './monomial.ts';

/** √r for a rational r: √(p/q) = √(pq)/q; √−1 = i. Null beyond LARGEST_RADICAND. */
function squareRoot(r: Rational): ExactNumber | null {
  if (isZero(r)) return null;
  const size = r.num < 0n ? -r.num : r.num;
  const product = size * r.den;
  if (product > LARGEST_RADICAND) return null;
  const { outside, root } = splitRoot(product);
  const value = timesRoot(rational(outside, r.den), root);
  return sign(r) < 0 ? multiplyNumbers(value, IMAGINARY) : value;
}

/** number^exponent for a fraction exponent: square roots of rationals and powers of π; null for anything else. */
function fractionalPower(number: ExactNumber, exponent: Rational): ExactNumber | null {
  const only = number.parts[0];
  if (number.parts.length !== 1 || !only || only.root !== 1n || !isZero(only.im)) return null;
  const power = multiply(only.pi, exponent);
  const ofPi = isZero(power) ? NUMBER_ONE : powerOfPi(power);
  if (equals(only.re, ONE)) return ofPi;
  if (exponent.den !== 2n) return null;
  const root = squareRoot(only.re);
  return root && multiplyNumbers(powerOfNumber(root, Number(exponent.num)), ofPi);
}

/** C(n + k − 1, k): the number of monomials of degree k in n terms, at most `cap` + 1. */
export function multinomialBound(n: number, k: number, cap: number): number {
  let value = 1;
  for (let i = 1; i <= k && value <= cap; i++) value = (value * (n + i - 1)) / i;
  return Math.min(Math.round(value), cap + 1);
}

/** Powers of values. All bounds are checked before anything is multiplied. */
export class PowerRule {
  constructor(private readonly arithmetic: Arithmetic) {}

  private get source() {
    return this.arithmetic.source;
  }

  /** The one monomial without fields that may be inverted or rooted. */
  private single(value: Polynomial, what: string, span: Span): Monomial {
    const [only] = value;
    if (!only) throw this.source.fault('syntax', `${what} of zero is not defined.`, span);
    if (value.some((m) => m.factors.length > 0))
      throw this.source.fault(
        'unsupported',
        `${what} of a field is not polynomial; the interaction must be a polynomial in the fields.`,
        span,
      );
    if (value.length > 1)
      throw this.source.fault(
        'unsupported',
        `${what} of a sum is not read; give the sum a name and use that as the parameter.`,
        span,
      );
    return only;
  }

  inverse(value: Polynomial, span: Span, what = 'The inverse'): Polynomial {
    const only = this.single(value, what, span);
    const { length } = only.number.parts;
    if (length > 1) this.arithmetic.charge(500 * length * length, span);
    const number = invertNumber(only.number);
    if (!number)
      throw this.source.fault('unsupported', 'This number has no inverse in closed form that is short enough.', span);
    return [
      { ...only, number: this.arithmetic.checkedNumber(number, span), powers: scalePowers(only.powers, rational(-1)) },
    ];
  }

  /** value^exponent. @throws LimitError over the bound on powers or on the size of the result. */
  raise(value: Polynomial, exponent: Rational, span: Span): Polynomial {
    const size = exponent.num < 0n ? -exponent.num : exponent.num;
    if (size > BigInt(BOUNDS.power) * exponent.den || exponent.den > BigInt(BOUNDS.power)) {
      const text = format(exponent);
      throw this.source.limit(
        `The power ${text.length > 24 ? 'here' : text} is out of range; powers up to ${BOUNDS.power} are read.`,
        BOUNDS.power,
        Number(size / exponent.den),
        span,
      );
    }
    if (!isInteger(exponent)) return this.root(value, exponent, span);
    if (exponent.num < 0n) return this.raise(this.inverse(value, span, 'A negative power'), negate(exponent), span);
    return this.integer(value, Number(exponent.num), span);
  }

  private integer(value: Polynomial, n: number, span: Span): Polynomial {
    if (n === 0 && value.length === 0)
      throw this.source.fault('syntax', 'Zero to the power zero is not defined.', span);
    const bound = multinomialBound(value.length, n, BOUNDS.powerTerms);
    if (bound > BOUNDS.powerTerms)
      throw this.source.limit(
        `A sum of ${value.length} terms to the power ${n} has more than ${BOUNDS.powerTerms} terms, the most that are multiplied out.`,
        BOUNDS.powerTerms,
        null,
        span,
      );
    const degree = n * Math.max(0, ...value.map((m) => m.factors.length));
    if (degree > BOUNDS.fieldDegree)
      throw this.source.limit(
        `This power has ${degree} fields in one monomial; at most ${BOUNDS.fieldDegree} are read.`,
        BOUNDS.fieldDegree,
        degree,
        span,
      );
    let result: Polynomial = [unit];
    for (let i = 0; i < n; i++) result = this.arithmetic.multiply(result, value, span);
    return result;
  }

  /** A fractional power of one monomial without fields: √(4λ) = 2 λ^{1/2}. */
  root(value: Polynomial, exponent: Rational, span: Span): Polynomial {
    const only = this.single(value, 'A root', span);
    const positive = sign(exponent) > 0;
    const base = positive ? only.number : invertNumber(only.number);
    const number = base && fractionalPower(base, positive ? exponent : negate(exponent));
    if (!number)
      throw this.source.fault(
        'unsupported',
        `This root has no exact form here: square roots of rational numbers up to ${LARGEST_RADICAND} are read.`,
        span,
      );
    return [
      { ...only, number: this.arithmetic.checkedNumber(number, span), powers: scalePowers(only.powers, exponent) },
    ];
  }

  /** The exact rational a constant expression stands for, or an error that says what it must be. */
  rationalOf(value: Polynomial, what: string, span: Span): Rational {
    if (value.length === 0) return rational(0);
    const [only] = value;
    const known = value.length === 1 && only!.powers.length === 0 && only!.factors.length === 0;
    const number = known ? rationalValue(only!.number) : null;
    if (!number) throw this.source.fault('syntax', `${what} must be a rational number.`, span);
    return number;
  }

  /** n! (step 1) or n!! (step 2) of a whole number. */
  factorial(value: Polynomial, step: 1 | 2, span: Span): ExactNumber {
    const n = this.rationalOf(value, 'What stands before ! is a factorial and', span);
    if (!isInteger(n) || n.num < 0n)
      throw this.source.fault('syntax', 'The factorial is defined for whole numbers from 0.', span);
    if (n.num > BigInt(BOUNDS.factorial))
      throw this.source.limit(`Factorials up to ${BOUNDS.factorial}! are read.`, BOUNDS.factorial, null, span);
    let result = 1n;
    for (let k = n.num; k > 1n; k -= BigInt(step)) result *= k;
    return fromInteger(result);
  }
}

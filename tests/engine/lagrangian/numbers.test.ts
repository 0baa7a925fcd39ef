import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  addNumbers,
  conjugateNumber,
  digitsOf,
  type ExactNumber,
  equalNumbers,
  fromInteger,
  fromRational,
  IMAGINARY,
  invertNumber,
  isRealNumber,
  multiplyNumbers,
  NUMBER_ONE,
  NUMBER_ZERO,
  negateNumber,
  numberSign,
  powerOfNumber,
  powerOfPi,
  rationalValue,
  timesRoot,
} from '#engine/exact/number.ts';
import { numberText } from '#engine/exact/numberText.ts';
import { rational } from '#engine/exact/rational.ts';
import { LARGEST_RADICAND, productOfRoots, splitRoot } from '#engine/exact/squareFree.ts';

const part = fc
  .tuple(
    fc.integer({ min: -20, max: 20 }),
    fc.integer({ min: 1, max: 9 }),
    fc.constantFrom(1n, 2n, 3n, 6n, 10n),
    fc.boolean(),
  )
  .map(([n, d, root, imaginary]) => {
    const real = timesRoot(rational(n, d), root);
    return imaginary ? multiplyNumbers(IMAGINARY, real) : real;
  });
const number = fc.array(part, { maxLength: 3 }).map((parts) => parts.reduce(addNumbers, NUMBER_ZERO));
const equal = (a: ExactNumber, b: ExactNumber): void => expect(numberText(a)).toBe(numberText(b));

describe('exact numbers are a field', () => {
  it('sum and product commute, associate and distribute', () => {
    fc.assert(
      fc.property(number, number, number, (a, b, c) => {
        equal(addNumbers(a, b), addNumbers(b, a));
        equal(multiplyNumbers(a, b), multiplyNumbers(b, a));
        equal(multiplyNumbers(multiplyNumbers(a, b), c), multiplyNumbers(a, multiplyNumbers(b, c)));
        equal(multiplyNumbers(a, addNumbers(b, c)), addNumbers(multiplyNumbers(a, b), multiplyNumbers(a, c)));
      }),
      { numRuns: 200, seed: 11 },
    );
  });

  it('a number times its inverse is one', () => {
    fc.assert(
      fc.property(number, (a) => {
        fc.pre(a.parts.length > 0);
        const inverse = invertNumber(a);
        expect(inverse).not.toBeNull();
        equal(multiplyNumbers(a, inverse!), NUMBER_ONE);
      }),
      { numRuns: 200, seed: 12 },
    );
  });

  it('a number less itself is zero, and zero has no inverse', () => {
    fc.assert(
      fc.property(number, (a) => {
        expect(addNumbers(a, negateNumber(a)).parts).toEqual([]);
      }),
      { numRuns: 50, seed: 13 },
    );
    expect(() => invertNumber(NUMBER_ZERO)).toThrow(RangeError);
  });

  it('conjugation is an automorphism', () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        equal(conjugateNumber(multiplyNumbers(a, b)), multiplyNumbers(conjugateNumber(a), conjugateNumber(b)));
        expect(isRealNumber(multiplyNumbers(a, conjugateNumber(a)))).toBe(true);
      }),
      { numRuns: 100, seed: 14 },
    );
  });

  it('the real value of a product is the product of the real values', () => {
    const value = (a: ExactNumber): number =>
      a.parts.reduce((sum, { re, root }) => sum + (Number(re.num) / Number(re.den)) * Math.sqrt(Number(root)), 0);
    const real = number.map((a) => addNumbers(a, conjugateNumber(a)));
    fc.assert(
      fc.property(real, real, (a, b) => {
        expect(value(multiplyNumbers(a, b))).toBeCloseTo(value(a) * value(b), 6);
      }),
      { numRuns: 100, seed: 15 },
    );
  });
});

describe('numbers one by one', () => {
  it.each([
    [multiplyNumbers(IMAGINARY, IMAGINARY), '-1'],
    [multiplyNumbers(timesRoot(rational(1), 2n), timesRoot(rational(1), 6n)), '2*sqrt(3)'],
    [powerOfNumber(addNumbers(NUMBER_ONE, timesRoot(rational(1), 2n)), 3), '7 + 5*sqrt(2)'],
    [invertNumber(addNumbers(NUMBER_ONE, timesRoot(rational(1), 2n)))!, '-1 + sqrt(2)'],
    [invertNumber(addNumbers(NUMBER_ONE, IMAGINARY))!, '1/2 - 1/2*I'],
    [invertNumber(powerOfPi(rational(2)))!, 'pi^-2'],
    [multiplyNumbers(powerOfPi(rational(1, 2)), powerOfPi(rational(1, 2))), 'pi'],
  ])('%#: %s', (value, text) => {
    expect(numberText(value)).toBe(text);
  });

  it('sums with unlike powers of π have no inverse in closed form', () => {
    expect(invertNumber(addNumbers(NUMBER_ONE, powerOfPi(rational(1))))).toBeNull();
  });

  it('the inverse of a long sum of long roots is refused, not worked out', () => {
    const long = [2n, 3n, 5n, 7n, 11n].map((p) => timesRoot(rational(10n ** 20n - p, 10n ** 20n + p), p));
    expect(invertNumber(long.reduce(addNumbers, NUMBER_ONE))).toBeNull();
  });

  it('sign, rational value and digits', () => {
    expect(numberSign(fromInteger(-3))).toBe(-1);
    expect(numberSign(timesRoot(rational(2), 3n))).toBe(1);
    expect(numberSign(NUMBER_ZERO)).toBe(0);
    expect(numberSign(IMAGINARY)).toBeNull();
    expect(rationalValue(fromRational(rational(3, 4)))).toEqual(rational(3, 4));
    expect(rationalValue(timesRoot(rational(1), 2n))).toBeNull();
    expect(digitsOf(fromInteger(10n ** 40n))).toBeGreaterThanOrEqual(40);
    expect(equalNumbers(NUMBER_ONE, fromInteger(1))).toBe(true);
  });
});

describe('square roots of integers', () => {
  /** The largest square divisor by trial of every divisor. */
  const bySearch = (n: number): number => {
    let best = 1;
    for (let d = 1; d * d <= n; d++) if (n % (d * d) === 0) best = d;
    return best;
  };

  it('are split as by trial of every divisor', () => {
    for (let n = 1; n <= 3000; n++) {
      const { outside, root } = splitRoot(BigInt(n));
      expect([outside, root]).toEqual([BigInt(bySearch(n)), BigInt(n / bySearch(n) ** 2)]);
    }
  });

  it.each([
    [999_983n ** 2n, 999_983n, 1n],
    [999_983n * 999_979n, 1n, 999_983n * 999_979n],
    [10n ** 15n, 10n ** 7n, 10n],
    [2n ** 49n, 2n ** 24n, 2n],
  ])('√%s = %s √%s', (n, outside, root) => {
    expect(splitRoot(n)).toEqual({ outside, root });
  });

  it('beyond the bound there is none', () => {
    expect(() => splitRoot(LARGEST_RADICAND + 1n)).toThrow(RangeError);
    expect(() => splitRoot(0n)).toThrow(RangeError);
  });

  it('multiply to a square-free root', () => {
    expect(productOfRoots(6n, 10n)).toEqual({ outside: 2n, root: 15n });
  });
});

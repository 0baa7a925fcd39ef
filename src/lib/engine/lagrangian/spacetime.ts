import { InputError } from '../errors.ts';
import {
  add,
  divide,
  format,
  isZero,
  multiply,
  negate,
  ONE,
  type Rational,
  rational,
  sign,
} from '../exact/rational.ts';

/** a + b ε: a number that may depend on the regulator of d = 4 − 2ε. */
export interface Linear {
  readonly constant: Rational;
  readonly epsilon: Rational;
}

export const linear = (constant: Rational, epsilon: Rational = rational(0)): Linear => ({ constant, epsilon });
export const addLinear = (a: Linear, b: Linear): Linear =>
  linear(add(a.constant, b.constant), add(a.epsilon, b.epsilon));
export const scaleLinear = (a: Linear, by: Rational): Linear =>
  linear(multiply(a.constant, by), multiply(a.epsilon, by));
export const subtractLinear = (a: Linear, b: Linear): Linear => addLinear(a, scaleLinear(b, rational(-1)));
export const isZeroLinear = (a: Linear): boolean => isZero(a.constant) && isZero(a.epsilon);

function termText(value: Rational, symbol: string, slash: (q: Rational) => string): string {
  const size = sign(value) < 0 ? negate(value) : value;
  return size.num === 1n && size.den === 1n ? symbol : `${slash(size)}${symbol}`;
}

function joined(a: Linear, symbol: string, number: (q: Rational) => string): string {
  if (isZero(a.epsilon)) return number(a.constant);
  const epsilon = termText(a.epsilon, symbol, number);
  const negative = sign(a.epsilon) < 0;
  if (isZero(a.constant)) return negative ? `-${epsilon}` : epsilon;
  return `${number(a.constant)} ${negative ? '-' : '+'} ${epsilon}`;
}

/** "1 - 2eps", "3/2", "eps/2" is written "1/2 eps". */
export const linearText = (a: Linear): string =>
  joined(a, 'eps', (q) => (q.den === 1n ? format(q) : `${format(q)} `)).trim();
export const linearLatex = (a: Linear): string =>
  joined(a, '\\varepsilon', (q) =>
    q.den === 1n ? format(q) : `${q.num < 0n ? '-' : ''}\\tfrac{${q.num < 0n ? -q.num : q.num}}{${q.den}}`,
  );

/**
 * Reads a space-time dimension: a number ("4", "3", "10/3") or one less a multiple of ε ("4-2eps", "4 − ε", "6-2\epsilon").
 * @throws InputError bad-request.
 */
export function readDimension(text: string): Linear {
  const plain = text
    .replace(/[−–]/g, '-')
    .replace(/\\(var)?epsilon|ε|ϵ|epsilon/g, 'eps')
    .replace(/[\s*{}$\\,]/g, '');
  const match = /^(\d{1,3}(?:\/[1-9]\d{0,2})?)(?:([+-])(\d{0,3})eps)?$/.exec(plain);
  if (!match)
    throw new InputError(
      'bad-request',
      `The dimension "${text.slice(0, 24)}" must be a number or a number less a multiple of eps, such as "4" or "4-2eps".`,
    );
  const [num, den] = match[1]!.split('/');
  const size = match[2] === undefined ? rational(0) : rational(BigInt(match[3] === '' ? '1' : match[3]!));
  return linear(
    divide(rational(BigInt(num!)), den ? rational(BigInt(den)) : ONE),
    match[2] === '-' ? negate(size) : size,
  );
}

import type { ExactNumber, NumberPart } from './number.ts';
import { format, isZero, negate, type Rational, sign } from './rational.ts';

/** How the pieces of a number are written. */
interface Notation {
  readonly rational: (value: Rational) => string;
  readonly i: string;
  readonly pi: (power: Rational) => string;
  readonly root: (n: bigint) => string;
  readonly times: string;
}

const TEXT: Notation = {
  rational: format,
  i: 'I',
  pi: (power) => (power.num === power.den ? 'pi' : `pi^${power.den === 1n ? format(power) : `(${format(power)})`}`),
  root: (n) => `sqrt(${n})`,
  times: '*',
};

/** As the Lagrangian language reads numbers. */
const TYPED: Notation = { ...TEXT, i: 'i' };

const LATEX: Notation = {
  rational: (value) =>
    value.den === 1n
      ? `${value.num}`
      : `${value.num < 0n ? '-' : ''}\\frac{${value.num < 0n ? -value.num : value.num}}{${value.den}}`,
  i: 'i',
  pi: (power) => (power.num === power.den ? '\\pi' : `\\pi^{${format(power)}}`),
  root: (n) => `\\sqrt{${n}}`,
  times: ' ',
};

/** A real multiple of i^imaginary · π^pi · √root, with its sign apart. */
function written(
  value: Rational,
  imaginary: boolean,
  { pi, root }: NumberPart,
  notation: Notation,
): { minus: boolean; text: string } {
  const minus = sign(value) < 0;
  const size = minus ? negate(value) : value;
  const symbols = [
    ...(imaginary ? [notation.i] : []),
    ...(isZero(pi) ? [] : [notation.pi(pi)]),
    ...(root === 1n ? [] : [notation.root(root)]),
  ];
  const one = size.num === 1n && size.den === 1n;
  const pieces = one && symbols.length > 0 ? symbols : [notation.rational(size), ...symbols];
  return { minus, text: pieces.join(notation.times) };
}

function write(number: ExactNumber, notation: Notation): { minus: boolean; text: string; terms: number } {
  const terms = number.parts.flatMap((part) => [
    ...(isZero(part.re) ? [] : [written(part.re, false, part, notation)]),
    ...(isZero(part.im) ? [] : [written(part.im, true, part, notation)]),
  ]);
  const [first, ...rest] = terms;
  if (!first) return { minus: false, text: '0', terms: 1 };
  const text = [first.text, ...rest.map((term) => `${term.minus ? ' - ' : ' + '}${term.text}`)].join('');
  return { minus: first.minus, text, terms: terms.length };
}

const signed = ({ minus, text }: { minus: boolean; text: string }): string => (minus ? `-${text}` : text);

/** A number as ASCII text: "-3/4", "2*I*sqrt(2)", "1 + sqrt(2)". */
export const numberText = (number: ExactNumber): string => signed(write(number, TEXT));
/** The same in LaTeX. */
export const numberLatex = (number: ExactNumber): string => signed(write(number, LATEX));

/** A number times symbols ("1" or "" for none): "-I*g", "(1 + sqrt(2))*g", "g". */
function product(number: ExactNumber, symbols: string, notation: Notation): string {
  if (symbols === '' || symbols === '1') return signed(write(number, notation));
  const { minus, text, terms } = write(number, notation);
  if (terms > 1) {
    const whole = signed({ minus, text });
    return notation !== LATEX ? `(${whole})${notation.times}${symbols}` : `\\left(${whole}\\right) ${symbols}`;
  }
  const joined = text === '1' ? symbols : `${text}${notation.times}${symbols}`;
  return minus ? `-${joined}` : joined;
}

export const productText = (number: ExactNumber, symbols: string): string => product(number, symbols, TEXT);
export const productLatex = (number: ExactNumber, symbols: string): string => product(number, symbols, LATEX);

/** A number as a Lagrangian is typed: "1/24", "i*sqrt(2)", "1 + sqrt(2)"; `terms` says whether it needs brackets in a product. */
export const typedNumber = (number: ExactNumber): { minus: boolean; text: string; terms: number } =>
  write(number, TYPED);
export const latexNumber = (number: ExactNumber): { minus: boolean; text: string; terms: number } =>
  write(number, LATEX);

import {
  addNumbers,
  type ExactNumber,
  fromInteger,
  IMAGINARY,
  isZeroNumber,
  multiplyNumbers,
  NUMBER_ONE,
  NUMBER_ZERO,
  negateNumber,
} from '../exact/number.ts';
import { format, negate, type Rational, sign } from '../exact/rational.ts';
import { parameterBase } from '../lagrangian/kinds.ts';
import type { Monomial, Signature, VertexKind } from '../lagrangian/model.ts';
import { nameLatex } from '../lagrangian/symbols.ts';
import { type Assignments, assignments, type MomentumMonomial, monomialText } from './momenta.ts';

/** A vertex factor: its coupling times a polynomial in scalar products of incoming momenta with exact coefficients. */
export interface VertexFactor {
  readonly parameters: Monomial;
  readonly terms: readonly { readonly monomial: MomentumMonomial; readonly number: ExactNumber }[];
  /** The permutation sum of each term of the Lagrangian, in the order of kind.terms. */
  readonly sums: readonly Assignments[];
}

/** i for e^{iS}; −1 for e^{−S_E}. */
const phaseOf = (signature: Signature): ExactNumber =>
  signature === 'euclidean' ? negateNumber(NUMBER_ONE) : IMAGINARY;

/**
 * The vertex factor of a kind: i × the functional derivative of L (Euclidean: − that of L_E), all momenta incoming.
 *
 * Every contracted pair ∂_μ…∂^μ on legs i and j gives (∓i)² p_i·p_j = −p_i·p_j in all three conventions. Momentum conservation is
 * not used.
 * @throws LimitError when there are too many different momentum products to write out.
 * @example −λφ⁴/4! gives −iλ; (b/2)φ(∂φ)² gives −ib(p₁·p₂ + p₁·p₃ + p₂·p₃)
 */
export function vertexFactor(kind: VertexKind, signature: Signature): VertexFactor {
  const phase = phaseOf(signature);
  const sums = kind.terms.map((term) => assignments(term, kind.fields));
  const totals = new Map<string, { monomial: MomentumMonomial; number: ExactNumber }>();
  kind.terms.forEach((term, at) => {
    const flipped = term.derivatives.length % 2 === 1 ? negateNumber(term.number) : term.number;
    const each = multiplyNumbers(phase, flipped);
    for (const { monomial, count } of sums[at]!.monomials) {
      const key = monomialText(monomial);
      const before = totals.get(key)?.number ?? NUMBER_ZERO;
      totals.set(key, { monomial, number: addNumbers(before, multiplyNumbers(each, fromInteger(count))) });
    }
  });
  const terms = [...totals].filter(([, { number }]) => !isZeroNumber(number));
  terms.sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));
  return { parameters: kind.parameters, terms: terms.map(([, entry]) => entry), sums };
}

/** One real multiple of i^imaginary √root π^pi. */
interface Piece {
  readonly value: Rational;
  readonly imaginary: boolean;
  readonly root: bigint;
  readonly pi: Rational;
}

const piecesOf = (number: ExactNumber): Piece[] =>
  number.parts.flatMap(({ re, im, root, pi }) => [
    ...(re.num === 0n ? [] : [{ value: re, imaginary: false, root, pi }]),
    ...(im.num === 0n ? [] : [{ value: im, imaginary: true, root, pi }]),
  ]);

const powerText = (base: string, power: Rational): string => {
  if (power.num === power.den) return base;
  return power.den === 1n ? `${base}**${power.num}` : `${base}**(${format(power)})`;
};

const baseText = (name: string): string => (name.endsWith('^*') ? `conj(${parameterBase(name)})` : name);

function momentaText(monomial: MomentumMonomial): string[] {
  const powers = new Map<string, number>();
  for (const [i, j] of monomial) powers.set(`p${i}.p${j}`, (powers.get(`p${i}.p${j}`) ?? 0) + 1);
  return [...powers].map(([base, n]) => (n === 1 ? base : `${base}**${n}`));
}

function pieceText({ value, imaginary, root, pi }: Piece, parameters: Monomial, monomial: MomentumMonomial) {
  const minus = sign(value) < 0;
  const size = minus ? negate(value) : value;
  const powers: [string, Rational][] = [...parameters].map(([name, power]) => [baseText(name), power]);
  if (pi.num !== 0n) powers.unshift(['pi', pi]);
  const above = [
    ...(imaginary ? ['I'] : []),
    ...(root === 1n ? [] : [`sqrt(${root})`]),
    ...powers.filter(([, power]) => sign(power) > 0).map(([base, power]) => powerText(base, power)),
    ...momentaText(monomial),
  ];
  const below = [
    ...(size.den === 1n ? [] : [`${size.den}`]),
    ...powers.filter(([, power]) => sign(power) < 0).map(([base, power]) => powerText(base, negate(power))),
  ];
  if (size.num !== 1n || above.length === 0) above.unshift(`${size.num}`);
  const quotient = below.length === 0 ? '' : below.length === 1 ? `/${below[0]}` : `/(${below.join('*')})`;
  return { minus, text: `${above.join('*')}${quotient}` };
}

const powerLatex = (name: string, power: Rational): string => {
  const base = name.endsWith('^*') ? `${nameLatex(parameterBase(name))}^{*}` : name === 'pi' ? '\\pi' : nameLatex(name);
  if (power.num === power.den) return base;
  return base.includes('^') ? `(${base})^{${format(power)}}` : `${base}^{${format(power)}}`;
};

const dotLatex = ([i, j]: readonly [number, number]): string =>
  i === j ? `p_{${i}}^{2}` : `p_{${i}}\\!\\cdot\\!p_{${j}}`;

const momentaLatex = (monomial: MomentumMonomial): string =>
  monomial.map((pair) => (monomial.length > 1 ? `(${dotLatex(pair)})` : dotLatex(pair))).join('');

function pieceLatex({ value, imaginary, root, pi }: Piece, parameters: Monomial, monomial: MomentumMonomial) {
  const minus = sign(value) < 0;
  const size = minus ? negate(value) : value;
  const powers: [string, Rational][] = [...parameters];
  if (pi.num !== 0n) powers.unshift(['pi', pi]);
  const up = powers.filter(([, power]) => sign(power) > 0).map(([name, power]) => powerLatex(name, power));
  const down = powers.filter(([, power]) => sign(power) < 0).map(([name, power]) => powerLatex(name, negate(power)));
  const above = [...(imaginary ? ['i'] : []), ...(root === 1n ? [] : [`\\sqrt{${root}}`]), ...up];
  if (size.num !== 1n || (above.length === 0 && monomial.length === 0)) above.unshift(`${size.num}`);
  const below = [...(size.den === 1n ? [] : [`${size.den}`]), ...down];
  const front = below.length === 0 ? above.join('\\,') : `\\frac{${above.join('\\,') || '1'}}{${below.join('\\,')}}`;
  return { minus, text: [front, momentaLatex(monomial)].filter(Boolean).join('\\,') };
}

function written(factor: VertexFactor, write: typeof pieceText): string {
  const pieces = factor.terms.flatMap(({ monomial, number }) =>
    piecesOf(number).map((piece) => write(piece, factor.parameters, monomial)),
  );
  if (pieces.length === 0) return '0';
  return pieces
    .map(({ minus, text }, at) => (at === 0 ? `${minus ? '-' : ''}${text}` : `${minus ? ' - ' : ' + '}${text}`))
    .join('');
}

/** "-I*lambda", "-2*I*p1.p2/f**2 - …": numbers, then I, roots, couplings, momenta. */
export const factorText = (factor: VertexFactor): string => written(factor, pieceText);
/** The same in LaTeX. */
export const factorLatex = (factor: VertexFactor): string => written(factor, pieceLatex);

/** The permutation sum of derivative terms, line by line: the counts of the lines add up to ∏ k_field!. */
export function permutationLines({ sums }: VertexFactor): string[] {
  return sums.flatMap(({ monomials, total }) =>
    monomials
      .filter(({ monomial }) => monomial.length > 0)
      .map(({ monomial, count }) => {
        const signText = monomial.length % 2 === 1 ? '−' : '';
        const product = monomial.map(([i, j]) => (i === j ? `p${i}²` : `p${i}·p${j}`)).join(' ');
        return `${count} of ${total} assignments: ${signText}${product}`;
      }),
  );
}

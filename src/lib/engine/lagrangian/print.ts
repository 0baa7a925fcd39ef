import { factorial } from '../exact/combinatorics.ts';
import { type ExactNumber, fromInteger, rationalValue } from '../exact/number.ts';
import { latexNumber, typedNumber } from '../exact/numberText.ts';
import { negate } from '../exact/rational.ts';
import { parametersLatex, parametersText } from './kinds.ts';
import type { CoefficientTerm, FieldFactor, Model, Monomial, Term } from './model.ts';
import { nameLatex } from './symbols.ts';
import { termsOf } from './terms.ts';

/** How a term is written: as text that is typed, or as LaTeX. Both parse back to the same term. */
interface Style {
  readonly number: typeof typedNumber;
  readonly parameters: (parameters: Monomial) => string;
  readonly name: (factor: FieldFactor) => string;
  readonly power: (base: string, n: number) => string;
  readonly derivative: (index: string, upper: boolean) => string;
  readonly box: string;
  readonly square: (field: string) => string;
  readonly indices: readonly string[];
  /** A coefficient over a denominator. */
  readonly over: (above: string, below: string) => string;
  readonly product: string;
}

const INDICES = ['mu', 'nu', 'rho', 'sigma', 'tau', 'kappa', 'alpha', 'beta', 'gamma', 'delta'];

const TEXT: Style = {
  number: typedNumber,
  parameters: parametersText,
  name: ({ field, conjugate }) => (conjugate ? `${field}^*` : field),
  power: (base, n) => (base.endsWith('*') ? `(${base})^${n}` : `${base}^${n}`),
  derivative: (index, upper) => `d${upper ? '^' : '_'}${index}`,
  box: 'd^2',
  square: (field) => `(d ${field})^2`,
  indices: INDICES,
  over: (above, below) => `${above}/${below}`,
  product: ' ',
};

const LATEX: Style = {
  number: latexNumber,
  parameters: parametersLatex,
  name: ({ field, conjugate }) => (conjugate ? `${nameLatex(field)}^{*}` : nameLatex(field)),
  power: (base, n) => (base.includes('^') ? `(${base})^{${n}}` : `${base}^{${n}}`),
  derivative: (index, upper) => `\\partial${upper ? '^' : '_'}{\\${index}}`,
  box: '\\partial^2',
  square: (field) => `(\\partial ${field})^{2}`,
  indices: INDICES,
  over: (above, below) => `\\frac{${above}}{${below}}`,
  product: ' ',
};

function countsOf(factors: readonly FieldFactor[]): Map<string, number> {
  const counts = new Map<string, number>();
  for (const { field, conjugate } of factors) {
    const key = conjugate ? `${field}^*` : field;
    counts.set(key, (counts.get(key) ?? 0) + 1);
  }
  return counts;
}

/** ∏ k!, k the number of equal fields of a term: the ways to exchange them. */
export const exchanges = (factors: readonly FieldFactor[]): bigint =>
  [...countsOf(factors).values()].reduce((product, n) => product * factorial(n), 1n);

const same = (a: FieldFactor, b: FieldFactor): boolean => a.field === b.field && a.conjugate === b.conjugate;

/** Runs of equal plain factors as powers. */
function plainFactors(factors: readonly FieldFactor[], style: Style): string[] {
  const runs: { factor: FieldFactor; n: number }[] = [];
  for (const factor of factors) {
    const last = runs.at(-1);
    if (last && same(last.factor, factor)) last.n++;
    else runs.push({ factor, n: 1 });
  }
  return runs.map(({ factor, n }) => (n === 1 ? style.name(factor) : style.power(style.name(factor), n)));
}

/** The fields of a term with their derivatives: "h^2 (d s)^2", "phi d_mu h d^mu s", "phi d^2 phi". */
function fieldsOf({ factors, derivatives }: Term, style: Style): string {
  const [only] = derivatives;
  const under = new Set(derivatives.flat());
  const plain = plainFactors(
    factors.filter((_, at) => !under.has(at)),
    style,
  );
  if (derivatives.length === 1 && only![0] !== only![1]) {
    const [a, b] = [factors[only![0]]!, factors[only![1]]!];
    if (same(a, b)) return [...plain, style.square(style.name(a))].join(style.product);
    if (style === TEXT) return [...plain, `(d ${style.name(a)})(d ${style.name(b)})`].join(style.product);
  }
  const operators: string[][] = factors.map(() => []);
  derivatives.forEach(([i, j], at) => {
    if (i === j) operators[i]!.unshift(style.box);
    else {
      operators[i]!.push(style.derivative(style.indices[at]!, false));
      operators[j]!.push(style.derivative(style.indices[at]!, true));
    }
  });
  const derived = factors.flatMap((factor, at) =>
    under.has(at) ? [`${operators[at]!.join(' ')} ${style.name(factor)}`] : [],
  );
  return [...plain, ...derived].join(style.product);
}

/** The factorials of the fields that stand three times or more in a term without derivatives, as on paper: "4!", "(3! 3!)". */
function paperFactorials({ factors, derivatives }: Term, style: Style): string | null {
  if (derivatives.length > 0) return null;
  const counts = [...countsOf(factors).values()];
  if (!counts.some((n) => n > 2)) return null;
  const pieces = counts.filter((n) => n > 1).map((n) => `${n}!`);
  return pieces.length === 1 || style === LATEX ? pieces.join(style.product) : `(${pieces.join(style.product)})`;
}

/** A coefficient in pieces: a number, the parameters beside it, and what stands below the line. */
interface Coefficient {
  readonly number: ExactNumber;
  readonly parameters: Monomial;
  readonly below: string | null;
}

/** What stands below the line: factorials or a whole number, then parameters with negative whole powers; null for nothing. */
function belowText(number: string | null, parameters: Monomial, style: Style): string | null {
  const inverse = new Map([...parameters].map(([name, power]) => [name, negate(power)]));
  const pieces = [...(number === null ? [] : [number]), ...(inverse.size === 0 ? [] : [style.parameters(inverse)])];
  if (pieces.length === 0) return null;
  const joined = pieces.join(style.product);
  return style === TEXT && (pieces.length > 1 || inverse.size > 1) ? `(${joined})` : joined;
}

/** The coefficient of a term as on paper: of a vertex with a rational number, one fraction; otherwise a number in front. */
function fraction(term: Term, style: Style): Coefficient {
  const value = rationalValue(term.number);
  if (!value || term.parameters.size === 0 || term.factors.length < 3)
    return { number: term.number, parameters: term.parameters, below: null };
  const factorials = paperFactorials(term, style);
  const isPaper =
    factorials !== null && (value.num === 1n || value.num === -1n) && value.den === exchanges(term.factors);
  const under = new Map([...term.parameters].filter(([, power]) => power.num < 0n && power.den === 1n));
  const over = new Map([...term.parameters].filter(([name]) => !under.has(name)));
  const below = belowText(isPaper ? factorials : value.den === 1n ? null : `${value.den}`, under, style);
  return { number: fromInteger(value.num), parameters: over, below };
}

/** A number times parameters over what stands below the line. */
function coefficientOf(number: ExactNumber, parameters: Monomial, below: string | null, style: Style) {
  const { minus: negative, text, terms } = style.number(number);
  const minus = negative && terms === 1;
  const symbols = parameters.size === 0 ? '' : style.parameters(parameters);
  const bracketed = terms > 1 ? `(${negative ? '-' : ''}${text})` : text;
  const above = symbols === '' ? bracketed : bracketed === '1' ? symbols : `${bracketed} ${symbols}`;
  return { minus, text: below === null ? above : style.over(above, below) };
}

function written(term: Term, style: Style): { minus: boolean; text: string } {
  const { number, parameters, below } = fraction(term, style);
  const { minus, text } = coefficientOf(number, parameters, below, style);
  const fields = fieldsOf(term, style);
  return { minus, text: text === '1' ? fields : `${text} ${fields}` };
}

function sum(terms: readonly Term[], style: Style): string {
  return terms
    .map((term, at) => {
      const { minus, text } = written(term, style);
      return at === 0 ? `${minus ? '-' : ''}${text}` : `${minus ? '-' : '+'} ${text}`;
    })
    .join(' ');
}

/** One term as it is typed: "-lambda/4! phi^4". */
export const termText = (term: Term): string => sum([term], TEXT);
export const termLatex = (term: Term): string => sum([term], LATEX);

/** A sum of terms as it is typed; "0" for none. */
export const termsText = (terms: readonly Term[]): string => (terms.length === 0 ? '0' : sum(terms, TEXT));

/** The normal form as a text that parses to the same model. */
export const modelText = (model: Model): string => sum(termsOf(model), TEXT);
/** The normal form in LaTeX that parses to the same model. */
export const modelLatex = (model: Model): string => sum(termsOf(model), LATEX);

function coefficientSum(terms: readonly CoefficientTerm[], style: Style): string {
  if (terms.length === 0) return '0';
  return terms
    .map(({ number, parameters }, at) => {
      const { minus, text } = coefficientOf(number, parameters, null, style);
      return at === 0 ? `${minus ? '-' : ''}${text}` : `${minus ? '-' : '+'} ${text}`;
    })
    .join(' ');
}

/** A sum of numbers times parameters, such as a mass squared: "m^2 + 1/2 lambda*v^2". */
export const coefficientText = (terms: readonly CoefficientTerm[]): string => coefficientSum(terms, TEXT);
export const coefficientLatex = (terms: readonly CoefficientTerm[]): string => coefficientSum(terms, LATEX);

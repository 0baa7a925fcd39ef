import {
  type ExactNumber,
  fromInteger,
  multiplyNumbers,
  negateNumber,
  numberSign,
  rationalValue,
} from '../exact/number.ts';
import { divide, type Rational, rational, sign, subtract } from '../exact/rational.ts';
import { parametersText } from './kinds.ts';
import type { Model, Term } from './model.ts';
import { multiplyPowers, type Powers, scalePowers } from './monomial.ts';

/** Whether the potential is bounded from below where its highest powers dominate, with every real parameter taken as positive. */
export interface Boundedness {
  readonly answer: 'bounded' | 'unbounded' | 'condition' | 'undecided' | 'free';
  readonly text: string;
}

/** One summand of the leading potential: a number times parameters. */
interface Summand {
  readonly number: ExactNumber;
  readonly powers: Powers;
}

/** The leading potential by its content: powers of each r = φ² (real) or |φ|² (complex), as "r:n …". */
interface Leading {
  readonly degree: number;
  /** Key of powers of the squares → coefficient; null when some monomial is not even in every field. */
  readonly even: ReadonlyMap<string, readonly Summand[]> | null;
  readonly variables: readonly string[];
}

const ASSUMED = 'Parameters are taken as real and positive.';

/** Powers of the squares of fields in a monomial, or null when a field is left over. */
function squares(model: Model, { factors }: Term): Map<string, number> | null {
  const counts = new Map<string, [number, number]>();
  for (const { field, conjugate } of factors) {
    const known = counts.get(field) ?? [0, 0];
    known[conjugate ? 1 : 0]++;
    counts.set(field, known);
  }
  const powers = new Map<string, number>();
  for (const { name, kind } of model.fields) {
    const [plain, starred] = counts.get(name) ?? [0, 0];
    if (kind === 'real' ? plain % 2 !== 0 : plain !== starred) return null;
    if (plain > 0) powers.set(name, kind === 'real' ? plain / 2 : plain);
  }
  return powers;
}

const keyOf = (powers: ReadonlyMap<string, number>): string => [...powers].map(([name, n]) => `${name}:${n}`).join(' ');

/** The part of highest degree of the potential V: −L in Minkowski space, +L in Euclidean. */
function leadingPart(model: Model): Leading | null {
  const plain = model.kinds.flatMap(({ terms }) => terms).filter(({ derivatives }) => derivatives.length === 0);
  const degree = Math.max(0, ...plain.map(({ factors }) => factors.length));
  if (degree < 3) return null;
  const top = plain.filter(({ factors }) => factors.length === degree);
  const variables = [...new Set(top.flatMap(({ factors }) => factors.map(({ field }) => field)))].sort();
  const even = new Map<string, Summand[]>();
  for (const term of top) {
    const powers = squares(model, term);
    if (!powers) return { degree, even: null, variables };
    const number = model.conventions.signature === 'euclidean' ? term.number : negateNumber(term.number);
    const key = keyOf(powers);
    even.set(key, [...(even.get(key) ?? []), { number, powers: [...term.parameters] }]);
  }
  return { degree, even, variables };
}

/** The common sign of summands; null when they differ or a parameter is complex with an odd power. */
function signOf(model: Model, summands: readonly Summand[]): -1 | 1 | null {
  const complex = new Set(model.parameters.filter((p) => p.complex).map(({ name }) => name));
  const signs = summands.map(({ number, powers }) =>
    powers.some(([name]) => complex.has(name.replace('^*', ''))) ? null : numberSign(number),
  );
  const [first] = signs;
  return first && signs.every((other) => other === first) ? first : null;
}

const undecided = (why: string): Boundedness => ({ answer: 'undecided', text: `Not decided: ${why}` });

function sameParameters(a: Powers, b: Powers): boolean {
  return parametersText(new Map(a)) === parametersText(new Map(b));
}

/** b² − 4ac of a form a·r² − b·r·s + c·s² whose parameters cancel, as the sign of a rational; null when they do not. */
function discriminant(a: Summand, b: Summand, c: Summand): Rational | null {
  const two: Rational = rational(2);
  if (!sameParameters(scalePowers(b.powers, two), multiplyPowers(a.powers, c.powers))) return null;
  const square = rationalValue(multiplyNumbers(b.number, b.number));
  const product = rationalValue(multiplyNumbers(fromInteger(4), multiplyNumbers(a.number, c.number)));
  return square && product && subtract(square, product);
}

const times = (size: bigint, name: string): string =>
  name === '1' ? `${size}` : size === 1n ? name : `${size} ${name}`;

/** b² < 4ac with the numbers in lowest terms: "b^2 < 4 a*c"; null when a number is not rational. */
function conditionText(a: Summand, b: Summand, c: Summand): string | null {
  const square = rationalValue(multiplyNumbers(b.number, b.number));
  const product = rationalValue(multiplyNumbers(fromInteger(4), multiplyNumbers(a.number, c.number)));
  if (!square || !product) return null;
  const { num, den } = divide(square, product);
  const left = parametersText(new Map(scalePowers(b.powers, rational(2))));
  return `${times(num, left)} < ${times(den, parametersText(new Map(multiplyPowers(a.powers, c.powers))))}`;
}

/**
 * A quartic in two squares with a negative cross term: a·r² − b·r·s + c·s² ≥ 0 for r, s ≥ 0 exactly when b² ≤ 4ac
 * (copositivity of order two; K. Kannike, Eur. Phys. J. C 72 (2012) 2093).
 */
function copositive(a: readonly Summand[], b: readonly Summand[], c: readonly Summand[]): Boundedness {
  if (a.length + b.length + c.length > 3) return undecided('its mixed term is negative and a coefficient is a sum.');
  const [x, y, z] = [a[0]!, b[0]!, c[0]!];
  const d = discriminant(x, y, z);
  if (d === null) {
    const condition = conditionText(x, y, z);
    return condition === null
      ? undecided('its mixed term is negative.')
      : { answer: 'condition', text: `Bounded from below if ${condition}. ${ASSUMED}` };
  }
  if (sign(d) > 0) return { answer: 'unbounded', text: `Unbounded from below: the mixed term wins. ${ASSUMED}` };
  return sign(d) < 0
    ? { answer: 'bounded', text: `Bounded from below. ${ASSUMED}` }
    : undecided('the quartic part vanishes in one direction, where lower powers decide.');
}

function decide(
  model: Model,
  degree: number,
  even: ReadonlyMap<string, readonly Summand[]>,
  variables: readonly string[],
): Boundedness {
  const pure = variables.map((name) => even.get(`${name}:${degree / 2}`) ?? null);
  const falling = variables.find((_, i) => pure[i] && signOf(model, pure[i]!) === -1);
  if (falling) return { answer: 'unbounded', text: `Unbounded from below in the direction of ${falling}. ${ASSUMED}` };
  const signs = [...even.values()].map((summands) => signOf(model, summands));
  if (signs.includes(null)) return undecided('the sign of a coefficient depends on the values of the parameters.');
  const positive = signs.every((s) => s === 1);
  if (pure.every((summands) => summands !== null)) {
    if (positive) return { answer: 'bounded', text: `Bounded from below. ${ASSUMED}` };
    if (variables.length === 2 && degree === 4) {
      const mixed = even.get(`${variables[0]}:1 ${variables[1]}:1`)!;
      return copositive(pure[0]!, mixed, pure[1]!);
    }
    return undecided('some coefficients of its highest powers are negative.');
  }
  return positive
    ? undecided('its highest powers vanish in some directions, where lower powers decide.')
    : {
        answer: 'unbounded',
        text: `Unbounded from below: a negative mixed term is not held by pure powers. ${ASSUMED}`,
      };
}

/**
 * Decides from the part of highest degree whether the potential (interaction terms without derivatives) is bounded from below:
 * one field by its sign, two fields by copositivity of a quartic in squares, more fields where all coefficients are positive.
 */
export function boundedness(model: Model): Boundedness {
  const leading = leadingPart(model);
  if (!leading) return { answer: 'free', text: 'The potential has no term beyond the quadratic ones.' };
  const { degree, even, variables } = leading;
  if (degree % 2 === 1)
    return {
      answer: 'unbounded',
      text: `Unbounded from below: the highest power, ${degree}, is odd. The expansion about the origin is still well defined order by order.`,
    };
  if (!even) return undecided('its highest powers are not all even in every field.');
  return decide(model, degree, even, variables);
}

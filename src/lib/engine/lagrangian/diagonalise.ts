import type { InputError } from '../errors.ts';
import {
  equalNumbers,
  invertNumber,
  multiplyNumbers,
  NUMBER_ONE,
  negateNumber,
  rationalValue,
} from '../exact/number.ts';
import { add, divide, format, multiply, ONE, type Rational, rational, sign, subtract } from '../exact/rational.ts';
import { splitRoot } from '../exact/squareFree.ts';
import { Arithmetic } from './arithmetic.ts';
import { parametersText } from './kinds.ts';
import type { CoefficientTerm, Model, VertexKind } from './model.ts';
import { constant, type Polynomial } from './monomial.ts';
import { Source } from './source.ts';
import { rotateFields } from './substitute.ts';

type Pair = readonly [string, string];

/** The rotation that removes one mass mixing: fields, cosine and sine as text. */
export interface Rotation {
  readonly fields: Pair;
  readonly cosine: string;
  readonly sine: string;
}

/** Makes the refusal of a mixing term, with its place. */
type Refuse = (message: string) => InputError;

const polynomial = (terms: readonly CoefficientTerm[]): Polynomial =>
  terms.map(({ number, parameters }) => ({ ...constant(number), powers: [...parameters] }));

/** Mass mixing of two different fields, left where it is when its parameter is marked as a vertex. */
function mixings(model: Model): VertexKind[] {
  const marked = new Set(model.parameters.filter((p) => p.vertex || p.loops > 0).map(({ name }) => name));
  return model.kinds.filter(
    ({ fields, parameters }) =>
      fields.length === 2 &&
      fields[0]!.field !== fields[1]!.field &&
      ![...parameters.keys()].some((name) => marked.has(name.replace('^*', ''))),
  );
}

function refuseUnlike(model: Model, [a, b]: Pair, kinds: readonly VertexKind[], refuse: Refuse): void {
  const isUnit = (terms: readonly CoefficientTerm[]): boolean =>
    terms.length === 1 && terms[0]!.parameters.size === 0 && equalNumbers(terms[0]!.number, NUMBER_ONE);
  const pair = model.propagators.filter(({ field }) => field === a || field === b);
  const complex = model.fields.some(({ name, kind }) => kind === 'complex' && (name === a || name === b));
  const derived = kinds.some(({ terms }) => terms.some(({ derivatives }) => derivatives.length > 0));
  if (complex || derived || !pair.every(({ kinetic }) => isUnit(kinetic)))
    throw refuse(
      `${a} and ${b} are not diagonalised: that is offered for masses of real fields with kinetic terms ½(∂φ)².`,
    );
}

/** tan 2θ as a rational: twice the mixing over the difference of the squared masses; null when the latter is zero. */
function tangent(difference: Polynomial, mixing: Polynomial, [a, b]: Pair, refuse: Refuse): Rational | null {
  if (difference.length === 0) return null;
  const [d, m] = [difference[0]!, mixing[0]!];
  const inverse = invertNumber(d.number);
  const ratio = inverse && rationalValue(multiplyNumbers(m.number, inverse));
  const like = parametersText(new Map(d.powers)) === parametersText(new Map(m.powers));
  if (difference.length > 1 || mixing.length > 1 || !like || !ratio)
    throw refuse(
      `The masses of ${a} and ${b} cannot be diagonalised without naming an angle; with "mixing": "vertex" this term is a two-point vertex.`,
    );
  return multiply(rational(2), ratio);
}

/** √(1 + t²) for a rational t, or null when it is not rational. */
function hypotenuse(t: Rational): Rational | null {
  const square = add(ONE, multiply(t, t));
  const [num, den] = [square.num, square.den];
  if (num > 10n ** 15n || den > 10n ** 15n) return null;
  const [above, below] = [splitRoot(num), splitRoot(den)];
  return above.root === 1n && below.root === 1n ? rational(above.outside, below.outside) : null;
}

/** The rotation of one pair: cos 2θ = 1/√(1 + t²), sin 2θ = t/√(1 + t²). */
function rotationOf(model: Model, fields: Pair, kinds: readonly VertexKind[], refuse: Refuse): Rotation {
  refuseUnlike(model, fields, kinds, refuse);
  const arithmetic = new Arithmetic(new Source('', null, false));
  const [first, second] = fields.map((name) => model.propagators.find(({ field }) => field === name)!.massSquared);
  const minus = second!.map((term) => ({ ...term, number: negateNumber(term.number) }));
  const span = { start: 0, end: 0 };
  const difference = arithmetic.merge(polynomial([...first!, ...minus]), span);
  const isEuclidean = model.conventions.signature === 'euclidean';
  const mixing = polynomial(kinds.flatMap(({ terms }) => terms)).map((m) => ({
    ...m,
    number: isEuclidean ? m.number : negateNumber(m.number),
  }));
  const t = tangent(difference, mixing, fields, refuse);
  if (t === null) return { fields, cosine: '1/sqrt(2)', sine: '1/sqrt(2)' };
  const r = hypotenuse(t);
  if (r === null)
    throw refuse(
      `Diagonalising the masses of ${fields.join(' and ')} takes roots of roots; with "mixing": "vertex" this term is a two-point vertex.`,
    );
  const root = (value: Rational): string => `sqrt(${format(divide(value, rational(2)))})`;
  const cosine = root(add(ONE, divide(ONE, r)));
  const sine = root(subtract(ONE, divide(ONE, r)));
  return { fields, cosine, sine: sign(t) < 0 ? `-${sine}` : sine };
}

/**
 * The rotations that remove all mass mixing of pairs of real fields: masses whose angle is 45° or has a tangent with exact square roots.
 * The rotated fields keep the names of the old ones. @throws InputError unsupported where that is not possible.
 */
export function diagonalisingRotations(model: Model, source: Source): Rotation[] {
  const refusal =
    ({ terms }: VertexKind): Refuse =>
    (message) =>
      source.fault('unsupported', message, terms[0]?.span ?? { start: 0, end: 0 });
  const pairs = new Map<string, { fields: Pair; kinds: VertexKind[] }>();
  for (const kind of mixings(model)) {
    const fields = [kind.fields[0]!.field, kind.fields[1]!.field] as const;
    const known = pairs.get(fields.join(' '));
    if (known) known.kinds.push(kind);
    else pairs.set(fields.join(' '), { fields, kinds: [kind] });
  }
  const used = new Set<string>();
  return [...pairs.values()].map(({ fields, kinds }) => {
    const refuse = refusal(kinds[0]!);
    const twice = fields.find((name) => used.has(name));
    if (twice) throw refuse(`${twice} mixes with more than one field; only pairs of fields are diagonalised.`);
    for (const name of fields) used.add(name);
    return rotationOf(model, fields, kinds, refuse);
  });
}

/** The Lagrangian after one rotation, as text. */
export const rotated = (model: Model, { fields, cosine, sine }: Rotation): string =>
  rotateFields(model, fields, [cosine, sine]);

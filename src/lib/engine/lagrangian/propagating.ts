import { fromInteger, multiplyNumbers, numberSign } from '../exact/number.ts';
import type { CoefficientTerm, Conventions, Field, Propagator, Signature, Term } from './model.ts';
import type { Source } from './source.ts';

/** Sign of the kinetic and of the mass term of a healthy field, as they stand in the Lagrangian. */
const SIGNS: Readonly<Record<Signature, { kinetic: 1 | -1; mass: 1 | -1 }>> = {
  '+---': { kinetic: 1, mass: -1 },
  '-+++': { kinetic: -1, mass: -1 },
  euclidean: { kinetic: 1, mass: 1 },
};

export const SIGNATURE_TEXT: Readonly<Record<Signature, string>> = {
  '+---': '(+,−,−,−)',
  '-+++': '(−,+,+,+)',
  euclidean: 'Euclidean',
};

/** How a quadratic term enters: through the propagator of one field, or by joining two different half-lines. */
export function diagonalField(term: Term, fields: ReadonlyMap<string, Field>): Field | null {
  const [a, b] = term.factors;
  if (term.factors.length !== 2 || a!.field !== b!.field) return null;
  const field = fields.get(a!.field)!;
  return field.kind === 'real' || a!.conjugate !== b!.conjugate ? field : null;
}

function coefficients(terms: readonly Term[], factor: number): CoefficientTerm[] {
  return terms.map(({ number, parameters }) => ({
    number: multiplyNumbers(number, fromInteger(factor)),
    parameters,
  }));
}

/** The sign of a coefficient: of its parameter-free part where it has one, else the common sign of all parts; null when undecided. */
export function coefficientSign(parts: readonly CoefficientTerm[]): -1 | 0 | 1 | null {
  const bare = parts.filter(({ parameters }) => parameters.size === 0);
  const signs = (bare.length > 0 ? bare : parts).map(({ number }) => numberSign(number));
  const [first] = signs;
  return first !== undefined && signs.every((sign) => sign === first) ? first : null;
}

/** The convention in which these signs would be those of a healthy field, in words; null when there is none. */
function fittingConvention(kinetic: 1 | -1, mass: -1 | 0 | 1 | null): string | null {
  const fits = (Object.keys(SIGNS) as Signature[]).filter(
    (name) => SIGNS[name].kinetic === kinetic && (mass === null || mass === 0 || SIGNS[name].mass === mass),
  );
  return fits.length > 0 ? fits.map((name) => SIGNATURE_TEXT[name]).join(' or ') : null;
}

function refuseWrongSign(
  source: Source,
  field: Field,
  terms: readonly Term[],
  mass: readonly Term[],
  conventions: Conventions,
): never {
  const [first] = terms;
  const typedMass = mass.length > 0 ? coefficientSign(mass) : null;
  const expected = SIGNS[conventions.signature];
  const fits = fittingConvention(expected.kinetic === 1 ? -1 : 1, typedMass);
  const half = field.kind === 'real' ? '½(∂φ)²' : '∂φ*∂φ';
  const form = `${expected.kinetic === 1 ? '' : '−'}${half}`;
  throw source.fault(
    'wrong-sign',
    `The kinetic term of ${field.name} has the wrong sign for the ${SIGNATURE_TEXT[conventions.signature]} convention, which expects ${form}${fits ? `; it fits the ${fits} convention` : ''}.`,
    first!.span ?? { start: 0, end: 0 },
  );
}

/**
 * The propagator of one field from its diagonal quadratic terms.
 *
 * The signs of the convention are removed: Z and M² are those of Z·½(∂φ)² − ½M²φ² (complex: Z ∂φ*∂φ − M² φ*φ).
 * @throws InputError wrong-sign; unsupported for more than two derivatives.
 */
export function propagatorOf(
  source: Source,
  field: Field,
  terms: readonly Term[],
  conventions: Conventions,
): Propagator {
  const high = terms.find(({ derivatives }) => derivatives.length > 1);
  if (high)
    throw source.fault(
      'unsupported',
      `A quadratic term of ${field.name} has more than two derivatives; mark its parameter as a vertex to treat it as an insertion.`,
      high.span ?? { start: 0, end: 0 },
    );
  const kinetic = terms.filter(({ derivatives }) => derivatives.length === 1);
  const mass = terms.filter(({ derivatives }) => derivatives.length === 0);
  const signs = SIGNS[conventions.signature];
  const double = field.kind === 'real' ? 2 : 1;
  const z = coefficients(kinetic, double * signs.kinetic);
  if (coefficientSign(z) === -1) refuseWrongSign(source, field, kinetic, mass, conventions);
  return { field: field.name, kinetic: z, massSquared: coefficients(mass, double * signs.mass), terms };
}

import { type ExactNumber, equalNumbers, fromInteger, multiplyNumbers, NUMBER_ONE } from '../exact/number.ts';
import type { Check } from './check.ts';
import { parametersText } from './kinds.ts';
import type { CoefficientTerm, Model, VertexKind } from './model.ts';
import { coefficientText, exchanges, termText } from './print.ts';

const MOST = 6;

const isOne = (number: ExactNumber): boolean =>
  equalNumbers(number, NUMBER_ONE) || equalNumbers(number, fromInteger(-1));

/** A vertex of one field without derivatives whose coefficient is not coupling over the number of exchanges. */
function unusual({ fields, terms, parameters }: VertexKind): { term: string; factor: string } | null {
  const [only] = terms;
  const oneField = fields.every(({ field }) => field === fields[0]!.field);
  if (terms.length !== 1 || !oneField || fields.length < 3 || only!.derivatives.length > 0) return null;
  const number = multiplyNumbers(only!.number, fromInteger(exchanges(fields)));
  if (parameters.size === 0 || isOne(number)) return null;
  return { term: termText(only!), factor: coefficientText([{ number, parameters }]) };
}

/** Kinetic terms that are not ½(∂φ)² (complex: ∂φ*∂φ), and couplings that are not divided by the exchanges of their fields. */
export function normalisationChecks(model: Model): Check[] {
  const isUnit = (kinetic: readonly CoefficientTerm[]): boolean =>
    kinetic.length === 1 &&
    parametersText(kinetic[0]!.parameters) === '1' &&
    equalNumbers(kinetic[0]!.number, NUMBER_ONE);
  const kinetic = model.propagators
    .filter((p) => !isUnit(p.kinetic))
    .map(
      ({ field, kinetic: z }): Check => ({
        code: 'kinetic-normalisation',
        title: 'Normalisation',
        verdict: 'note',
        text: `The kinetic term of ${field} is ${coefficientText(z)} times the usual one; its propagator carries the inverse.`,
      }),
    );
  const vertices = model.kinds.flatMap((kind): Check[] => {
    const found = unusual(kind);
    if (!found) return [];
    return [
      {
        code: 'normalisation',
        title: 'Normalisation',
        verdict: 'note',
        text: `${found.term} does not divide by the exchanges of its equal fields: they multiply to ${found.factor} in the vertex factor.`,
      },
    ];
  });
  return [...kinetic.slice(0, MOST), ...vertices.slice(0, MOST)];
}

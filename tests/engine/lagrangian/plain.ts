import { numberText } from '#engine/exact/numberText.ts';
import { format } from '#engine/exact/rational.ts';
import type { ModelSource } from '#engine/lagrangian/input.ts';
import type { CoefficientTerm, FieldFactor, Model, Term } from '#engine/lagrangian/model.ts';
import { readModel } from '#engine/lagrangian/read.ts';

const fieldText = ({ field, conjugate }: FieldFactor): string => (conjugate ? `${field}^*` : field);

const powersText = ({ parameters }: CoefficientTerm): string =>
  [...parameters].map(([name, power]) => `${name}:${format(power)}`).join(' ');

const plainTerm = (term: Term): string =>
  `${numberText(term.number)} | ${powersText(term)} | ${term.factors.map(fieldText).join(' ')} | ${JSON.stringify(term.derivatives)}`;

const plainCoefficient = (term: CoefficientTerm): string => `${numberText(term.number)} | ${powersText(term)}`;

/** Everything a model says but where its terms stand in the text and what was noted on reading: equal for equal models. */
export function plainModel(model: Model) {
  return {
    conventions: model.conventions,
    fields: model.fields,
    parameters: model.parameters.map((p) => ({ ...p, weight: p.weight && format(p.weight) })),
    propagators: model.propagators.map((p) => ({
      field: p.field,
      kinetic: p.kinetic.map(plainCoefficient),
      massSquared: p.massSquared.map(plainCoefficient),
      terms: p.terms.map(plainTerm),
    })),
    kinds: model.kinds.map((k) => ({
      coupling: k.coupling,
      couplingLatex: k.couplingLatex,
      fields: k.fields.map(fieldText).join(' '),
      loops: k.loops,
      terms: k.terms.map(plainTerm),
    })),
  };
}

/** "lambda: phi phi phi phi: -1/24" for each kind; derivative pairs follow in square brackets, counted from 1. */
export const kindLines = (model: Model): string[] =>
  model.kinds.map(({ coupling, fields, terms }) => {
    const numbers = terms.map(({ number, derivatives }) => {
      const pairs = derivatives.map(([i, j]) => `[${i + 1},${j + 1}]`).join('');
      return `${numberText(number)}${pairs}`;
    });
    return `${coupling}: ${fields.map(fieldText).join(' ')}: ${numbers.join(', ')}`;
  });

const sumText = (terms: readonly CoefficientTerm[]): string =>
  terms.map((term) => `${numberText(term.number)}${term.parameters.size ? ` ${powersText(term)}` : ''}`).join(' + ') ||
  '0';

/** "phi: Z = 1, M^2 = 1 m:2" for each field. */
export const propagatorLines = (model: Model): string[] =>
  model.propagators.map(
    ({ field, kinetic, massSquared }) => `${field}: Z = ${sumText(kinetic)}, M^2 = ${sumText(massSquared)}`,
  );

export const modelOf = (lagrangian: string, rest: Omit<ModelSource, 'lagrangian'> = {}): Model =>
  readModel({ lagrangian, ...rest });

/** What reading throws; a text that is read is a failure of the test. */
export function refusal(read: () => unknown): Error & { code?: string; place?: unknown; suggestion?: unknown } {
  try {
    read();
  } catch (error) {
    if (error instanceof Error) return error;
  }
  throw new Error('nothing was refused');
}

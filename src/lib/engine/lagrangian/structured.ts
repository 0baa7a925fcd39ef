import { InputError } from '../errors.ts';
import { Arithmetic } from './arithmetic.ts';
import type { Node } from './ast.ts';
import { ModelBuilder } from './build.ts';
import { Evaluator } from './evaluate.ts';
import type { Settings, StructuredTerm } from './input.ts';
import type { FieldFactor, Model } from './model.ts';
import { type Monomial, type Polynomial, unit } from './monomial.ts';
import { readName, usageOf } from './names.ts';
import { normalForm, type Placed, refuseTooManyTerms } from './normal.ts';
import { parse } from './parser.ts';
import { Source } from './source.ts';

interface ReadTerm {
  readonly called: string;
  readonly factors: readonly FieldFactor[];
  readonly pairs: readonly (readonly [number, number])[];
  readonly coefficient: Node;
  readonly source: Source;
  readonly used: ReadonlySet<string>;
  readonly conjugated: ReadonlySet<string>;
}

function factorOf(text: string, called: string): FieldFactor {
  const name = readName(text);
  if (!name) throw new InputError('unknown-name', `In ${called}: "${text.slice(0, 40)}" is not the name of a field.`);
  return name;
}

function pairsOf(term: StructuredTerm, called: string): [number, number][] {
  return (term.derivatives ?? []).map(([i, j]) => {
    const size = term.fields.length;
    if (!Number.isInteger(i) || !Number.isInteger(j) || i < 1 || j < 1 || i > size || j > size)
      throw new InputError(
        'bad-request',
        `In ${called}: the derivative pair [${i}, ${j}] must name positions from 1 to ${size} in "fields".`,
      );
    return [i - 1, j - 1];
  });
}

function readTerm(term: StructuredTerm, index: number): ReadTerm {
  const called = `term ${index + 1} of the model`;
  const factors = term.fields.map((field) => factorOf(field, called));
  const parsed = parse(term.coefficient, `the coefficient of term ${index + 1}`);
  if (parsed.error) throw parsed.error;
  const { items, source } = parsed;
  if (items.some(({ node }) => node === 'hc'))
    throw new InputError('syntax', `In ${called}: "h.c." cannot stand in a coefficient.`);
  const { start } = items[0]!;
  const { end } = items.at(-1)!;
  const coefficient: Node = { is: 'sum', items, start, end };
  const usage = usageOf(source, [coefficient]);
  if (usage.derived.size > 0)
    throw new InputError('bad-request', `In ${called}: derivatives belong in "derivatives", not in the coefficient.`);
  const used = new Set(usage.first.keys());
  return { called, factors, pairs: pairsOf(term, called), coefficient, source, used, conjugated: usage.conjugated };
}

function refuseFieldsInCoefficient(terms: readonly ReadTerm[], fields: ReadonlySet<string>): void {
  for (const { called, used } of terms)
    for (const name of used)
      if (fields.has(name))
        throw new InputError(
          'bad-request',
          `In ${called}: the field ${name} stands in the coefficient; list it in "fields".`,
        );
}

/**
 * Reads a model that is given as a list of terms. Here every name in `fields` is a field and every other name a parameter.
 * @throws InputError, LimitError as `readModel` does; places are those within a coefficient.
 */
export function readStructured(given: readonly StructuredTerm[], settings: Settings): Model {
  if (given.length === 0) throw new InputError('syntax', 'The model has no terms.');
  const terms = given.map(readTerm);
  const fields = new Set(terms.flatMap(({ factors }) => factors.map(({ field }) => field)));
  for (const name of settings.fields.keys())
    if (!fields.has(name))
      throw new InputError('unknown-name', `The field table names "${name}", which stands in no term.`);
  refuseFieldsInCoefficient(terms, fields);
  const complex = new Set([
    ...terms.flatMap(({ factors, conjugated }) => [
      ...factors.flatMap((factor) => (factor.conjugate ? [factor.field] : [])),
      ...conjugated,
    ]),
    ...[...settings.fields].flatMap(([name, kind]) => (kind === 'complex' ? [name] : [])),
    ...[...settings.parameters].flatMap(([name, { complex }]) => (complex ? [name] : [])),
  ]);
  for (const [name, kind] of settings.fields) if (kind === 'real') complex.delete(name);
  const whole = new Source('', null, false);
  const placed = terms.flatMap((term) => monomials(term, fields, complex));
  refuseTooManyTerms(whole, placed.length, { start: 0, end: 0 });
  const form = normalForm(whole, placed);
  return new ModelBuilder(whole, { fields, complex, first: usedNames(terms) }, settings, form).build([]);
}

const usedNames = (terms: readonly ReadTerm[]) =>
  new Map(terms.flatMap(({ used }) => [...used].map((name) => [name, { start: 0, end: 0 }] as const)));

function monomials(term: ReadTerm, fields: ReadonlySet<string>, complex: ReadonlySet<string>): Placed[] {
  const evaluator = new Evaluator(term.source, { fields, complex });
  const coefficient: Polynomial = evaluator.value(term.coefficient);
  const span = { start: term.coefficient.start, end: term.coefficient.end };
  const factors = term.factors.map((f) => ({ ...f, conjugate: f.conjugate && complex.has(f.field) }));
  const body: Monomial = { ...unit, factors, pairs: term.pairs };
  const value = new Arithmetic(term.source).multiply(coefficient, [body], span);
  return value.map((monomial) => ({ monomial, span: null }));
}

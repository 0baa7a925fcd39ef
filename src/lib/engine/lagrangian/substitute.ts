import { InputError } from '../errors.ts';
import { Arithmetic } from './arithmetic.ts';
import { Evaluator } from './evaluate.ts';
import type { Field, Model, Term } from './model.ts';
import { conjugateMonomial, constant, fieldMonomial, type Monomial, type Polynomial } from './monomial.ts';
import { readName } from './names.ts';
import { normalForm } from './normal.ts';
import { parse } from './parser.ts';
import { termsText } from './print.ts';
import { Source } from './source.ts';
import { termsOf } from './terms.ts';

/** What one field is replaced by. */
interface Replacement {
  readonly field: string;
  readonly value: Polynomial;
  readonly conjugate: Polynomial;
}

const NOWHERE = { start: 0, end: 0 };

/** The value of an expression in fields and parameters. @throws InputError, LimitError of the language. */
function evaluated(text: string, fields: ReadonlySet<string>, complex: ReadonlySet<string>): Polynomial {
  const { source, items, error } = parse(text, 'what replaces the field');
  if (error) throw error;
  const evaluator = new Evaluator(source, { fields, complex });
  return items.flatMap((item) => {
    if (item.node === 'hc') throw source.fault('syntax', '"h.c." cannot stand here.', item);
    return evaluator.summand({ ...item, node: item.node });
  });
}

/** One term with a field replaced: the product of its factors, each under its derivatives. */
function replaced(term: Term, replacements: readonly Replacement[], arithmetic: Arithmetic): Polynomial {
  let result: Polynomial = [{ ...constant(term.number), powers: [...term.parameters] }];
  term.factors.forEach((factor, at) => {
    const found = replacements.find(({ field }) => field === factor.field);
    let value: Polynomial = found ? (factor.conjugate ? found.conjugate : found.value) : [fieldMonomial(factor)];
    term.derivatives.forEach(([i, j], pair) => {
      for (const end of [i, j]) if (end === at) value = arithmetic.derive(value, `pair ${pair}`, NOWHERE);
    });
    result = arithmetic.multiply(result, value, NOWHERE);
  });
  return result;
}

const complexNames = (model: Model): Set<string> =>
  new Set(
    [...model.fields.filter(({ kind }) => kind === 'complex'), ...model.parameters.filter((p) => p.complex)].map(
      ({ name }) => name,
    ),
  );

function fieldOf(model: Model, name: string): Field {
  const field = model.fields.find((known) => known.name === readName(name)?.field);
  if (!field) throw new InputError('unknown-name', `"${name.slice(0, 40)}" is no field of this model.`);
  return field;
}

/** A name for a new field. @throws InputError for what is no name or stands in the model already. */
function newName(model: Model, text: string, old: readonly string[]): string {
  const name = readName(text);
  if (!name || name.conjugate)
    throw new InputError('unknown-name', `"${text.slice(0, 40)}" is not a name for a field.`);
  const taken = [...model.fields, ...model.parameters].some((known) => known.name === name.field);
  if (taken && !old.includes(name.field))
    throw new InputError('bad-request', `"${name.field}" stands in this model already; choose another name.`);
  return name.field;
}

/**
 * The Lagrangian after fields are replaced by expressions in new ones, multiplied out and in normal form, as text.
 * `into` lists the new fields with their kind; every other new name is a real parameter. Exact; bounded as reading is.
 * @throws InputError for unknown or taken names and for expressions that are none; LimitError over a bound.
 */
function substituted(
  model: Model,
  by: readonly (readonly [field: string, expression: string])[],
  into: readonly Field[],
): string {
  const old = by.map(([field]) => fieldOf(model, field).name);
  const kept = model.fields.filter(({ name }) => !old.includes(name));
  const complex = complexNames(model);
  for (const name of old) complex.delete(name);
  for (const { name, kind } of into) if (kind === 'complex') complex.add(name);
  const fields = new Set([...kept, ...into].map(({ name }) => name));
  const replacements = by.map(([, expression], at): Replacement => {
    const value = evaluated(expression, fields, complex);
    return { field: old[at]!, value, conjugate: value.map((m: Monomial) => conjugateMonomial(m, complex)) };
  });
  const source = new Source('', 'the new Lagrangian', false);
  const arithmetic = new Arithmetic(source);
  const placed = termsOf(model).flatMap((term) =>
    replaced(term, replacements, arithmetic).map((monomial) => ({ monomial, span: null })),
  );
  return termsText(normalForm(source, placed).terms);
}

const fresh = (name: string, kind: Field['kind']): Field => ({ name, latex: '', kind });

/**
 * φ → expectation value + new field: `shiftField(model, 'phi', 'v', 'h')`. The value is any expression in parameters, "sqrt(12/lambda) mu" too.
 * A complex field stays complex. Answers the new Lagrangian as text.
 */
export function shiftField(model: Model, field: string, value: string, name: string): string {
  const { kind, name: old } = fieldOf(model, field);
  const called = newName(model, name, [old]);
  return substituted(model, [[old, `(${value}) + ${called}`]], [fresh(called, kind)]);
}

/** A complex field in real components about a real value: φ → (v + h + i G)/√2; `value` is "0" without one. */
export function splitComplexField(
  model: Model,
  field: string,
  value: string,
  names: readonly [string, string],
): string {
  const { kind, name: old } = fieldOf(model, field);
  if (kind !== 'complex')
    throw new InputError('bad-request', `${old} is real; only a complex field has two components.`);
  const [re, im] = names.map((name) => newName(model, name, [old])) as [string, string];
  if (re === im) throw new InputError('bad-request', 'The two components need different names.');
  return substituted(model, [[old, `((${value}) + ${re} + i ${im})/sqrt(2)`]], [fresh(re, 'real'), fresh(im, 'real')]);
}

/**
 * Rotates two real fields: a → c·a′ − s·b′, b → s·a′ + c·b′. `cosine` and `sine` are numbers with c² + s² = 1,
 * such as "3/5" and "4/5" or "1/sqrt(2)" twice. @throws InputError when they are not, or a field is complex.
 */
export function rotateFields(
  model: Model,
  fields: readonly [string, string],
  [cosine, sine]: readonly [string, string],
  names: readonly [string, string] = fields,
): string {
  const [a, b] = fields.map((name) => fieldOf(model, name)) as [Field, Field];
  if (a.kind !== 'real' || b.kind !== 'real' || a.name === b.name)
    throw new InputError('bad-request', 'Two different real fields are needed for a rotation.');
  const unit = evaluated(`(${cosine})^2 + (${sine})^2 - 1`, new Set(), new Set());
  const rest = new Arithmetic(new Source('', null, false)).merge(unit, NOWHERE);
  if (rest.length > 0) throw new InputError('bad-request', 'Cosine and sine must be numbers with c^2 + s^2 = 1.');
  const [x, y] = names.map((name) => newName(model, name, [a.name, b.name])) as [string, string];
  const expressions = [`(${cosine}) ${x} - (${sine}) ${y}`, `(${sine}) ${x} + (${cosine}) ${y}`] as const;
  return substituted(
    model,
    [
      [a.name, expressions[0]],
      [b.name, expressions[1]],
    ],
    [fresh(x, 'real'), fresh(y, 'real')],
  );
}

/** Gives a field another name. */
export function renameField(model: Model, field: string, name: string): string {
  const { kind, name: old } = fieldOf(model, field);
  const called = newName(model, name, [old]);
  return substituted(model, [[old, called]], [fresh(called, kind)]);
}

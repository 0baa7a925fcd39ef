import { InputError, LimitError } from '../errors.ts';
import type { Node, Summand } from './ast.ts';
import { ModelBuilder } from './build.ts';
import { diagonalisingRotations, rotated } from './diagonalise.ts';
import { Evaluator } from './evaluate.ts';
import { type ModelSource, readSettings, type Settings } from './input.ts';
import type { Model, Note } from './model.ts';
import { type Usage, usageOf } from './names.ts';
import { normalForm, type Placed, refuseTooManyTerms } from './normal.ts';
import { type Parsed, parse } from './parser.ts';
import { readingNotes, refuseOutOfScope, suggestField } from './reading.ts';
import { Source } from './source.ts';
import { readStructured } from './structured.ts';
import { summandsLatex } from './typeset.ts';

/** Which names are complex: conjugated ones and declared ones, less those declared real. */
function complexNames(usage: Usage, settings: Settings): Set<string> {
  const complex = new Set(usage.conjugated);
  for (const [name, kind] of settings.fields) {
    if (kind === 'complex') complex.add(name);
    if (kind === 'real') complex.delete(name);
  }
  for (const [name, setting] of settings.parameters) {
    if (setting.complex === true) complex.add(name);
    if (setting.complex === false) complex.delete(name);
  }
  return complex;
}

function fieldNames(usage: Usage, settings: Settings): Set<string> {
  const fields = new Set([...usage.derived].filter((name) => !settings.parameters.has(name)));
  for (const name of settings.fields.keys()) {
    if (!usage.first.has(name))
      throw new InputError('unknown-name', `The field table names "${name}", which does not stand in the Lagrangian.`);
    fields.add(name);
  }
  return fields;
}

/** The monomials of every summand, each with the place of its summand. */
function evaluateItems(evaluator: Evaluator, items: readonly Summand[]): Placed[] {
  const placed: Placed[] = [];
  for (const item of items) {
    const { start, end } = item;
    const value =
      item.node === 'hc'
        ? evaluator.hermitianConjugate(
            placed.map(({ monomial }) => monomial),
            item,
          )
        : evaluator.summand({ ...item, node: item.node });
    refuseTooManyTerms(evaluator.arithmetic.source, placed.length + value.length, item);
    for (const monomial of value) placed.push({ monomial, span: { start, end } });
  }
  return placed;
}

function fromText(parsed: Parsed, settings: Settings): Model {
  const { source, items } = parsed;
  if (parsed.error) throw parsed.error;
  const nodes = items.flatMap(({ node }) => (node === 'hc' ? [] : [node as Node]));
  const usage = usageOf(source, nodes);
  refuseOutOfScope(source, usage, settings);
  const fields = fieldNames(usage, settings);
  if (fields.size === 0) throw suggestField(source, usage, nodes);
  const complex = complexNames(usage, settings);
  const evaluator = new Evaluator(source, { fields, complex });
  const form = normalForm(source, evaluateItems(evaluator, items));
  const notes: Note[] = readingNotes(source, nodes, usage, fields, complex);
  const builder = new ModelBuilder(source, { fields, complex, first: usage.first }, settings, form);
  return builder.build(notes);
}

/** The model in fields without mass mixing; notes say which rotations were done. Its terms have no places in the text. */
function withoutMixing(typed: Model, input: ModelSource): Model {
  const notes: Note[] = typed.notes.filter(({ code }) => code !== 'mixing');
  const source = new Source(input.lagrangian ?? '', null, input.lagrangian !== undefined);
  let model = typed;
  for (const rotation of diagonalisingRotations(typed, source)) {
    const [a, b] = rotation.fields;
    const { model: _, mixing: __, ...tables } = input;
    const read = readModel({ ...tables, lagrangian: rotated(model, rotation) });
    const message = `${a} and ${b} were rotated so that their masses do not mix: ${a} → c ${a} − s ${b}, ${b} → s ${a} + c ${b} with c = ${rotation.cosine}, s = ${rotation.sine}.`;
    notes.push({ code: 'rotated', message, span: null });
    const kinds = read.kinds.map((kind) => ({ ...kind, terms: kind.terms.map((term) => ({ ...term, span: null })) }));
    model = { ...read, kinds };
  }
  return { ...model, notes };
}

/**
 * Reads a model: a Lagrangian text (plain, Unicode, LaTeX in any mixture) or a list of terms, into its normal form.
 *
 * Fields are the names that carry a kinetic term; a field or parameter is complex when its conjugate occurs; both can be overruled
 * in the tables. Work is bounded by BOUNDS, each counted before anything is multiplied out.
 * @throws InputError with the place and a sentence that says what was expected; LimitError over a bound.
 * @example readModel({ lagrangian: '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4' }).kinds[0].coupling // "lambda"
 */
export function readModel(input: ModelSource): Model {
  const settings = readSettings(input);
  const model = readAsTyped(input, settings);
  return settings.diagonalise ? withoutMixing(model, input) : model;
}

function readAsTyped(input: ModelSource, settings: Settings): Model {
  if (input.lagrangian !== undefined && input.model === undefined) return fromText(parse(input.lagrangian), settings);
  if (input.model !== undefined && input.lagrangian === undefined) return readStructured(input.model.terms, settings);
  throw new InputError('bad-request', 'Give either "lagrangian" or "model", exactly one of them.');
}

export interface Reading {
  readonly model: Model | null;
  /** The text as far as it could be read, typeset. */
  readonly good: string;
  readonly error: InputError | LimitError | null;
}

/** Reads a model for display while it is being typed: never throws for any text, and typesets the good part of a broken one. */
export function previewModel(input: ModelSource): Reading {
  let good = '';
  try {
    if (input.lagrangian !== undefined) {
      const parsed = parse(input.lagrangian);
      good = summandsLatex(parsed.items);
      if (parsed.error) return { model: null, good, error: parsed.error };
    }
    return { model: readModel(input), good, error: null };
  } catch (error) {
    if (error instanceof InputError || error instanceof LimitError) return { model: null, good, error };
    throw error;
  }
}

import { add, format, isZero, multiply, type Rational, rational, ZERO } from '../exact/rational.ts';
import type { Theory } from '../graph/theory.ts';
import type { FieldFactor, Model, Parameter, VertexKind } from '../lagrangian/model.ts';

/** A half-line type with the names a model gives it. */
export interface NamedHalf {
  /** "phi" or "phi^*". */
  readonly text: string;
  readonly field: string;
  readonly conjugate: boolean;
  readonly latex: string;
}

/** A vertex kind with the names a model gives it. */
export interface NamedKind {
  /** The coupling monomial, with the fields added where two kinds share it: "lambda", "lambda h^2 s^2". */
  readonly name: string;
  readonly coupling: string;
  readonly couplingLatex: string;
  /** Weight of each coupling at one vertex of this kind; zero weights left out. */
  readonly weights: ReadonlyMap<string, Rational>;
  readonly loops: number;
  /** Position in model.kinds, to find its rule. */
  readonly index: number;
}

/** A model reduced to integers, with the names to come back by. Types and kinds stand in the model's order. */
export interface NamedTheory {
  readonly theory: Theory;
  readonly halves: readonly NamedHalf[];
  readonly kinds: readonly NamedKind[];
  /** Every parameter that stands in a vertex with a weight other than zero, in the model's order. */
  readonly couplings: readonly string[];
}

/** "h^2 s^2", "phi^2 phi^*^2" → "phi^2 (phi^*)^2": fields of a vertex with their powers. */
export function fieldsText(fields: readonly FieldFactor[]): string {
  const powers = new Map<string, number>();
  for (const { field, conjugate } of fields) {
    const text = conjugate ? `${field}^*` : field;
    powers.set(text, (powers.get(text) ?? 0) + 1);
  }
  return [...powers]
    .map(([text, n]) => (n === 1 ? text : text.endsWith('*') ? `(${text})^${n}` : `${text}^${n}`))
    .join(' ');
}

const weightOf = (parameter: Parameter | undefined, power: Rational): Rational =>
  parameter?.weight ? multiply(parameter.weight, power) : power;

/** Weight of every coupling at one vertex of a kind: power × the weight set for the parameter (default 1). A conjugate counts as its parameter. */
function kindWeights(kind: VertexKind, parameters: ReadonlyMap<string, Parameter>): Map<string, Rational> {
  const weights = new Map<string, Rational>();
  for (const [symbol, power] of kind.parameters) {
    const name = symbol.endsWith('^*') ? symbol.slice(0, -2) : symbol;
    weights.set(name, add(weights.get(name) ?? ZERO, weightOf(parameters.get(name), power)));
  }
  for (const [name, weight] of weights) if (isZero(weight)) weights.delete(name);
  return weights;
}

/** Half-line types and kinds of a model: a real field is one type, a complex one two (φ, then φ*). */
export function theoryOf(model: Model): NamedTheory {
  const halves: NamedHalf[] = [];
  const partner: number[] = [];
  const typeOf = new Map<string, number>();
  for (const field of model.fields) {
    const at = halves.length;
    typeOf.set(field.name, at);
    halves.push({ text: field.name, field: field.name, conjugate: false, latex: field.latex });
    if (field.kind === 'real') partner.push(at);
    else {
      partner.push(at + 1, at);
      const latex = /[_^]/.test(field.latex) ? `(${field.latex})^{*}` : `${field.latex}^{*}`;
      halves.push({ text: `${field.name}^*`, field: field.name, conjugate: true, latex });
    }
  }
  const parameters = new Map(model.parameters.map((parameter) => [parameter.name, parameter]));
  const shared = new Map<string, number>();
  for (const kind of model.kinds) shared.set(kind.coupling, (shared.get(kind.coupling) ?? 0) + 1);
  const kinds = model.kinds.map((kind, index) => ({
    name: shared.get(kind.coupling)! > 1 ? `${kind.coupling} ${fieldsText(kind.fields)}` : kind.coupling,
    coupling: kind.coupling,
    couplingLatex: kind.couplingLatex,
    weights: kindWeights(kind, parameters),
    loops: kind.loops,
    index,
  }));
  const counts = model.kinds.map((kind) => {
    const row = halves.map(() => 0);
    for (const { field, conjugate } of kind.fields) row[typeOf.get(field)! + (conjugate ? 1 : 0)]!++;
    return row;
  });
  const weighted = new Set(kinds.flatMap((kind) => [...kind.weights.keys()]));
  const couplings = model.parameters.map(({ name }) => name).filter((name) => weighted.has(name));
  return { theory: { partner, kinds: counts }, halves, kinds, couplings };
}

/** Σ over vertices of the couplings' weights, as the contract writes an order: { lambda: "2" }, zeros left out. */
export function orderOf(named: NamedTheory, content: readonly number[]): Record<string, string> {
  const total = new Map<string, Rational>();
  content.forEach((count, kind) => {
    if (count === 0) return;
    for (const [name, weight] of named.kinds[kind]!.weights)
      total.set(name, add(total.get(name) ?? ZERO, multiply(weight, rational(count))));
  });
  const sorted = named.couplings.filter((name) => total.has(name) && !isZero(total.get(name)!));
  return Object.fromEntries(sorted.map((name) => [name, format(total.get(name)!)]));
}

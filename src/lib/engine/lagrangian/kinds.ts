import { add, format, isInteger, type Rational, rational, ZERO } from '../exact/rational.ts';
import type { FieldFactor, Monomial, Term, VertexKind } from './model.ts';
import { fieldsKey } from './normal.ts';
import { nameLatex } from './symbols.ts';

const isConjugate = (name: string): boolean => name.endsWith('^*');
export const parameterBase = (name: string): string => (isConjugate(name) ? name.slice(0, -2) : name);

function powerText(name: string, power: Rational): string {
  const base = isConjugate(name) ? `conj(${parameterBase(name)})` : name;
  if (power.num === power.den) return base;
  return isInteger(power) ? `${base}^${format(power)}` : `${base}^(${format(power)})`;
}

function powerLatex(name: string, power: Rational): string {
  const base = nameLatex(parameterBase(name));
  const conjugated = isConjugate(name);
  if (power.num === power.den) return conjugated ? `${base}^{*}` : base;
  const exponent = format(power);
  return conjugated ? `${`(${base}^{*})`}^{${exponent}}` : `${base}^{${exponent}}`;
}

/** "g^2*v", "f^-2", "lambda^(1/2)"; "1" when there is no parameter. */
export const parametersText = (parameters: Monomial): string =>
  parameters.size === 0 ? '1' : [...parameters].map(([name, power]) => powerText(name, power)).join('*');

/** The same typeset; adjacent names are told apart by a thin space. */
export const parametersLatex = (parameters: Monomial): string =>
  parameters.size === 0 ? '1' : [...parameters].map(([name, power]) => powerLatex(name, power)).join('\\,');

/** Loop order of a coupling monomial: Σ power × loops of each parameter. */
function loopsOf(parameters: Monomial, loops: ReadonlyMap<string, number>): number {
  let sum = ZERO;
  for (const [name, power] of parameters) {
    const each = rational(loops.get(parameterBase(name)) ?? 0);
    sum = add(sum, rational(power.num * each.num, power.den));
  }
  return Number(sum.num) / Number(sum.den);
}

/** Fewer fields first, then fields, then coupling: as text that sorts so. */
const sortKey = ({ fields, coupling }: VertexKind): string =>
  `${String(fields.length).padStart(3, '0')} ${fieldsKey(fields)} | ${coupling}`;

/**
 * Groups interaction terms into kinds of vertex: one coupling monomial and one multiset of fields each, whatever the derivatives.
 * Sorted by number of fields, then fields, then coupling, so that the order of the terms in the text does not matter.
 */
export function kindsOf(terms: readonly Term[], loops: ReadonlyMap<string, number>): VertexKind[] {
  const groups = new Map<string, { parameters: Monomial; fields: readonly FieldFactor[]; terms: Term[] }>();
  for (const term of terms) {
    const key = `${parametersText(term.parameters)} | ${fieldsKey(term.factors)}`;
    const group = groups.get(key);
    if (group) group.terms.push(term);
    else groups.set(key, { parameters: term.parameters, fields: term.factors, terms: [term] });
  }
  const kinds = [...groups.values()].map((group) => ({
    ...group,
    coupling: parametersText(group.parameters),
    couplingLatex: parametersLatex(group.parameters),
    loops: loopsOf(group.parameters, loops),
  }));
  return kinds
    .map((kind) => ({ kind, key: sortKey(kind) }))
    .sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : 0))
    .map(({ kind }) => kind);
}

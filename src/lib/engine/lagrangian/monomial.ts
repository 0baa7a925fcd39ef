import { conjugateNumber, type ExactNumber, fromRational, NUMBER_ONE } from '../exact/number.ts';
import { add, format, isZero, multiply, ONE, type Rational, rational } from '../exact/rational.ts';
import type { FieldFactor } from './model.ts';

/** A derivative index that waits for its partner, at one factor; null is an index without a name. */
export interface OpenIndex {
  readonly index: string | null;
  readonly at: number;
}

/** Powers of parameters, sorted by name, none zero. A conjugate parameter is "name^*"; OPERATOR stands for a waiting □. */
export type Powers = readonly (readonly [string, Rational])[];

/** A monomial while a text is evaluated: number · parameters · fields with derivatives, contracted or open. */
export interface Monomial {
  readonly number: ExactNumber;
  readonly powers: Powers;
  readonly factors: readonly FieldFactor[];
  readonly pairs: readonly (readonly [number, number])[];
  readonly open: readonly OpenIndex[];
}

/** A value: a sum of monomials, like ones merged. */
export type Polynomial = readonly Monomial[];

/** The pseudo-parameter whose power counts □ operators that wait for what stands on their right. */
export const OPERATOR = '□';

export const constant = (number: ExactNumber): Monomial => ({
  number,
  powers: [],
  factors: [],
  pairs: [],
  open: [],
});
export const unit: Monomial = constant(NUMBER_ONE);
export const parameterMonomial = (name: string, power: Rational = ONE): Monomial => ({
  ...unit,
  powers: [[name, power]],
});
export const fieldMonomial = (factor: FieldFactor): Monomial => ({ ...unit, factors: [factor] });
export const isConstant = (m: Monomial): boolean => m.powers.length === 0 && m.factors.length === 0;

const powersKey = (powers: Powers): string => powers.map(([name, power]) => `${name}:${format(power)}`).join(' ');
const factorsKey = (factors: readonly FieldFactor[]): string =>
  factors.map(({ field, conjugate }) => (conjugate ? `${field}^*` : field)).join(' ');

/** Everything but the number: monomials with equal keys are like terms (up to the order of factors under derivatives). */
export function monomialKey(m: Monomial): string {
  const plain = `${powersKey(m.powers)}|${factorsKey(m.factors)}`;
  if (m.pairs.length + m.open.length === 0) return plain;
  return `${plain}|${m.pairs.join(';')}|${m.open.map(({ index, at }) => `${index ?? ''}@${at}`).join(';')}`;
}

export function compareFactors(a: FieldFactor, b: FieldFactor): number {
  if (a.field !== b.field) return a.field < b.field ? -1 : 1;
  return Number(a.conjugate) - Number(b.conjugate);
}

/** Product of two sorted lists of powers. */
export function multiplyPowers(a: Powers, b: Powers): Powers {
  if (a.length === 0) return b;
  if (b.length === 0) return a;
  const result: (readonly [string, Rational])[] = [];
  let j = 0;
  for (const entry of a) {
    while (j < b.length && b[j]![0] < entry[0]) result.push(b[j++]!);
    if (j < b.length && b[j]![0] === entry[0]) {
      const sum = add(entry[1], b[j++]![1]);
      if (!isZero(sum)) result.push([entry[0], sum]);
    } else result.push(entry);
  }
  result.push(...b.slice(j));
  return result;
}

export const scalePowers = (powers: Powers, by: Rational): Powers =>
  isZero(by) ? [] : powers.map(([name, power]) => [name, multiply(power, by)]);

/** The complex conjugate of a monomial; `complex` says which fields and parameters are. */
export function conjugateMonomial(m: Monomial, complex: ReadonlySet<string>): Monomial {
  const powers = m.powers.map(([name, power]): readonly [string, Rational] => {
    const base = name.endsWith('^*') ? name.slice(0, -2) : name;
    return [complex.has(base) ? (base === name ? `${name}^*` : base) : name, power];
  });
  powers.sort(([a], [b]) => (a < b ? -1 : 1));
  const factors = m.factors.map((f) => (complex.has(f.field) ? { ...f, conjugate: !f.conjugate } : f));
  if (m.pairs.length + m.open.length === 0) factors.sort(compareFactors);
  return { ...m, number: conjugateNumber(m.number), powers, factors };
}

export const minusOne: ExactNumber = fromRational(rational(-1));

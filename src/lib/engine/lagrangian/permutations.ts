import { type ExactNumber, equalNumbers } from '../exact/number.ts';
import { canonical } from './canonical.ts';
import type { Model, Term } from './model.ts';
import { compareFactors, conjugateMonomial, type Monomial, monomialKey } from './monomial.ts';
import { monomialOf, termsOf } from './terms.ts';

/** Terms looked at while exchanges of fields are tried; beyond, the search is given up. */
const BUDGET = 3_000;

const keyed = (m: Monomial): string =>
  monomialKey(canonical(m.pairs.length === 0 ? { ...m, factors: [...m.factors].sort(compareFactors) } : m));

/** Whether a map of monomials carries the sum of all terms into itself. */
function isInvariant(
  terms: readonly Term[],
  numbers: ReadonlyMap<string, ExactNumber>,
  image: (m: Monomial) => Monomial,
): boolean {
  return terms.every((term) => {
    const mapped = image(monomialOf(term));
    const number = numbers.get(keyed(mapped));
    return number !== undefined && equalNumbers(number, mapped.number);
  });
}

const numbersOf = (terms: readonly Term[]): Map<string, ExactNumber> =>
  new Map(terms.map((term) => [keyed(monomialOf(term)), term.number]));

/** What two fields must share to be exchangeable: the multiset of terms they stand in, names of fields left out. */
function profiles(model: Model, terms: readonly Term[]): Map<string, string> {
  const lists = new Map<string, string[]>(model.fields.map(({ name, kind }) => [name, [kind]]));
  for (const term of terms) {
    const powers = monomialKey({ ...monomialOf(term), factors: [], pairs: [] });
    for (const name of new Set(term.factors.map(({ field }) => field))) {
      const count = term.factors.filter(({ field }) => field === name).length;
      lists.get(name)!.push(`${powers} ${term.factors.length} ${term.derivatives.length} ${count}`);
    }
  }
  return new Map([...lists].map(([name, list]) => [name, list.sort().join('\n')]));
}

const exchange =
  (a: string, b: string) =>
  (m: Monomial): Monomial => ({
    ...m,
    factors: m.factors.map((f) => ({ ...f, field: f.field === a ? b : f.field === b ? a : f.field })),
  });

/**
 * Sets of fields of which any two may be exchanged: the Lagrangian is invariant under all their permutations.
 * Null when looking would take too long. Fields are compared by what they stand in before any exchange is tried.
 */
export function exchangeableFields(model: Model): string[][] | null {
  const terms = termsOf(model);
  if (terms.length > BUDGET) return null;
  const numbers = numbersOf(terms);
  const profile = profiles(model, terms);
  const sets: string[][] = [];
  let spent = 0;
  for (const { name } of model.fields) {
    let home: string[] | null = null;
    for (const set of sets) {
      if (profile.get(set[0]!) !== profile.get(name)) continue;
      spent += terms.length;
      if (spent > BUDGET) return null;
      if (isInvariant(terms, numbers, exchange(set[0]!, name))) home ??= set;
    }
    if (home) home.push(name);
    else sets.push([name]);
  }
  return sets.filter((set) => set.length > 1);
}

/** Whether exchanging every complex field with its conjugate, parameters left alone, leaves the Lagrangian as it is. Null without complex fields. */
export function isChargeConjugationInvariant(model: Model): boolean | null {
  const complex = new Set(model.fields.filter(({ kind }) => kind === 'complex').map(({ name }) => name));
  if (complex.size === 0) return null;
  const terms = termsOf(model);
  return isInvariant(terms, numbersOf(terms), (m) => {
    const { factors } = conjugateMonomial(m, complex);
    return { ...m, factors };
  });
}

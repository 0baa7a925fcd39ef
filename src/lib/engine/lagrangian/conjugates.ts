import { addNumbers, type ExactNumber, equalNumbers, NUMBER_ZERO } from '../exact/number.ts';
import { canonical } from './canonical.ts';
import { conjugateMonomial, type Monomial, monomialKey, type Polynomial } from './monomial.ts';

/** The sum of monomials in canonical form, keyed by everything but the number. */
function collected(terms: readonly Monomial[]): Map<string, Monomial> {
  const sums = new Map<string, Monomial>();
  for (const term of terms) {
    const form = canonical(term);
    const key = monomialKey(form);
    const known = sums.get(key);
    sums.set(key, known ? { ...known, number: addNumbers(known.number, form.number) } : form);
  }
  return sums;
}

/** The conjugates of the monomials (like ones added) that do not stand beside them with the conjugate number. */
export function conjugateTermsMissing(terms: readonly Monomial[], complex: ReadonlySet<string>): Polynomial {
  const sums = collected(terms);
  const missing: Monomial[] = [];
  for (const term of sums.values()) {
    if (term.number.parts.length === 0) continue;
    const mirror = canonical(conjugateMonomial(term, complex));
    const present: ExactNumber = sums.get(monomialKey(mirror))?.number ?? NUMBER_ZERO;
    if (!equalNumbers(present, mirror.number)) missing.push(mirror);
  }
  return missing;
}

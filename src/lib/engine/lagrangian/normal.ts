import { addNumbers, type ExactNumber, isZeroNumber } from '../exact/number.ts';
import type { Rational } from '../exact/rational.ts';
import { sizeOf } from './arithmetic.ts';
import { BOUNDS } from './bounds.ts';
import { canonical, shapeKey } from './canonical.ts';
import type { FieldFactor, Note, Span, Term } from './model.ts';
import { type Monomial, monomialKey, OPERATOR } from './monomial.ts';
import type { Source } from './source.ts';

/** A monomial with the place it came from. */
export interface Placed {
  readonly monomial: Monomial;
  readonly span: Span | null;
}

/** The terms of a Lagrangian in normal form, with what was dropped on the way. */
export interface NormalForm {
  readonly terms: readonly Term[];
  readonly notes: readonly Note[];
}

function refuseUnfinished(source: Source, { monomial, span }: Placed): void {
  const at = span ?? { start: 0, end: 0 };
  const [open] = monomial.open;
  if (open)
    throw source.fault(
      'syntax',
      open.index === null
        ? 'A derivative is left without a partner: derivatives are contracted in pairs, as in (d phi)^2 or d phi d chi.'
        : `The index ${open.index} stands only once in this term: derivatives are contracted in pairs, as in d_mu phi d^mu phi.`,
      at,
    );
  if (monomial.powers.some(([name]) => name === OPERATOR))
    throw source.fault('syntax', 'This d^2 has no field on its right to act on.', at);
}

/** @throws LimitError over BOUNDS.terms. */
export function refuseTooManyTerms(source: Source, count: number, span: Span): void {
  if (count > BOUNDS.terms)
    throw source.limit(
      `Multiplied out the Lagrangian has ${count} terms; at most ${BOUNDS.terms} are read.`,
      BOUNDS.terms,
      count,
      span,
    );
}

const toTerm = (m: Monomial, number: ExactNumber, span: Span | null): Term => ({
  number,
  parameters: new Map<string, Rational>(m.powers),
  factors: m.factors,
  derivatives: m.pairs,
  span,
});

/** Why a monomial does not enter the action: null when it does. */
function droppedBecause(m: Monomial): { code: string; message: string } | null {
  if (m.factors.length === 0)
    return { code: 'constant', message: 'A constant term was dropped: it shifts the vacuum energy only.' };
  if (m.factors.length === 1 && m.pairs.length > 0)
    return {
      code: 'total-derivative',
      message: 'A total derivative was dropped: it does not contribute to the action.',
    };
  return null;
}

/** Bounds what sorting, conjugating and grouping the monomials will take. @throws LimitError over BOUNDS.steps. */
function refuseTooMuchWork(source: Source, placed: readonly Placed[]): void {
  const shapes = new Set<string>();
  let steps = 0;
  for (const { monomial, span } of placed) {
    steps += 4 * sizeOf(monomial);
    const { length } = monomial.pairs;
    if (length > 0 && !shapes.has(shapeKey(monomial))) {
      shapes.add(shapeKey(monomial));
      steps += 2 * length ** 3;
    }
    if (steps > BOUNDS.steps)
      throw source.limit(
        `Sorting the terms of this Lagrangian takes more than ${BOUNDS.steps} elementary steps, the most that are done.`,
        BOUNDS.steps,
        null,
        span ?? { start: 0, end: 0 },
      );
  }
}

/** Collects like monomials into terms. O(n log n) for n monomials. @throws InputError for derivatives that are left open. */
export function normalForm(source: Source, placed: readonly Placed[]): NormalForm {
  refuseTooMuchWork(source, placed);
  const sums = new Map<string, { monomial: Monomial; number: ExactNumber; span: Span | null }>();
  for (const entry of placed) {
    refuseUnfinished(source, entry);
    const form = canonical(entry.monomial);
    const key = monomialKey(form);
    const known = sums.get(key);
    if (known) known.number = addNumbers(known.number, form.number);
    else sums.set(key, { monomial: form, number: form.number, span: entry.span });
  }
  const terms: Term[] = [];
  const notes: Note[] = [];
  for (const { monomial, number, span } of sums.values()) {
    const dropped = isZeroNumber(number)
      ? { code: 'cancelled', message: 'Terms that cancel were dropped.' }
      : droppedBecause(monomial);
    if (dropped) notes.push({ ...dropped, span });
    else terms.push(toTerm(monomial, number, span));
  }
  return { terms, notes };
}

/** The multiset of fields of a list of factors as a key. */
export const fieldsKey = (factors: readonly FieldFactor[]): string =>
  factors.map(({ field, conjugate }) => (conjugate ? `${field}^*` : field)).join(' ');

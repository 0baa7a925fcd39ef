import { addNumbers, digitsOf, type ExactNumber, multiplyNumbers } from '../exact/number.ts';
import { BOUNDS } from './bounds.ts';
import type { Span } from './model.ts';
import {
  compareFactors,
  type Monomial,
  monomialKey,
  multiplyPowers,
  type OpenIndex,
  type Polynomial,
} from './monomial.ts';
import type { Source } from './source.ts';

/** Joins the open indices of two neighbours: equal names contract, and so do two indices without a name. */
function contract(a: readonly OpenIndex[], b: readonly OpenIndex[]): { pairs: [number, number][]; open: OpenIndex[] } {
  if (a.length === 0 || b.length === 0) return { pairs: [], open: [...a, ...b] };
  const pairs: [number, number][] = [];
  const left = [...a];
  const right: OpenIndex[] = [];
  for (const entry of b) {
    const partner = left.findIndex(({ index }) => index === entry.index);
    if (partner < 0) right.push(entry);
    else pairs.push([left.splice(partner, 1)[0]!.at, entry.at]);
  }
  return { pairs, open: [...left, ...right] };
}

/** Powers, fields and derivatives of a monomial: what handling it costs. */
export const sizeOf = ({ powers, factors, pairs, open }: Monomial): number =>
  powers.length + factors.length + 2 * pairs.length + open.length;

/** Steps of a product of numbers: one for two plain rationals; products of sums grow with the parts and the square of the digits. */
function productSteps(a: ExactNumber, b: ExactNumber): number {
  const products = a.parts.length * b.parts.length;
  if (products === 1 && a.parts[0]!.root * b.parts[0]!.root === 1n) return 1;
  return products * 6 * (1 + ((digitsOf(a) + digitsOf(b)) / 40) ** 2);
}

/** Budgeted arithmetic of one text: every product is counted, every bound checked before the work is done. */
export class Arithmetic {
  private steps = 0;

  constructor(readonly source: Source) {}

  /** Charges for work about to be done. @throws LimitError beyond BOUNDS.steps. */
  charge(steps: number, span: Span): void {
    this.steps += steps;
    if (this.steps > BOUNDS.steps)
      throw this.source.limit(
        `Multiplying this out takes more than ${BOUNDS.steps} elementary steps, the most that are done.`,
        BOUNDS.steps,
        null,
        span,
      );
  }

  checkedNumber(number: ExactNumber, span: Span): ExactNumber {
    if (number.parts.length > BOUNDS.numberParts)
      throw this.source.limit(
        `This number has more than ${BOUNDS.numberParts} unlike roots.`,
        BOUNDS.numberParts,
        number.parts.length,
        span,
      );
    const digits = digitsOf(number);
    if (digits > BOUNDS.resultDigits)
      throw this.source.limit(
        `This number has about ${digits} digits; at most ${BOUNDS.resultDigits} are kept.`,
        BOUNDS.resultDigits,
        digits,
        span,
      );
    return number;
  }

  private checked(m: Monomial, span: Span): Monomial {
    if (m.factors.length > BOUNDS.fieldDegree)
      throw this.source.limit(
        `This monomial has ${m.factors.length} fields; at most ${BOUNDS.fieldDegree} are read.`,
        BOUNDS.fieldDegree,
        m.factors.length,
        span,
      );
    if (m.pairs.length > BOUNDS.derivativePairs)
      throw this.source.limit(
        `This monomial has ${m.pairs.length} pairs of derivatives; at most ${BOUNDS.derivativePairs} are read.`,
        BOUNDS.derivativePairs,
        m.pairs.length,
        span,
      );
    for (const [name, power] of m.powers) {
      const size = power.num < 0n ? -power.num : power.num;
      if (size > BigInt(BOUNDS.parameterPower) * power.den)
        throw this.source.limit(
          `The power of ${name} is beyond ${BOUNDS.parameterPower}.`,
          BOUNDS.parameterPower,
          null,
          span,
        );
    }
    return m;
  }

  multiplyMonomials(a: Monomial, b: Monomial, span: Span): Monomial {
    this.charge(2 + (sizeOf(a) + sizeOf(b)) / 4 + productSteps(a.number, b.number), span);
    const shift = a.factors.length;
    const plain = a.pairs.length + a.open.length + b.pairs.length + b.open.length === 0;
    const joined = contract(
      a.open,
      b.open.map(({ index, at }) => ({ index, at: at + shift })),
    );
    const factors = [...a.factors, ...b.factors];
    if (plain) factors.sort(compareFactors);
    const shifted = b.pairs.map(([i, j]): [number, number] => [i + shift, j + shift]);
    return this.checked(
      {
        number: this.checkedNumber(multiplyNumbers(a.number, b.number), span),
        powers: multiplyPowers(a.powers, b.powers),
        factors,
        pairs: [...a.pairs, ...shifted, ...joined.pairs],
        open: joined.open,
      },
      span,
    );
  }

  /** a · b. @throws LimitError when the product could have more than BOUNDS.terms monomials. */
  multiply(a: Polynomial, b: Polynomial, span: Span): Polynomial {
    const bound = a.length * b.length;
    if (bound > BOUNDS.terms)
      throw this.source.limit(
        `Multiplied out this has up to ${bound} terms; at most ${BOUNDS.terms} are read.`,
        BOUNDS.terms,
        bound,
        span,
      );
    if (bound === 1) return [this.multiplyMonomials(a[0]!, b[0]!, span)];
    return this.merge(
      a.flatMap((x) => b.map((y) => this.multiplyMonomials(x, y, span))),
      span,
    );
  }

  /** Adds like monomials; zeros vanish. */
  merge(monomials: readonly Monomial[], span: Span): Polynomial {
    const sums = new Map<string, Monomial>();
    for (const m of monomials) {
      const key = monomialKey(m);
      const known = sums.get(key);
      if (!known) sums.set(key, m);
      else sums.set(key, { ...known, number: this.checkedNumber(addNumbers(known.number, m.number), span) });
    }
    return [...sums.values()].filter((m) => m.number.parts.length > 0);
  }

  scale(value: Polynomial, number: ExactNumber, span: Span): Polynomial {
    return value.map((m) => ({ ...m, number: this.checkedNumber(multiplyNumbers(m.number, number), span) }));
  }

  /** ∂ with an index (null: without a name) by the product rule; parameters are constant. */
  derive(value: Polynomial, index: string | null, span: Span): Polynomial {
    this.charge(
      value.reduce((sum, m) => sum + m.factors.length * (3 + sizeOf(m) / 4), 0),
      span,
    );
    const derived = value.flatMap((m) =>
      m.factors.map((_, at) => {
        const joined = contract(m.open, [{ index, at }]);
        return this.checked({ ...m, pairs: [...m.pairs, ...joined.pairs], open: joined.open }, span);
      }),
    );
    return this.merge(derived, span);
  }
}

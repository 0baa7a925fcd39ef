import { LimitError } from '../errors.ts';
import { factorial } from '../exact/combinatorics.ts';
import { accumulate, type IntegerPolynomial } from '../exact/polynomial.ts';
import { binomial, SeriesIndex, type Splits } from '../exact/seriesIndex.ts';
import type { Theory } from '../graph/theory.ts';

/** Multiplications of big integers that one ledger may spend; a request beyond it is refused with this number. */
export const LEDGER_STEPS = 40_000_000;
/** What listing one split of a multi-index costs, in multiplications (measured: time and memory). */
const SPLIT_STEPS = 12;
/** Multi-indices that one ledger may hold in memory. */
export const LEDGER_INDICES = 1_000_000;

export const NO_SPLITS: Splits = { left: [], right: [], ways: [] };

/**
 * The stage of the zero-dimensional theory: vertex contents and numbers of external points as multi-indices, the Gaussian
 * expectation of a monomial, and the selection rule that says which of them can be different from zero.
 *
 * `contents` counts vertices per kind; `legs` counts half-lines per type, at vertices as well as at external points.
 */
export class CountingSpace {
  readonly contents: SeriesIndex;
  readonly legs: SeriesIndex;
  private spent = 0;
  private readonly chargeIds = new Map<string, number>();
  private readonly neededCharge: number[] = [];
  private readonly legCharge: number[] = [];
  private readonly blocks = new Map<number, readonly boolean[] | null>();
  private readonly expectations = new Map<number, bigint>();
  private readonly byCharge = new Map<number, Map<number, Splits>>();
  private readonly rootedByCharge = new Map<number, Map<number, Splits>>();

  constructor(
    readonly theory: Theory,
    private readonly limit: number = LEDGER_STEPS,
  ) {
    const charge = (splits: number): void => this.spend(splits * SPLIT_STEPS);
    this.contents = new SeriesIndex(theory.kinds.length, charge);
    this.legs = new SeriesIndex(theory.partner.length, charge);
  }

  /** Counts `steps` multiplications. @throws LimitError beyond the limit. */
  spend(steps: number): void {
    this.spent += steps;
    if (this.spent > this.limit)
      throw new LimitError(
        `The independent count of this request needs more than ${this.limit} multiplications of exact integers, which is the bound.`,
        this.limit,
      );
    const held = this.contents.size + this.legs.size;
    if (held > LEDGER_INDICES)
      throw new LimitError(
        `The independent count of this request needs more than ${LEDGER_INDICES} terms of a power series, which is the bound.`,
        LEDGER_INDICES,
        held,
      );
  }

  /** Half-lines of a content, per type. */
  halfLines(content: number): number[] {
    const total = new Array<number>(this.theory.partner.length).fill(0);
    this.contents.vector(content).forEach((n, k) => {
      if (n === 0) return;
      this.theory.kinds[k]!.forEach((valence, h) => {
        total[h]! += n * valence;
      });
    });
    return total;
  }

  /** One key for a content together with external points. */
  cell(content: number, legs: number): number {
    return content * 0x4000000 + legs;
  }

  /** Can all half-lines of the content and of the external points be joined in pairs? Real fields: an even number; complex: as many φ as φ*. */
  balanced(content: number, legs: number): boolean {
    return this.needs(content) === this.chargeOf(legs);
  }

  /**
   * Can one connected diagram have this content and these points? Only if the fields of its vertices hang together: a line joins vertices
   * that share a field. Spares the logarithm of a theory with many fields most of its terms. The content must not be empty.
   */
  linked(content: number, legs: number): boolean {
    let block = this.blocks.get(content);
    if (block === undefined) {
      block = this.fieldBlock(content);
      this.blocks.set(content, block);
    }
    if (block === null) return false;
    return this.legs.vector(legs).every((n, h) => n === 0 || block[h]!);
  }

  /** Splits of external points whose left part balances `content`. Cached per points and charge. */
  legSplits(legs: number, content: number): Splits {
    return this.grouped(this.byCharge, legs, this.needs(content), () => this.legs.splits(legs));
  }

  /** The same with the first external point on the left. */
  rootedLegSplits(legs: number, content: number): Splits {
    return this.grouped(this.rootedByCharge, legs, this.needs(content), () => this.legs.rooted(legs));
  }

  /**
   * Gaussian expectation ⟨φ^q⟩ with every propagator 1 = the number of perfect matchings of q half-lines:
   * (n − 1)!! for a real field (zero when n is odd), n! for a complex field with n each of φ and φ* (otherwise zero).
   * Common practice: the 2n-point moment of a Gaussian is the sum over (2n − 1)!! pairings.
   */
  expectation(q: number): bigint {
    let value = this.expectations.get(q);
    if (value === undefined) {
      value = this.matchings(this.legs.vector(q));
      this.expectations.set(q, value);
    }
    return value;
  }

  /** 1 for two external points joined to each other, otherwise 0. */
  bareLine(legs: number): bigint {
    return this.legs.total(legs) === 2 ? this.expectation(legs) : 0n;
  }

  /** The monomial of a kind, ∏ φ_h^k_h, as an exponent. */
  monomial(kind: number): number {
    return this.legs.id(this.theory.kinds[kind]!);
  }

  /**
   * e^{−½∂∂} applied to a polynomial: subtracts every self-contraction (real field: Hermite polynomials; complex: Laguerre type).
   * Its expectation beside other normal-ordered factors is the number of matchings without a line inside one factor
   * (common practice; G. C. Wick, Phys. Rev. 80 (1950) 268).
   */
  normalOrdered(polynomial: IntegerPolynomial): IntegerPolynomial {
    let current = polynomial;
    this.theory.partner.forEach((partner, h) => {
      if (partner < h) return;
      const next = new Map<number, bigint>();
      for (const [q, factor] of current) {
        const vector = [...this.legs.vector(q)];
        const first = vector[h]!;
        const second = vector[partner]!;
        const most = partner === h ? Math.floor(first / 2) : Math.min(first, second);
        for (let j = 0; j <= most; j++) {
          const pairs =
            partner === h
              ? factorial(first) / (factorial(first - 2 * j) * factorial(j) * 2n ** BigInt(j))
              : binomial(first, j) * binomial(second, j) * factorial(j);
          vector[h] = partner === h ? first - 2 * j : first - j;
          if (partner !== h) vector[partner] = second - j;
          accumulate(next, this.legs.id(vector), j % 2 === 0 ? factor * pairs : -factor * pairs);
        }
      }
      current = next;
    });
    return current;
  }

  /** The half-line types that a linked content touches (with their partners); null when it falls into parts that share no field. */
  private fieldBlock(content: number): readonly boolean[] | null {
    const { partner, kinds } = this.theory;
    const present = kinds.filter((_, k) => this.contents.vector(content)[k]! > 0);
    const block = partner.map((_, h) => touches(present[0]!, h, partner));
    let waiting = present.slice(1);
    for (let joined = true; joined && waiting.length > 0; ) {
      const next = waiting.filter((kind) => !block.some((inside, h) => inside && touches(kind, h, partner)));
      joined = next.length < waiting.length;
      for (const kind of waiting)
        if (!next.includes(kind))
          partner.forEach((_, h) => {
            block[h] ||= touches(kind, h, partner);
          });
      waiting = next;
    }
    return waiting.length === 0 ? block : null;
  }

  private matchings(q: readonly number[]): bigint {
    let value = 1n;
    for (let h = 0; h < q.length; h++) {
      const partner = this.theory.partner[h]!;
      const n = q[h]!;
      if (partner === h) {
        if (n % 2 === 1) return 0n;
        for (let i = n - 1; i > 1; i -= 2) value *= BigInt(i);
      } else if (n !== q[partner]!) return 0n;
      else if (h < partner) value *= factorial(n);
    }
    return value;
  }

  private grouped(cache: Map<number, Map<number, Splits>>, legs: number, charge: number, splits: () => Splits): Splits {
    let groups = cache.get(legs);
    if (!groups) {
      groups = this.groupByCharge(splits());
      cache.set(legs, groups);
    }
    return groups.get(charge) ?? NO_SPLITS;
  }

  private groupByCharge(splits: Splits): Map<number, Splits> {
    const groups = new Map<number, { left: number[]; right: number[]; ways: bigint[] }>();
    splits.left.forEach((left, i) => {
      const charge = this.chargeOf(left);
      let group = groups.get(charge);
      if (!group) {
        group = { left: [], right: [], ways: [] };
        groups.set(charge, group);
      }
      group.left.push(left);
      group.right.push(splits.right[i]!);
      group.ways.push(splits.ways[i]!);
    });
    return groups;
  }

  private needs(content: number): number {
    this.neededCharge[content] ??= this.chargeId(this.halfLines(content), -1);
    return this.neededCharge[content];
  }

  private chargeOf(legs: number): number {
    this.legCharge[legs] ??= this.chargeId(this.legs.vector(legs), 1);
    return this.legCharge[legs];
  }

  private chargeId(halfLines: readonly number[], sign: 1 | -1): number {
    const key = this.theory.partner
      .map((partner, h) =>
        partner === h ? halfLines[h]! % 2 : partner > h ? sign * (halfLines[h]! - halfLines[partner]!) : 0,
      )
      .join();
    let id = this.chargeIds.get(key);
    if (id === undefined) {
      id = this.chargeIds.size;
      this.chargeIds.set(key, id);
    }
    return id;
  }
}

const touches = (kind: readonly number[], h: number, partner: readonly number[]): boolean =>
  kind[h]! > 0 || kind[partner[h]!]! > 0;

import { accumulateProduct, type IntegerPolynomial } from '../exact/polynomial.ts';
import type { CountingSpace } from './space.ts';

/** The part of V(φ) that carries a given content, as an integer polynomial in φ: ∏ φ_h^{k_h} for one vertex of a kind. */
export type VertexPart = (content: number) => IntegerPolynomial;

/**
 * Generating functions of the zero-dimensional theory ∫dφ e^{−φ²/2 + V(φ) + Jφ}, coefficient by coefficient.
 *
 * Every function takes the id of a content m and the id of the external points g (per half-line type) and returns an integer: the number
 * of contractions with labelled vertices, labelled half-lines and labelled external points; divided by ∏ n_kind! ∏ k_field! it is Σ 1/S.
 * Nothing here knows a diagram: all follow from Gaussian moments by series algebra. V may carry several vertices in one part
 * (an effective vertex); the relations below hold for any V.
 *
 * Each coefficient costs one pass over the splits of (m, g) and is kept. @throws LimitError through CountingSpace.spend.
 * @see P. Cvitanović, B. Lautrup, R. B. Pearson, Phys. Rev. D 18 (1978) 1939; M. Borinsky, Ann. Phys. 385 (2017) 95
 *   (methods; the formulas below are derived in the docstrings).
 */
export class GeneratingFunctions {
  private readonly exponentials = new Map<number, IntegerPolynomial>();
  private readonly fulls = new Map<number, bigint>();
  private readonly connecteds = new Map<number, bigint>();

  constructor(
    readonly space: CountingSpace,
    readonly vertices: VertexPart,
  ) {}

  /** Z: all contractions, ⟨e^V φ^g⟩ at content m. */
  full(m: number, g: number): bigint {
    if (!this.space.balanced(m, g)) return 0n;
    const key = this.space.cell(m, g);
    let value = this.fulls.get(key);
    if (value === undefined) {
      value = 0n;
      const exponential = this.exponential(m);
      this.space.spend(exponential.size);
      for (const [q, factor] of exponential) value += factor * this.space.expectation(this.space.legs.add(q, g));
      this.fulls.set(key, value);
    }
    return value;
  }

  /** W = log Z: the part that holds the root vertex (or, without vertices, the root point) is connected, the rest is anything. */
  connected(m: number, g: number): bigint {
    const { contents } = this.space;
    if (m === contents.zero) return this.space.bareLine(g);
    if (!this.space.balanced(m, g)) return 0n;
    const key = this.space.cell(m, g);
    const known = this.connecteds.get(key);
    if (known !== undefined) return known;
    let value = 0n;
    if (this.space.linked(m, g)) value = this.logarithm(m, g);
    this.connecteds.set(key, value);
    return value;
  }

  private logarithm(m: number, g: number): bigint {
    const { contents } = this.space;
    let value = this.full(m, g);
    const outer = contents.rooted(m);
    for (let i = 0; i < outer.left.length; i++) {
      const left = outer.left[i]!;
      const right = outer.right[i]!;
      const inner = this.space.legSplits(g, left);
      this.space.spend(inner.left.length + 1);
      let sum = 0n;
      for (let j = 0; j < inner.left.length; j++) {
        const near = inner.left[j]!;
        if (left === m && near === g) continue;
        const part = this.connected(left, near);
        if (part !== 0n) sum += inner.ways[j]! * part * this.full(right, inner.right[j]!);
      }
      if (sum !== 0n) value -= outer.ways[i]! * sum;
    }
    return value;
  }

  private exponential(m: number): IntegerPolynomial {
    const known = this.exponentials.get(m);
    if (known) return known;
    const { contents, legs } = this.space;
    const value = new Map<number, bigint>();
    if (m === contents.zero) value.set(legs.zero, 1n);
    const splits = contents.rooted(m);
    for (let i = 0; i < splits.left.length; i++) {
      const part = this.vertices(splits.left[i]!);
      if (part.size === 0) continue;
      const rest = this.exponential(splits.right[i]!);
      this.space.spend(part.size * rest.size);
      accumulateProduct(legs, value, part, rest, splits.ways[i]!);
    }
    this.exponentials.set(m, value);
    return value;
  }
}

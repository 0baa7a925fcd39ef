import { accumulate, type IntegerPolynomial } from '../exact/polynomial.ts';
import type { GeneratingFunctions } from './generating.ts';
import { type CountingSpace, NO_SPLITS } from './space.ts';

/**
 * Removal of bridges from the connected sums: the Legendre transform at φ = 0, and ⟨φ⟩ = 0 by choice of the source.
 *
 * U(x) is W without the bare propagator: connected sums with x at amputated points. A connected sum is a tree of one-particle
 * irreducible parts G joined by propagators, U(x) = ext_y [G(y) − ½(y − x)²]; solved the other way, with y = x + U′(x),
 *   G(y) = U(x) + ½(x − y)²  at  x = y − P(y),   P(y) = ∂G(y) = U′(y − P(y)).
 * So G is again a sum over trees, of connected parts joined by propagators −1. G is Γ less the free quadratic part, expanded at φ = 0;
 * one-point vertices need no special care. For a complex field the product of x and x* takes the place of x².
 *
 * `planted` is P, `forest` is e^{−P·∂}, as exact integers per content m and external points a (see GeneratingFunctions).
 * Cost of one coefficient: one pass over the splits of (m, a) times the numbers of branches that occur.
 * That the Legendre transform removes one-particle reducible parts is common practice; the inversion above is worked out here.
 */
export class BridgeRemoval {
  private readonly plantedValues = new Map<number, bigint>();
  private readonly forests = new Map<number, IntegerPolynomial>();
  private readonly space: CountingSpace;

  constructor(private readonly functions: GeneratingFunctions) {
    this.space = functions.space;
  }

  /** P_h = ∂G/∂y_h: 1PI sums with external points a and one more of type h. */
  planted(m: number, h: number, a: number): bigint {
    const { contents, legs } = this.space;
    const points = legs.add(a, legs.unit(h));
    if (m === contents.zero || !this.space.balanced(m, points)) return 0n;
    const key = this.space.cell(m, a) * this.space.theory.partner.length + h;
    let value = this.plantedValues.get(key);
    if (value === undefined) {
      value = 0n;
      const outer = this.space.linked(m, points) ? contents.splits(m) : NO_SPLITS;
      for (let i = 0; i < outer.left.length; i++)
        value += outer.ways[i]! * this.withBranches(outer.left[i]!, outer.right[i]!, a, legs.unit(h));
      this.plantedValues.set(key, value);
    }
    return value;
  }

  /** G: one-particle irreducible sums. The part that holds the root vertex, times its branches (∂G/∂c = ∂U/∂c at x = y − P). */
  irreducible(m: number, a: number): bigint {
    if (m === this.space.contents.zero || !this.space.balanced(m, a) || !this.space.linked(m, a)) return 0n;
    const { contents, legs } = this.space;
    const outer = contents.rooted(m);
    let value = 0n;
    for (let i = 0; i < outer.left.length; i++)
      value += outer.ways[i]! * this.withBranches(outer.left[i]!, outer.right[i]!, a, legs.zero);
    return value;
  }

  /**
   * Connected sums in which every internal bridge has external points on both sides: U(x) at x = −P(0), the source that makes ⟨φ⟩ vanish.
   * Cutting all other bridges leaves one part with all the points, and branches without any: those are subtracted.
   * With one point it equals P(0); needs at least one.
   */
  withoutTadpoles(m: number, a: number): bigint {
    if (m === this.space.contents.zero || !this.space.balanced(m, a) || !this.space.linked(m, a)) return 0n;
    const { contents, legs } = this.space;
    const outer = contents.splits(m);
    let value = 0n;
    for (let i = 0; i < outer.left.length; i++)
      value += outer.ways[i]! * this.branched(outer.left[i]!, a, this.forest(outer.right[i]!, legs.zero));
    return value;
  }

  /** Σ over splits of a: connected part with `near` and `extra` points, signed branches with the others. */
  private withBranches(part: number, rest: number, a: number, extra: number): bigint {
    const { legs, contents } = this.space;
    if (part === contents.zero) return 0n;
    const inner = legs.splits(a);
    let value = 0n;
    for (let j = 0; j < inner.left.length; j++) {
      const forest = this.forest(rest, inner.right[j]!);
      if (forest.size > 0) value += inner.ways[j]! * this.branched(part, legs.add(inner.left[j]!, extra), forest);
    }
    return value;
  }

  private branched(part: number, points: number, forest: IntegerPolynomial): bigint {
    const { legs, contents } = this.space;
    if (part === contents.zero) return 0n;
    this.space.spend(forest.size);
    let value = 0n;
    for (const [branches, factor] of forest)
      value += factor * this.functions.connected(part, legs.add(points, branches));
    return value;
  }

  /** ∏_h (−P_{partner h})^{f_h}/f_h! as a polynomial in the numbers f of branches: the tree that holds the root vertex, times the others. */
  private forest(m: number, a: number): IntegerPolynomial {
    const key = this.space.cell(m, a);
    const known = this.forests.get(key);
    if (known) return known;
    const { contents, legs, theory } = this.space;
    const value = new Map<number, bigint>();
    if (m === contents.zero && a === legs.zero) value.set(legs.zero, 1n);
    const outer = contents.rooted(m);
    const inner = legs.splits(a);
    for (let i = 0; i < outer.left.length; i++) {
      for (let j = 0; j < inner.left.length; j++) {
        const others = this.forest(outer.right[i]!, inner.right[j]!);
        if (others.size === 0) continue;
        for (let h = 0; h < theory.partner.length; h++) {
          const tree = this.planted(outer.left[i]!, theory.partner[h]!, inner.left[j]!);
          if (tree === 0n) continue;
          this.space.spend(others.size);
          const factor = -outer.ways[i]! * inner.ways[j]! * tree;
          for (const [f, count] of others) accumulate(value, legs.add(f, legs.unit(h)), factor * count);
        }
      }
    }
    this.forests.set(key, value);
    return value;
  }
}

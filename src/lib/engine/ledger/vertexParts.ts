import { accumulate, EMPTY_POLYNOMIAL, type IntegerPolynomial } from '../exact/polynomial.ts';
import { BridgeRemoval } from './bridges.ts';
import { GeneratingFunctions, type VertexPart } from './generating.ts';
import type { CountingSpace } from './space.ts';

/** V(φ) as the model has it: one vertex of kind k is ∏ φ_h^{k_h} (half-lines labelled, so no 1/k!). */
export function bareVertices(space: CountingSpace): VertexPart {
  return perKind(space, (kind) => new Map([[space.monomial(kind), 1n]]));
}

/** :V(φ):, the normal-ordered vertices: no line has both ends at one vertex. */
export function normalOrderedVertices(space: CountingSpace): VertexPart {
  return perKind(space, (kind) => space.normalOrdered(new Map([[space.monomial(kind), 1n]])));
}

/**
 * V(φ + τ), τ = ∂V(τ): every vertex with any trees of one-point vertices on its half-lines, the model's tadpoles without a loop.
 * τ_h at content m is the coefficient of the linear term, so the parts follow from each other by content.
 */
export function treeDressedVertices(space: CountingSpace): VertexPart {
  const { contents, legs, theory } = space;
  const hanging = new Map<number, bigint>();
  /** Labelled trees on the half-lines r (each of them a tree) with content m altogether. */
  const trees = (m: number, r: number): bigint => {
    if (r === legs.zero) return m === contents.zero ? 1n : 0n;
    if (!space.balanced(m, r)) return 0n;
    const key = space.cell(m, r);
    let value = hanging.get(key);
    if (value === undefined) {
      value = 0n;
      const h = legs.root(r);
      const others = legs.id(legs.vector(r).map((n, i) => (i === h ? n - 1 : n)));
      const toward = legs.unit(theory.partner[h]!);
      const splits = contents.splits(m);
      space.spend(splits.left.length);
      for (let i = 0; i < splits.left.length; i++) {
        const tree = dressed(splits.left[i]!).get(toward) ?? 0n;
        if (tree !== 0n) value += splits.ways[i]! * tree * trees(splits.right[i]!, others);
      }
      hanging.set(key, value);
    }
    return value;
  };
  const dressed = kept((m) => {
    const value = new Map<number, bigint>();
    contents.vector(m).forEach((n, k) => {
      if (n === 0) return;
      const rest = contents.id(contents.vector(m).map((count, i) => (i === k ? count - 1 : count)));
      const splits = legs.splits(space.monomial(k));
      for (let i = 0; i < splits.left.length; i++) {
        const count = trees(rest, splits.left[i]!);
        if (count !== 0n) accumulate(value, splits.right[i]!, BigInt(n) * splits.ways[i]! * count);
      }
    });
    return value;
  });
  return dressed;
}

/**
 * The vertices V′ for which everything that may hang on one vertex without external points cancels: the theory V′ counts the
 * diagrams of V that have no such piece.
 *
 * A diagram with external points is a core whose vertices carry pieces without points. The pieces on r half-lines of one vertex sum to the
 * moment M_r = ⟨ψ^r⟩ of the same theory with the source that makes ⟨ψ⟩ = 0 (no bridge without points behind it), so a core
 * vertex stands for ⟨V′(φ + ψ)⟩. Asking that this be V gives, with M_r at no vertices the Gaussian moments (self-contractions),
 *   V′_m = :[ V_m − Σ_{0 < m′ < m} Σ_r ∂^r V′_{m′}/r! · M_r(m − m′) ]:
 * which needs V′ at smaller contents only. Extends normal ordering from self-contractions to all such pieces; own derivation.
 */
export class CoreVertices {
  readonly parts: VertexPart;
  readonly bridges: BridgeRemoval;
  private readonly momentValues = new Map<number, bigint>();

  constructor(
    private readonly space: CountingSpace,
    vertices: VertexPart,
  ) {
    this.parts = kept((m) => space.normalOrdered(this.remainder(m, vertices(m))));
    this.bridges = new BridgeRemoval(new GeneratingFunctions(space, (m) => this.parts(m)));
  }

  private remainder(m: number, vertices: IntegerPolynomial): IntegerPolynomial {
    const { contents, legs } = this.space;
    const value = new Map(vertices);
    if (m === contents.zero || !this.space.linked(m, legs.zero)) return value;
    const outer = contents.splits(m);
    for (let i = 0; i < outer.left.length; i++) {
      const inside = outer.left[i]!;
      const hanging = outer.right[i]!;
      if (inside === contents.zero || hanging === contents.zero) continue;
      for (const [q, factor] of this.parts(inside)) {
        const inner = this.space.legSplits(q, hanging);
        this.space.spend(inner.left.length);
        for (let j = 0; j < inner.left.length; j++) {
          const moment = this.moment(hanging, inner.left[j]!);
          if (moment !== 0n) accumulate(value, inner.right[j]!, -outer.ways[i]! * inner.ways[j]! * factor * moment);
        }
      }
    }
    return value;
  }

  /** ⟨ψ^r⟩ at content m: the connected piece at the first of the r half-lines, times the others. */
  private moment(m: number, r: number): bigint {
    const { contents, legs } = this.space;
    if (r === legs.zero) return m === contents.zero ? 1n : 0n;
    if (!this.space.balanced(m, r)) return 0n;
    const key = this.space.cell(m, r);
    let value = this.momentValues.get(key);
    if (value === undefined) {
      value = 0n;
      const outer = contents.splits(m);
      for (let i = 0; i < outer.left.length; i++) {
        const inner = this.space.rootedLegSplits(r, outer.left[i]!);
        this.space.spend(inner.left.length);
        for (let j = 0; j < inner.left.length; j++) {
          const piece = this.piece(outer.left[i]!, inner.left[j]!);
          if (piece !== 0n)
            value += outer.ways[i]! * inner.ways[j]! * piece * this.moment(outer.right[i]!, inner.right[j]!);
        }
      }
      this.momentValues.set(key, value);
    }
    return value;
  }

  private piece(m: number, r: number): bigint {
    if (this.space.legs.total(r) < 2) return 0n;
    return m === this.space.contents.zero ? this.space.bareLine(r) : this.bridges.withoutTadpoles(m, r);
  }
}

function perKind(space: CountingSpace, part: (kind: number) => IntegerPolynomial): VertexPart {
  return kept((m) => (space.contents.total(m) === 1 ? part(space.contents.root(m)) : EMPTY_POLYNOMIAL));
}

function kept(part: VertexPart): VertexPart {
  const known = new Map<number, IntegerPolynomial>();
  return (m) => {
    let value = known.get(m);
    if (!value) {
      value = part(m);
      known.set(m, value);
    }
    return value;
  };
}

import type { Rational } from '../exact/rational.ts';

/**
 * A theory reduced to what counting needs: integers, no names, no coefficients.
 *
 * A *half-line type* is what stands at a vertex: a real field has one type, a complex field two (φ and φ*).
 * A contraction joins a half-line of type h with one of type partner[h]. The expansion, the ledger and the
 * diagram facts all speak of this value and of nothing above it.
 */
export interface Theory {
  /** partner[h]: the type h contracts with; partner[h] === h for a real field. An involution. */
  readonly partner: readonly number[];
  /** kinds[k][h]: how many half-lines of type h a vertex of kind k has. */
  readonly kinds: readonly (readonly number[])[];
}

/**
 * Which vertex contents belong to a request (physics: "order").
 *
 * `powers`: Σ over vertices of weights[kind][c] must equal bound[c] for every component c (with `through`: be ≤ it).
 *   Exact powers of couplings have one component per coupling of the model; a total power has one component in all.
 * `loops`: loop number of the diagram plus Σ kindLoops must equal bound (with `through`: be ≤ it).
 */
export type Order =
  | {
      readonly by: 'powers';
      readonly weights: readonly (readonly Rational[])[];
      readonly bound: readonly Rational[];
      readonly through: boolean;
    }
  | {
      readonly by: 'loops';
      readonly kindLoops: readonly number[];
      readonly bound: number;
      readonly through: boolean;
    };

/** all: Z; normalised: Z[J]/Z[0]; connected: W; 1PI: connected, amputated, no internal bridge. */
export type Keep = 'all' | 'normalised' | 'connected' | '1PI';
export type Drop = 'self-contractions' | 'tadpoles' | 'scaleless';

/** A correlator to an order, in integers: the input of the expansion and, independently, of the ledger. */
export interface CountingRequest {
  readonly theory: Theory;
  /** The half-line type of each external point, in order: a leg "φ" is the operator φ and contracts with φ*. */
  readonly legs: readonly number[];
  readonly order: Order;
  readonly keep: Keep;
  readonly drop: readonly Drop[];
}

/** content[k]: the number of vertices of kind k. */
export type Content = readonly number[];

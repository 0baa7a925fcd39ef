/**
 * One Feynman diagram of a Theory, in integers.
 *
 * Vertices are 0…V−1 (V = kinds.length). `legs[k]` is the vertex of external point k, or −1−j when point k is joined
 * directly to point j (then legs[j] === −1−k). `lines` holds internal lines only.
 */
export interface Diagram {
  /** kinds[v]: index into theory.kinds. */
  readonly kinds: readonly number[];
  readonly legs: readonly number[];
  readonly lines: readonly Line[];
}

/**
 * An internal line between two vertices; from === to is a self-contraction.
 *
 * `type` is the half-line type at its `to` end, and always the smaller-numbered of the two partner types
 * (so `type` alone names the field). For a complex field the smaller-numbered type is φ and the larger φ*:
 * the line runs from its φ* end to its φ end. For a real field from ≤ to.
 */
export interface Line {
  readonly from: number;
  readonly to: number;
  readonly type: number;
}

/** A diagram with the order of its automorphism group (external points fixed). weight = 1/symmetryFactor. */
export interface CountedDiagram extends Diagram {
  readonly symmetryFactor: bigint;
}

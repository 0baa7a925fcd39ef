import type { Frame } from './frame.ts';

/** Verdicts on a choice: all renumberings below give smaller matrices; the same; one gives a larger; not known. */
export const LESS = 0;
export const EQUAL = 1;
export const GREATER = 2;
export const UNKNOWN = 3;

/**
 * Compares rows of a renumbered matrix with rows of the matrix itself. What a renumbering puts at places 0…d−1 is settled; the
 * other nodes stand in runs, one for each run of columns, and a run is sorted when a row is read: larger joins first.
 */
export class Comparison {
  private readonly frame: Frame;
  private readonly values: Int32Array;

  constructor(frame: Frame) {
    this.frame = frame;
    this.values = new Int32Array(frame.n);
  }

  /**
   * Moves the node at place `at` to place d and compares its row with row d. from[base…]: the nodes by place. When EQUAL,
   * to[target…] holds the places d + 1 … n − 1 of the order sorted by that row. O(n) for rows with few joins.
   */
  placed(from: Int32Array, base: number, d: number, at: number, to: Int32Array, target: number): number {
    const { n, matrix, runEnd } = this.frame;
    const { values } = this;
    const level = d * n;
    const v = from[base + at]!;
    const row = v * n;
    const own = matrix[row + v]! - matrix[level + d]!;
    if (own !== 0) return own > 0 ? GREATER : LESS;
    const first = from[base + d]!;
    for (let p = d + 1; p < n; ) {
      const end = runEnd[level + p]!;
      for (let q = p; q < end; q++) {
        const u = q === at ? first : from[base + q]!;
        const value = matrix[row + u]!;
        let s = q;
        for (; s > p && values[s - 1]! < value; s--) {
          values[s] = values[s - 1]!;
          to[target + s] = to[target + s - 1]!;
        }
        values[s] = value;
        to[target + s] = u;
      }
      for (; p < end; p++) {
        const difference = values[p]! - matrix[level + p]!;
        if (difference !== 0) return difference > 0 ? GREATER : LESS;
      }
    }
    return EQUAL;
  }

  /** The same for node v > d and nothing else moved, without the order. */
  alone(d: number, v: number): number {
    const { n, matrix, runEnd } = this.frame;
    const { values } = this;
    const level = d * n;
    const row = v * n;
    const own = matrix[row + v]! - matrix[level + d]!;
    if (own !== 0) return own > 0 ? GREATER : LESS;
    for (let p = d + 1; p < n; ) {
      const end = runEnd[level + p]!;
      for (let q = p; q < end; q++) {
        const value = matrix[row + (q === v ? d : q)]!;
        let s = q;
        for (; s > p && values[s - 1]! < value; s--) values[s] = values[s - 1]!;
        values[s] = value;
      }
      for (; p < end; p++) {
        const difference = values[p]! - matrix[level + p]!;
        if (difference !== 0) return difference > 0 ? GREATER : LESS;
      }
    }
    return EQUAL;
  }
}

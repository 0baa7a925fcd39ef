import { type Comparison, EQUAL, GREATER, LESS, UNKNOWN } from './comparison.ts';
import type { Frame } from './frame.ts';

/** Renumberings kept at once, and automorphisms counted one by one; beyond it the matrix is too symmetric for this method. */
const CAPACITY = 96;

/**
 * All renumberings of the finished rows that are not yet larger or smaller than the matrix, row by row: each waits for a row
 * that is not there yet, and goes on when that row is finished, so no comparison is made twice.
 *
 * A renumbering is kept as the order of its nodes by place, settled up to its depth. What belongs to row r lies above what
 * belongs to earlier rows, so going back to a row needs no undoing.
 */
export class Frontier {
  private readonly frame: Frame;
  private readonly comparison: Comparison;
  /** After the last row: the order of the automorphism group. */
  automorphisms = 1;
  private readonly orders: Int32Array;
  private readonly depth: Int32Array;
  /** waiting[r·CAPACITY…]: the renumberings that wait after row r; count[r]: how many; top[r]: places of `orders` in use. */
  private readonly waiting: Int32Array;
  private readonly count: Int32Array;
  private readonly top: Int32Array;
  private readonly identity: Int32Array;
  private used = 0;
  private kept = 0;
  private row = 0;

  constructor(frame: Frame, comparison: Comparison) {
    this.frame = frame;
    this.comparison = comparison;
    const { n } = frame;
    this.orders = new Int32Array(CAPACITY * n);
    this.depth = new Int32Array(CAPACITY);
    this.waiting = new Int32Array(CAPACITY * n);
    this.count = new Int32Array(n);
    this.top = new Int32Array(n);
    this.identity = Int32Array.from({ length: n }, (_, v) => v);
  }

  /**
   * Takes in row r. pairs[first…last−1]: d·n + r for the places d where row r alone compares EQUAL.
   * GREATER: the matrix is not canonical. UNKNOWN: too many renumberings wait. LESS: neither.
   */
  advance(r: number, pairs: Int32Array, first: number, last: number): number {
    const { n } = this.frame;
    const before = r > 0 ? this.count[r - 1]! : 0;
    this.used = r > 0 ? this.top[r - 1]! : 0;
    this.row = r;
    this.kept = 0;
    this.automorphisms = 1;
    for (let i = 0; i < before; i++) {
      const slot = this.waiting[(r - 1) * CAPACITY + i]!;
      const verdict = this.expand(slot, this.depth[slot]! < r);
      if (verdict !== LESS) return verdict;
    }
    for (let i = first; i < last; i++) {
      const verdict = this.place(this.identity, 0, (pairs[i]! - r) / n, r);
      if (verdict !== LESS) return verdict;
    }
    this.count[r] = this.kept;
    this.top[r] = this.used;
    return LESS;
  }

  /** Tries the finished rows at the next place; `latest`: only the last one, the others were tried before. */
  private expand(slot: number, latest: boolean): number {
    const { n, runEnd } = this.frame;
    const { orders, row } = this;
    const d = this.depth[slot]!;
    const base = slot * n;
    const end = runEnd[d * n + d]!;
    let later = false;
    for (let at = d; at < end; at++) {
      const v = orders[base + at]!;
      if (v > row) later = true;
      else if (v === row || !latest) {
        const verdict = this.place(orders, base, d, at);
        if (verdict !== LESS) return verdict;
      }
    }
    if (later) this.keep(slot);
    return LESS;
  }

  private place(from: Int32Array, base: number, d: number, at: number): number {
    const { n } = this.frame;
    const slot = this.used;
    if (slot === CAPACITY || this.automorphisms === CAPACITY) return UNKNOWN;
    const verdict = this.comparison.placed(from, base, d, at, this.orders, slot * n);
    if (verdict !== EQUAL) return verdict === GREATER ? GREATER : LESS;
    if (d + 1 === n) {
      this.automorphisms++;
      return LESS;
    }
    this.depth[slot] = d + 1;
    this.used++;
    if (d === this.row) {
      this.keep(slot);
      return LESS;
    }
    const { kept } = this;
    const found = this.expand(slot, false);
    if (this.kept === kept) this.used = slot;
    return found;
  }

  private keep(slot: number): void {
    this.waiting[this.row * CAPACITY + this.kept++] = slot;
  }
}

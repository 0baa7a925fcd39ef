import { Comparison, EQUAL, GREATER, LESS, UNKNOWN } from './comparison.ts';
import type { Frame } from './frame.ts';
import { Frontier } from './frontier.ts';
import { type Equivalence, Orbits } from './orbits.ts';

/** Nodes of the search tree that a test of unfinished rows may visit before it lets them pass. */
const PREFIX_BUDGET = 400;

/**
 * Is the matrix the largest of all its renumberings, read row by row? And how many renumberings leave it as it is?
 *
 * A renumbering is built place by place: the node put at place d must have, after sorting within the runs of columns made by
 * the places before, the same row as the matrix has at d. A larger row refutes canonicity, a smaller one ends the branch.
 * Runs are permuted as sets, so no order within a run is tried before a row tells its members apart.
 *
 * Most matrices leave few renumberings undecided: a frontier carries these from row to row. Where there are too many, the
 * matrix is very symmetric, and they are sorted by the first place d that they change and the node v put there: unfinished
 * rows are searched from the undecided pairs (d, v) within a budget; for the finished matrix the group is counted along the
 * chain of stabilisers of places 0, 1, 2, …, from its end: an orbit for each place, one automorphism for each new member of an
 * orbit, choices equivalent to one that failed skipped.
 *
 * @see R. C. Read, Ann. Discrete Math. 2 (1978) 107; M. Meringer, J. Graph Theory 30 (1999) 137.
 */
export class Canonicity {
  private readonly frame: Frame;
  /** After a refutation: the last row that it rests on. No change to later rows can undo it. */
  restsOn = 0;
  /** Numbers whose product is the order of the group of the last canonical matrix: sizes of orbits. */
  readonly orbitSizes: Int32Array;

  private readonly order: Int32Array;
  private readonly comparison: Comparison;
  private readonly frontier: Frontier;
  /** followed[r]: the frontier holds after row r. */
  private readonly followed: Uint8Array;
  private readonly image: Int32Array;
  private readonly orbits: Orbits;
  /** pairs[segment(r)…]: the undecided pairs d·n + v after row r; live[r]: their number. */
  private readonly pairs: Int32Array;
  private readonly live: Int32Array;
  /** Nodes that no automorphism puts at the place in hand. */
  private readonly failed: Int32Array;
  private visits = 0;

  constructor(frame: Frame) {
    this.frame = frame;
    const { n } = frame;
    this.order = new Int32Array((n + 1) * n);
    this.comparison = new Comparison(frame);
    this.frontier = new Frontier(frame, this.comparison);
    this.followed = new Uint8Array(n);
    this.image = Int32Array.from({ length: n }, (_, v) => v);
    this.orbits = new Orbits(n);
    this.failed = new Int32Array(n);
    this.pairs = new Int32Array(((n - 1) * n * (n + 1)) / 6);
    this.live = new Int32Array(n);
    this.orbitSizes = new Int32Array(n);
  }

  /** Takes in the finished row r; false when rows 0…r cannot begin a canonical matrix. It may say true too often. */
  enter(r: number): boolean {
    const { n, external, runEnd } = this.frame;
    const { pairs, live } = this;
    const segment = this.segment(r);
    const before = r > 0 ? this.segment(r - 1) : 0;
    let count = r > 0 ? live[r - 1]! : 0;
    for (let i = 0; i < count; i++) pairs[segment + i] = pairs[before + i]!;
    for (let d = external; d < r; d++) {
      if (runEnd[d * n + d]! <= r) continue;
      const verdict = this.comparison.alone(d, r);
      if (verdict === GREATER) {
        this.restsOn = r;
        return false;
      }
      if (verdict === EQUAL) pairs[segment + count++] = d * n + r;
    }
    live[r] = count;
    return this.follow(r, segment + (r > 0 ? live[r - 1]! : 0), segment + count);
  }

  /** Goes on with what is undecided: all of it while there is little, else from the start within a budget. */
  private follow(r: number, first: number, last: number): boolean {
    if (r === 0 || this.followed[r - 1] === 1) {
      const verdict = this.frontier.advance(r, this.pairs, first, last);
      this.followed[r] = verdict === LESS ? 1 : 0;
      if (verdict === GREATER) this.restsOn = r;
      if (verdict !== UNKNOWN) return verdict === LESS;
    }
    this.followed[r] = 0;
    return r < this.frame.external || r >= this.frame.n - 3 || this.mayBegin(r);
  }

  /** Whether rows 0…r may begin a canonical matrix; may say yes too often, never no. */
  private mayBegin(r: number): boolean {
    const { n } = this.frame;
    const { pairs } = this;
    const segment = this.segment(r);
    const count = this.live[r]!;
    let kept = 0;
    this.visits = 0;
    for (let i = 0; i < count; i++) {
      const pair = pairs[segment + i]!;
      const v = pair % n;
      const verdict = this.explore((pair - v) / n, v, r + 1);
      if (verdict === GREATER) return false;
      if (verdict === UNKNOWN) pairs[segment + kept++] = pair;
    }
    this.live[r] = kept;
    return true;
  }

  /** Whether the finished matrix is canonical; fills orbitSizes. */
  isCanonical(): boolean {
    const { n, external } = this.frame;
    const { orbitSizes } = this;
    for (let d = 0; d < n; d++) orbitSizes[d] = 1;
    if (this.followed[n - 1] === 1) {
      orbitSizes[n - 1] = this.frontier.automorphisms;
      return true;
    }
    this.visits = 0;
    this.orbits.clear();
    for (let d = n - 2; d >= external; d--) if (!this.countOrbit(d)) return false;
    return true;
  }

  /** After row r there are at most r(r + 1)/2 pairs; those of earlier rows come first. */
  private segment(r: number): number {
    return ((r - 1) * r * (r + 1)) / 6;
  }

  /** Verdict on all renumberings that change no place before d and put node v, whose row is equal, at d. */
  private explore(d: number, v: number, rows: number): number {
    this.placeIdentity(d);
    this.place(d, v);
    this.image[d] = v;
    const verdict = this.visit(d + 1, rows);
    this.image[d] = d;
    if (verdict === GREATER && v > this.restsOn) this.restsOn = v;
    return verdict;
  }

  /** Orbit of place d under the renumberings that fix the places before it; false when a larger matrix turns up. */
  private countOrbit(d: number): boolean {
    const { orbits, pairs } = this;
    const { n } = this.frame;
    const segment = this.segment(n - 1);
    const end = segment + this.live[n - 1]!;
    const low = d * n;
    let size = 1;
    let failures = 0;
    for (let i = segment; i < end; i++) {
      const v = pairs[i]! - low;
      if (v < 0 || v >= n) continue;
      if (this.failedBefore(v, failures)) continue;
      const verdict = orbits.joined(d, v) ? EQUAL : this.explore(d, v, n);
      if (verdict === GREATER) return false;
      if (verdict === EQUAL) size++;
      else this.failed[failures++] = v;
    }
    this.orbitSizes[d] = size;
    return true;
  }

  private failedBefore(v: number, failures: number): boolean {
    for (let i = 0; i < failures; i++) if (this.orbits.joined(this.failed[i]!, v)) return true;
    return false;
  }

  private placeIdentity(d: number): void {
    const { n } = this.frame;
    const base = d * n;
    for (let p = d; p < n; p++) this.order[base + p] = p;
  }

  /** Choices for place d; EQUAL as soon as one automorphism is found. */
  private visit(d: number, rows: number): number {
    const { n, runEnd } = this.frame;
    if (d === rows) return rows === n ? this.record() : UNKNOWN;
    if (++this.visits > PREFIX_BUDGET && rows < n) return UNKNOWN;
    const { order, image } = this;
    const base = d * n;
    const end = runEnd[base + d]!;
    let equivalent: Equivalence | null = null;
    let result = LESS;
    for (let at = d; at < end; at++) {
      const v = order[base + at]!;
      if (v >= rows) {
        result = UNKNOWN;
        continue;
      }
      let verdict = this.place(d, at);
      if (verdict === EQUAL) {
        if (equivalent?.toEarlier(v)) continue;
        image[d] = v;
        verdict = this.visit(d + 1, rows);
        image[d] = d;
        if (verdict === LESS && rows === n) equivalent = this.orbits.remember(equivalent, image, d, v);
      } else if (verdict === GREATER) this.restsOn = d;
      if (verdict === GREATER && v > this.restsOn) this.restsOn = v;
      if (verdict === EQUAL || verdict === GREATER) return verdict;
      if (verdict === UNKNOWN) result = UNKNOWN;
    }
    return result;
  }

  private place(d: number, at: number): number {
    const base = d * this.frame.n;
    return this.comparison.placed(this.order, base, d, at, this.order, base + this.frame.n);
  }

  /** The renumbering just completed is an automorphism. */
  private record(): number {
    this.orbits.add(this.image);
    return EQUAL;
  }
}

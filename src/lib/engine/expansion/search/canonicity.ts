import type { Frame } from './frame.ts';

/** Nodes of the search tree that a test of unfinished rows may visit before it lets them pass. */
const PREFIX_BUDGET = 400;
/** Visits after which the automorphisms found so far are used to skip equivalent choices. */
const PATIENCE = 64;

const LESS = -1;
const EQUAL = 0;
const GREATER = 1;

/**
 * Is the matrix the largest of all its renumberings, read row by row? And how many renumberings leave it as it is?
 *
 * A renumbering is built place by place: the node put at place d must have, after sorting within the runs of columns made by
 * the places before, the same row as the matrix has at d. A larger row refutes canonicity, a smaller one ends the branch.
 * Runs are permuted as sets, so no order within a run is tried before a row tells its members apart.
 *
 * The group is counted along the chain of stabilisers of places 0, 1, 2, …, from its end: an orbit for each place, one
 * automorphism for each new member of an orbit, equivalent choices skipped.
 *
 * @see R. C. Read, Ann. Discrete Math. 2 (1978) 107; M. Meringer, J. Graph Theory 30 (1999) 137.
 */
export class Canonicity {
  /** After a refutation: the last row that it rests on. No change to later rows can undo it. */
  restsOn = 0;
  /** Sizes of the orbits of the last successful count; their product is the group's order. */
  readonly orbitSizes: Int32Array;

  private readonly order: Int32Array;
  private readonly values: Int32Array;
  private readonly parent: Int32Array;
  private readonly tried: Uint8Array;
  private generators: Int32Array[] = [];
  private visits = 0;

  constructor(private readonly frame: Frame) {
    const { n } = frame;
    this.order = new Int32Array((n + 1) * n);
    this.values = new Int32Array(n);
    this.parent = new Int32Array(n);
    this.tried = new Uint8Array(n);
    this.orbitSizes = new Int32Array(n);
  }

  /** Whether rows 0…rows−1 may begin a canonical matrix; a cheap test that may say yes too often, never no. */
  mayBegin(rows: number): boolean {
    const { n, external, runEnd } = this.frame;
    this.visits = 0;
    for (let d = external; d < rows; d++) {
      const end = Math.min(runEnd[d * n + d]!, rows);
      if (end === d + 1) continue;
      this.placeIdentity(d);
      for (let v = d + 1; v < end; v++) {
        const result = this.compare(d, v);
        if (result === LESS) continue;
        const found = result === GREATER ? this.refute(d, v) : this.visit(d + 1, rows, false);
        if (found === GREATER) {
          this.restsOn = Math.max(this.restsOn, v);
          return false;
        }
      }
    }
    return true;
  }

  /** Whether the finished matrix is canonical; fills orbitSizes. */
  isCanonical(): boolean {
    const { n, external, runEnd } = this.frame;
    this.visits = 0;
    this.generators.length = 0;
    this.orbitSizes.fill(1);
    for (let v = 0; v < n; v++) this.parent[v] = v;
    for (let d = n - 2; d >= external; d--) {
      const end = runEnd[d * n + d]!;
      if (end > d + 1 && !this.countOrbit(d, end)) return false;
    }
    return true;
  }

  /** Orbit of place d under the renumberings that fix the places before it; false when a larger matrix turns up. */
  private countOrbit(d: number, end: number): boolean {
    const { n } = this.frame;
    this.placeIdentity(d);
    this.tried.fill(0);
    for (let v = d + 1; v < end; v++) {
      const root = this.find(v);
      if (root === this.find(d) || this.tried[root]) continue;
      const result = this.compare(d, v);
      const found = result === EQUAL ? this.visit(d + 1, n, true) : result;
      if (found === GREATER) {
        if (result === GREATER) this.refute(d, v);
        this.restsOn = Math.max(this.restsOn, v);
        return false;
      }
      if (found === EQUAL) this.merge(d, v);
      else this.tried[root] = 1;
    }
    let size = 1;
    for (let v = d + 1; v < end; v++) if (this.find(v) === this.find(d)) size++;
    this.orbitSizes[d] = size;
    return true;
  }

  private refute(d: number, v: number): number {
    this.restsOn = Math.max(d, v);
    return GREATER;
  }

  private placeIdentity(d: number): void {
    const { n } = this.frame;
    const base = d * n;
    for (let p = 0; p < n; p++) this.order[base + p] = p;
  }

  /**
   * Choices for place d. counting: EQUAL as soon as one automorphism is found; else unfinished rows end the branch.
   * Otherwise LESS: no automorphism here.
   */
  private visit(d: number, rows: number, counting: boolean): number {
    const { n, runEnd } = this.frame;
    if (d === rows) return counting ? this.record() : LESS;
    if (++this.visits > PREFIX_BUDGET && !counting) return LESS;
    const { order } = this;
    const base = d * n;
    const end = runEnd[base + d]!;
    const careful = counting && this.visits > PATIENCE && end > d + 2 && this.generators.length > 0;
    const skip = careful ? this.fixingOrbits(d) : null;
    for (let at = d; at < end; at++) {
      const v = order[base + at]!;
      if (v >= rows) continue;
      if (skip?.has(order[base + at]!, at - d)) continue;
      const result = this.compare(d, at);
      if (result === LESS) continue;
      const found = result === GREATER ? this.refute(d, v) : this.visit(d + 1, rows, counting);
      if (found === LESS) continue;
      if (found === GREATER && v > this.restsOn) this.restsOn = v;
      return found;
    }
    return LESS;
  }

  /** Row of the node at place `at` if it is moved to place d, against row d of the matrix; fills the order for place d + 1. */
  private compare(d: number, at: number): number {
    const { n, matrix, runEnd } = this.frame;
    const { order, values } = this;
    const base = d * n;
    const next = base + n;
    const v = order[base + at]!;
    const row = v * n;
    const own = matrix[row + v]! - matrix[base + d]!;
    if (own !== 0) return own > 0 ? GREATER : LESS;
    const first = order[base + d]!;
    for (let p = d + 1; p < n; ) {
      const end = runEnd[base + p]!;
      for (let q = p; q < end; q++) {
        const u = q === at ? first : order[base + q]!;
        const value = matrix[row + u]!;
        let s = q;
        for (; s > p && values[s - 1]! < value; s--) {
          values[s] = values[s - 1]!;
          order[next + s] = order[next + s - 1]!;
        }
        values[s] = value;
        order[next + s] = u;
      }
      for (; p < end; p++) {
        const difference = values[p]! - matrix[base + p]!;
        if (difference !== 0) return difference > 0 ? GREATER : LESS;
      }
    }
    order[next + d] = v;
    for (let p = 0; p < d; p++) order[next + p] = order[base + p]!;
    return EQUAL;
  }

  /** The renumbering just completed is an automorphism. */
  private record(): number {
    const { n } = this.frame;
    const image = this.order.slice(n * n, n * n + n);
    this.generators.push(image);
    for (let p = 0; p < n; p++) if (image[p] !== p) this.merge(p, image[p]!);
    return EQUAL;
  }

  private find(v: number): number {
    const { parent } = this;
    let root = v;
    while (parent[root] !== root) root = parent[root]!;
    return root;
  }

  private merge(a: number, b: number): void {
    const x = this.find(a);
    const y = this.find(b);
    if (x !== y) this.parent[Math.max(x, y)] = Math.min(x, y);
  }

  /** Orbits of the found automorphisms that fix the nodes at places 0…d−1; has(v, k): v is equivalent to an earlier choice. */
  private fixingOrbits(d: number): { has(v: number, k: number): boolean } {
    const { n } = this.frame;
    const { order } = this;
    const label = Int32Array.from({ length: n }, (_, v) => v);
    const find = (v: number): number => (label[v] === v ? v : find(label[v]!));
    for (const image of this.generators) {
      let fixes = true;
      for (let p = 0; p < d && fixes; p++) fixes = image[order[d * n + p]!] === order[d * n + p];
      if (!fixes) continue;
      image.forEach((to, from) => {
        label[find(to)] = find(from);
      });
    }
    const seen = new Set<number>();
    return {
      has: (v) => {
        const root = find(v);
        if (seen.has(root)) return true;
        seen.add(root);
        return false;
      },
    };
  }
}

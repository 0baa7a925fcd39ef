/** Which nodes are as good as one that was tried before. */
export interface Equivalence {
  toEarlier(v: number): boolean;
  add(v: number): void;
}

/** Automorphisms found so far, and the orbits they make. */
export class Orbits {
  private readonly n: number;
  /** found[0…count−1]; the arrays are used again. */
  private readonly found: Int32Array[] = [];
  private count = 0;
  private readonly parent: Int32Array;

  constructor(n: number) {
    this.n = n;
    this.parent = new Int32Array(n);
  }

  clear(): void {
    this.count = 0;
    for (let v = 0; v < this.n; v++) this.parent[v] = v;
  }

  /** image[v]: where the automorphism takes node v; copied. */
  add(image: Int32Array): void {
    if (this.count === this.found.length) this.found.push(new Int32Array(this.n));
    this.found[this.count++]!.set(image);
    for (let v = 0; v < this.n; v++) if (image[v] !== v) merge(this.parent, v, image[v]!);
  }

  joined(a: number, b: number): boolean {
    return find(this.parent, a) === find(this.parent, b);
  }

  /**
   * Notes that node v at place d led nowhere, after placed[0…d−1]: nor will any node that a known automorphism takes it to
   * while it fixes those. known: what was noted at this place before. O(automorphisms · n) the first time at a place.
   */
  remember(known: Equivalence | null, placed: Int32Array, d: number, v: number): Equivalence {
    const equivalence = known ?? this.fixing(placed, d);
    equivalence.add(v);
    return equivalence;
  }

  private fixing(placed: Int32Array, d: number): Equivalence {
    const parent = Int32Array.from({ length: this.n }, (_, v) => v);
    for (let i = 0; i < this.count; i++) {
      const image = this.found[i]!;
      let fixes = true;
      for (let p = 0; p < d && fixes; p++) fixes = image[placed[p]!] === placed[p];
      if (fixes) for (let v = 0; v < this.n; v++) merge(parent, v, image[v]!);
    }
    const roots = new Set<number>();
    return { toEarlier: (v) => roots.has(find(parent, v)), add: (v) => roots.add(find(parent, v)) };
  }
}

function find(parent: Int32Array, v: number): number {
  let root = v;
  while (parent[root] !== root) root = parent[root]!;
  return root;
}

function merge(parent: Int32Array, a: number, b: number): void {
  const x = find(parent, a);
  const y = find(parent, b);
  if (x !== y) parent[Math.max(x, y)] = Math.min(x, y);
}

/** Automorphisms found so far, and the orbits they make. */
export class Orbits {
  readonly found: Int32Array[] = [];
  private readonly parent: Int32Array;

  constructor(private readonly n: number) {
    this.parent = new Int32Array(n);
  }

  clear(): void {
    this.found.length = 0;
    for (let v = 0; v < this.n; v++) this.parent[v] = v;
  }

  add(image: Int32Array): void {
    this.found.push(image);
    for (let v = 0; v < this.n; v++) if (image[v] !== v) merge(this.parent, v, image[v]!);
  }

  joined(a: number, b: number): boolean {
    return find(this.parent, a) === find(this.parent, b);
  }

  /** Orbits of the automorphisms that fix the nodes placed at 0…d−1; seen(v): an equivalent node was asked about before. */
  fixing(placed: Int32Array, d: number): { seen(v: number): boolean } {
    const parent = Int32Array.from({ length: this.n }, (_, v) => v);
    for (const image of this.found) {
      let fixes = true;
      for (let p = 0; p < d && fixes; p++) fixes = image[placed[p]!] === placed[p];
      if (fixes) for (let v = 0; v < this.n; v++) merge(parent, v, image[v]!);
    }
    const roots = new Set<number>();
    return {
      seen: (v) => {
        const root = find(parent, v);
        if (roots.has(root)) return true;
        roots.add(root);
        return false;
      },
    };
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

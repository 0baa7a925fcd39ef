/**
 * Canonical labelling and automorphisms of a small edge-coloured graph by partition refinement and individualisation.
 *
 * The graph is a matrix of small integer codes (code[i·n + j] describes everything between nodes i and j, in the direction
 * i → j; the diagonal describes node i itself). Nodes come in an ordered partition into colour cells; labellings keep it.
 * Shares nothing with the enumeration of diagrams, so that factors can be checked by a second route.
 *
 * @see B. D. McKay, Congressus Numerantium 30 (1981) 45 (refinement, pruning by automorphisms found).
 */

/** cells[c]: nodes of colour c, in canonical order of colours. */
export type Cells = readonly (readonly number[])[];

export interface Labelling {
  /** order[p]: the node at canonical place p. */
  readonly order: readonly number[];
  /** Codes of the relabelled matrix, row by row: equal exactly for isomorphic inputs with equal cells. */
  readonly certificate: readonly number[];
  /** Generators of the automorphism group: generator[i] is the image of node i. */
  readonly generators: readonly (readonly number[])[];
  readonly groupOrder: bigint;
}

/** Splits cells until every two nodes of a cell see every cell alike. Deterministic and independent of node numbers. */
function refine(n: number, code: ArrayLike<number>, cells: number[][]): number[][] {
  let current = cells;
  for (;;) {
    const next: number[][] = [];
    for (const cell of current) {
      if (cell.length === 1) {
        next.push(cell);
        continue;
      }
      const bySignature = new Map<string, number[]>();
      for (const node of cell) {
        const parts = [`${code[node * n + node]!}`];
        for (const other of current)
          parts.push(
            other
              .map((to) => code[node * n + to]!)
              .sort((a, b) => a - b)
              .join(),
          );
        const signature = parts.join(';');
        const same = bySignature.get(signature);
        if (same) same.push(node);
        else bySignature.set(signature, [node]);
      }
      for (const key of [...bySignature.keys()].sort()) next.push(bySignature.get(key)!);
    }
    if (next.length === current.length) return next;
    current = next;
  }
}

function compareLists(a: readonly number[], b: readonly number[]): number {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return 0;
}

class Search {
  best: number[] | null = null;
  bestOrder: number[] = [];
  first: number[] | null = null;
  firstOrder: number[] = [];
  readonly generators: number[][] = [];
  groupOrder = 1n;

  constructor(
    private readonly n: number,
    private readonly code: ArrayLike<number>,
  ) {}

  private certificate(order: readonly number[]): number[] {
    const out: number[] = [];
    for (const i of order) for (const j of order) out.push(this.code[i * this.n + j]!);
    return out;
  }

  private addAutomorphism(from: readonly number[], to: readonly number[]): void {
    const image = new Array<number>(this.n);
    from.forEach((node, place) => {
      image[node] = to[place]!;
    });
    this.generators.push(image);
  }

  /** Orbits (as least members) of the found automorphisms that fix every node of the prefix. */
  private orbits(prefix: readonly number[]): number[] {
    const parent = Array.from({ length: this.n }, (_, node) => node);
    const find = (node: number): number => {
      let root = node;
      while (parent[root] !== root) root = parent[root]!;
      return root;
    };
    for (const image of this.generators) {
      if (!prefix.every((node) => image[node] === node)) continue;
      image.forEach((to, from) => {
        const [a, b] = [find(from), find(to)].sort((x, y) => x - y) as [number, number];
        parent[b] = a;
      });
    }
    return parent.map((_, node) => find(node));
  }

  /** @returns the depth to go back to: a leaf equivalent to an earlier one makes its whole branch superfluous. */
  visit(cells: number[][], prefix: number[], shared: number): number {
    const refined = refine(this.n, this.code, cells);
    const at = refined.findIndex((cell) => cell.length > 1);
    if (at < 0)
      return this.leaf(
        refined.map((cell) => cell[0]!),
        prefix.length,
        shared,
      );
    const onFirst = this.first === null;
    const tried: number[] = [];
    for (const node of [...refined[at]!].sort((a, b) => a - b)) {
      const orbit = this.orbits(prefix);
      if (tried.some((other) => orbit[other] === orbit[node])) continue;
      tried.push(node);
      const rest = refined[at]!.filter((other) => other !== node);
      const child = [...refined.slice(0, at), [node], rest, ...refined.slice(at + 1)];
      const back = this.visit(child, [...prefix, node], onFirst ? prefix.length : shared);
      if (back < prefix.length) return back;
    }
    if (onFirst) {
      const orbit = this.orbits(prefix);
      const root = orbit[tried[0]!];
      this.groupOrder *= BigInt(refined[at]!.filter((node) => orbit[node] === root).length);
    }
    return prefix.length;
  }

  private leaf(order: number[], depth: number, shared: number): number {
    const certificate = this.certificate(order);
    if (this.first === null) {
      this.first = certificate;
      this.firstOrder = order;
    } else if (compareLists(certificate, this.first) === 0) {
      this.addAutomorphism(this.firstOrder, order);
      return shared;
    }
    if (this.best === null || compareLists(certificate, this.best) < 0) {
      this.best = certificate;
      this.bestOrder = order;
    } else if (this.best !== this.first && compareLists(certificate, this.best) === 0)
      this.addAutomorphism(this.bestOrder, order);
    return depth;
  }
}

/** Canonical labelling of the graph; see the file's head. Worst case exponential; diagrams have small groups or simple ones. */
export function label(n: number, code: ArrayLike<number>, cells: Cells): Labelling {
  const search = new Search(n, code);
  search.visit(
    cells.filter((cell) => cell.length > 0).map((cell) => [...cell]),
    [],
    0,
  );
  return {
    order: search.bestOrder,
    certificate: search.best!,
    generators: search.generators,
    groupOrder: search.groupOrder,
  };
}

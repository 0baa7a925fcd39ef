import type { Diagram } from '../graph/diagram.ts';

/** A biconnected piece: its vertices and the lines between them (indices into diagram.lines). A bridge is a block of two vertices. */
export interface Block {
  readonly vertices: readonly number[];
  readonly lines: readonly number[];
}

/** One connected component of a diagram's vertices, taken apart. */
export interface Component {
  readonly vertices: readonly number[];
  readonly blocks: readonly Block[];
  /** blocksAt.get(v): indices of the blocks that hold v. */
  readonly blocksAt: ReadonlyMap<number, readonly number[]>;
}

/**
 * Components and their biconnected blocks; self-contractions belong to no block.
 * @see J. Hopcroft, R. E. Tarjan, Commun. ACM 16 (1973) 372. O(V + I).
 */
export function componentsOf({ kinds, lines }: Diagram): Component[] {
  const incident: [number, number][][] = kinds.map(() => []);
  lines.forEach(({ from, to }, line) => {
    if (from === to) return;
    incident[from]!.push([line, to]);
    incident[to]!.push([line, from]);
  });
  const depth = new Array<number>(kinds.length).fill(-1);
  const low = new Array<number>(kinds.length).fill(0);
  const stack: number[] = [];
  let vertices: number[] = [];
  let blocks: Block[] = [];
  const close = (line: number): void => {
    const members = stack.splice(stack.indexOf(line));
    const ends = new Set(members.flatMap((member) => [lines[member]!.from, lines[member]!.to]));
    blocks.push({ vertices: [...ends].sort((a, b) => a - b), lines: members.sort((a, b) => a - b) });
  };
  const visit = (v: number, via: number, level: number): void => {
    depth[v] = level;
    low[v] = level;
    vertices.push(v);
    for (const [line, w] of incident[v]!) {
      if (line === via) continue;
      if (depth[w]! >= 0) {
        if (depth[w]! < level) stack.push(line);
        low[v] = Math.min(low[v]!, depth[w]!);
        continue;
      }
      stack.push(line);
      visit(w, line, level + 1);
      low[v] = Math.min(low[v]!, low[w]!);
      if (low[w]! >= level) close(line);
    }
  };
  const components: Component[] = [];
  kinds.forEach((_, start) => {
    if (depth[start]! >= 0) return;
    vertices = [];
    blocks = [];
    visit(start, -1, 0);
    const at = new Map<number, number[]>(vertices.map((v) => [v, []]));
    blocks.forEach((block, index) => {
      for (const v of block.vertices) at.get(v)!.push(index);
    });
    components.push({ vertices: vertices.sort((a, b) => a - b), blocks, blocksAt: at });
  });
  return components;
}

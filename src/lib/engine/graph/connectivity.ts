import type { Diagram } from './diagram.ts';

/**
 * A diagram as a plain multigraph for questions of connectivity: nodes 0…V−1 are vertices, V…V+E−1 external points.
 * Edges 0…I−1 are the internal lines in order, then one edge for each leg (once for a leg joined to a leg).
 */
export interface Network {
  readonly nodes: number;
  readonly vertices: number;
  readonly internal: number;
  readonly ends: readonly (readonly [number, number])[];
  /** incident[n]: [edge, other node], a self-contraction once. */
  readonly incident: readonly (readonly (readonly [number, number])[])[];
}

/** O(V + E + I). */
export function networkOf(diagram: Diagram): Network {
  const vertices = diagram.kinds.length;
  const nodes = vertices + diagram.legs.length;
  const ends: [number, number][] = diagram.lines.map(({ from, to }) => [from, to]);
  diagram.legs.forEach((at, leg) => {
    if (at >= 0) ends.push([at, vertices + leg]);
    else if (-1 - at > leg) ends.push([vertices + leg, vertices - 1 - at]);
  });
  const incident: [number, number][][] = Array.from({ length: nodes }, () => []);
  ends.forEach(([a, b], edge) => {
    incident[a]!.push([edge, b]);
    if (a !== b) incident[b]!.push([edge, a]);
  });
  return { nodes, vertices, internal: diagram.lines.length, ends, incident };
}

/** Component number of every node when edge `without` is cut and node `hole` is taken out (its number is −1). */
export function componentsOf(network: Network, without = -1, hole = -1): { of: Int32Array; count: number } {
  const of = new Int32Array(network.nodes).fill(-1);
  let count = 0;
  for (let start = 0; start < network.nodes; start++) {
    if (of[start] !== -1 || start === hole) continue;
    const stack = [start];
    of[start] = count;
    while (stack.length > 0) {
      for (const [edge, other] of network.incident[stack.pop()!]!) {
        if (edge === without || other === hole || of[other] !== -1) continue;
        of[other] = count;
        stack.push(other);
      }
    }
    count++;
  }
  return { of, count };
}

/**
 * Bridges (edges whose cut disconnects) and cut vertices by one depth-first search.
 * @see R. E. Tarjan, SIAM J. Comput. 1 (1972) 146 (common practice). O(V + E + I).
 */
export function cutsOf(network: Network): { bridges: number[]; cutNodes: number[] } {
  const depth = new Int32Array(network.nodes).fill(-1);
  const low = new Int32Array(network.nodes);
  const bridges: number[] = [];
  const cutNodes = new Set<number>();
  const visit = (node: number, via: number, level: number): void => {
    depth[node] = level;
    low[node] = level;
    let children = 0;
    for (const [edge, other] of network.incident[node]!) {
      if (edge === via || other === node) continue;
      if (depth[other]! >= 0) {
        low[node] = Math.min(low[node]!, depth[other]!);
        continue;
      }
      children++;
      visit(other, edge, level + 1);
      low[node] = Math.min(low[node]!, low[other]!);
      if (low[other]! > level) bridges.push(edge);
      if (via !== -1 && low[other]! >= level) cutNodes.add(node);
    }
    if (via === -1 && children > 1) cutNodes.add(node);
  };
  for (let node = 0; node < network.nodes; node++) if (depth[node] === -1) visit(node, -1, 0);
  return { bridges: bridges.sort((a, b) => a - b), cutNodes: [...cutNodes].sort((a, b) => a - b) };
}

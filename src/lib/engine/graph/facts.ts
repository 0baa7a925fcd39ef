import { componentsOf, cutsOf, type Network, networkOf } from './connectivity.ts';
import type { Diagram } from './diagram.ts';

/** What the contract states of every diagram (definitions: conventions page, physics "what to keep", "what to drop"). */
export interface Facts {
  /** L = I − V + C, C the components that have a vertex; lines that end on an external point do not count. */
  readonly loops: number;
  /** One component, and not empty. */
  readonly connected: boolean;
  /** Every component has an external point. */
  readonly noVacuumPart: boolean;
  /** Connected, has a vertex, and no internal line is a bridge (legs amputated). */
  readonly onePI: boolean;
  readonly hasSelfContraction: boolean;
  /** An internal line whose cut leaves a piece without legs; in a component without legs: any bridge. */
  readonly hasTadpole: boolean;
  /** A piece with a loop and without legs hangs on the rest at one vertex or line; in a component without legs: any bridge, self-contraction, cut vertex. */
  readonly isScaleless: boolean;
}

/** What makes a diagram fall under a filter: an internal line (index into `lines`) or the vertex a piece hangs on. */
export interface Culprit {
  readonly line: number | null;
  readonly vertex: number | null;
}

/** Loop number of the subgraph on the nodes that `inside` marks; edges to external points carry no loop. */
function cycleRank(network: Network, inside: (node: number) => boolean, without: number): number {
  let nodes = 0;
  let edges = 0;
  const seen = new Uint8Array(network.nodes);
  let pieces = 0;
  for (let start = 0; start < network.nodes; start++) {
    if (!inside(start) || seen[start]) continue;
    pieces++;
    const stack = [start];
    seen[start] = 1;
    while (stack.length > 0) {
      const node = stack.pop()!;
      nodes++;
      for (const [edge, other] of network.incident[node]!) {
        if (edge === without || !inside(other)) continue;
        if (other === node) edges += 2;
        else edges++;
        if (!seen[other]) {
          seen[other] = 1;
          stack.push(other);
        }
      }
    }
  }
  return edges / 2 - nodes + pieces;
}

const isExternal = (network: Network, node: number): boolean => node >= network.vertices;

function componentsWithLegs(network: Network, of: Int32Array, count: number): Uint8Array {
  const legged = new Uint8Array(count);
  for (let node = network.vertices; node < network.nodes; node++) if (of[node]! >= 0) legged[of[node]!] = 1;
  return legged;
}

/** The first self-contraction, or null. */
export function selfContraction({ lines }: Diagram): Culprit | null {
  const line = lines.findIndex(({ from, to }) => from === to);
  return line < 0 ? null : { line, vertex: lines[line]!.from };
}

/** The first internal bridge that makes the diagram fall under "tadpoles" (with `loops`: under "scaleless"), or null. */
function bridgeTadpole(
  network: Network,
  bridges: readonly number[],
  whole: Int32Array,
  legged: Uint8Array,
  loops: boolean,
): Culprit | null {
  for (const line of bridges) {
    if (line >= network.internal) continue;
    if (!legged[whole[network.ends[line]![0]]!]) return { line, vertex: null };
    const { of, count } = componentsOf(network, line);
    const nowLegged = componentsWithLegs(network, of, count);
    for (const end of network.ends[line]!) {
      const piece = of[end]!;
      if (nowLegged[piece]) continue;
      if (!loops || cycleRank(network, (node) => of[node] === piece, line) > 0) return { line, vertex: null };
    }
  }
  return null;
}

/** The first cut vertex on which a piece with a loop and without legs hangs; in a component without legs any cut vertex. */
function hangingPiece(
  network: Network,
  cutNodes: readonly number[],
  whole: Int32Array,
  legged: Uint8Array,
): Culprit | null {
  for (const vertex of cutNodes) {
    if (isExternal(network, vertex)) continue;
    if (!legged[whole[vertex]!]) return { line: null, vertex };
    const { of, count } = componentsOf(network, -1, vertex);
    const nowLegged = componentsWithLegs(network, of, count);
    const pieces = new Set(
      network.incident[vertex]!.filter(([, other]) => other !== vertex).map(([, other]) => of[other]!),
    );
    for (const piece of pieces) {
      if (nowLegged[piece]) continue;
      const links = network.incident[vertex]!.filter(([, other]) => other !== vertex && of[other] === piece).length;
      if (links > 1 || cycleRank(network, (node) => of[node] === piece, -1) > 0) return { line: null, vertex };
    }
  }
  return null;
}

/** The culprits of all filters, and the facts. O((V + I)²) at worst, O(V + I) for most diagrams. */
export function inspect(diagram: Diagram): {
  facts: Facts;
  tadpole: Culprit | null;
  scaleless: Culprit | null;
  bridge: number | null;
} {
  const network = networkOf(diagram);
  const { bridges, cutNodes } = cutsOf(network);
  const { of, count } = componentsOf(network);
  const legged = componentsWithLegs(network, of, count);
  const withVertex = new Set(Array.from({ length: network.vertices }, (_, v) => of[v]!));
  const lineToLeg = diagram.lines.length - network.vertices + withVertex.size;
  const self = selfContraction(diagram);
  const bridge = bridges.find((edge) => edge < network.internal) ?? null;
  const tadpole = bridgeTadpole(network, bridges, of, legged, false);
  const scaleless =
    self ?? bridgeTadpole(network, bridges, of, legged, true) ?? hangingPiece(network, cutNodes, of, legged);
  const connected = count === 1;
  return {
    facts: {
      loops: lineToLeg,
      connected,
      noVacuumPart: legged.every((mark) => mark === 1),
      onePI: connected && network.vertices > 0 && bridge === null,
      hasSelfContraction: self !== null,
      hasTadpole: tadpole !== null,
      isScaleless: scaleless !== null,
    },
    tadpole,
    scaleless,
    bridge,
  };
}

export const facts = (diagram: Diagram): Facts => inspect(diagram).facts;

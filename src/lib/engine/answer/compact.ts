import type { Diagram, Line } from '../graph/diagram.ts';

/**
 * A diagram of a stored body: integers in the canonical request's numbering, no names. One body serves every model that is
 * the same up to renaming and reordering.
 */
export interface CompactDiagram {
  /** 1-based place in the canonical list. */
  readonly position: number;
  /** JSON: [kinds, legs, [from, to, type, …]]. */
  readonly body: string;
  /** Canonical label without names. */
  readonly label: string;
  readonly loops: number;
  readonly symmetryFactor: string;
  readonly weight: string;
  readonly pairings: string;
  /** Vertices of each kind, comma-separated: diagrams with one content share an order. */
  readonly order: string;
  /** Label of the shape: equal up to exchange of legs of one field. */
  readonly shape: string;
  /** Sum of FLAGS. */
  readonly flags: number;
}

export const FLAGS = { connected: 1, onePI: 2, selfContraction: 4, tadpole: 8 } as const;

export function packBody({ kinds, legs, lines }: Diagram): string {
  return JSON.stringify([kinds, legs, lines.flatMap(({ from, to, type }) => [from, to, type])]);
}

export function unpackBody(body: string): Diagram {
  const [kinds, legs, flat] = JSON.parse(body) as [number[], number[], number[]];
  const lines: Line[] = [];
  for (let i = 0; i < flat.length; i += 3) lines.push({ from: flat[i]!, to: flat[i + 1]!, type: flat[i + 2]! });
  return { kinds, legs, lines };
}

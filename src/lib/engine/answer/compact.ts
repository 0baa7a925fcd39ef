import type { Numbering } from '../graph/canonical.ts';
import type { Diagram, Line } from '../graph/diagram.ts';
import type { Facts } from '../graph/facts.ts';

/**
 * A diagram of a stored body: integers in the canonical request's numbering, no names. One body serves every model that is
 * the same up to renaming and reordering.
 */
export interface CompactDiagram {
  /** 1-based place in the canonical list. */
  readonly position: number;
  /** JSON: [kinds, legs, [from, to, type, …], numberings of the label]. */
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
  /** Layout of the drawing (drawing/packed), or null where it was not kept. */
  readonly picture: string | null;
}

export const FLAGS = { connected: 1, onePI: 2, selfContraction: 4, tadpole: 8 } as const;

/** The facts of a diagram as a sum of FLAGS. */
export function factsFlags(facts: Facts): number {
  return (
    (facts.connected ? FLAGS.connected : 0) +
    (facts.onePI ? FLAGS.onePI : 0) +
    (facts.hasSelfContraction ? FLAGS.selfContraction : 0) +
    (facts.hasTadpole ? FLAGS.tadpole : 0)
  );
}

type Packed = [number[], number[], number[], [number[], number[]][]];

export function packBody({ kinds, legs, lines }: Diagram, numberings: readonly Numbering[]): string {
  const flat = lines.flatMap(({ from, to, type }) => [from, to, type]);
  return JSON.stringify([kinds, legs, flat, numberings.map((numbering) => [numbering.fields, numbering.kinds])]);
}

/** The diagram of a stored body, and the numberings that its names are written in (graph/canonical). */
export function unpackBody(body: string): Diagram & { readonly numberings: readonly Numbering[] } {
  const [kinds, legs, flat, numberings] = JSON.parse(body) as Packed;
  const lines: Line[] = [];
  for (let i = 0; i < flat.length; i += 3) lines.push({ from: flat[i]!, to: flat[i + 1]!, type: flat[i + 2]! });
  return { kinds, legs, lines, numberings: numberings.map(([fields, order]) => ({ fields, kinds: order })) };
}

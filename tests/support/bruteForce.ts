import { factorial } from '#engine/exact/combinatorics.ts';
import type { CountedDiagram, Diagram } from '#engine/graph/diagram.ts';
import type { Theory } from '#engine/graph/theory.ts';

/**
 * Diagrams of a small case from all its contractions, one by one: contractions are sorted into classes by trying every
 * relabelling of the vertices, and the symmetry factor follows from the size of the class. Shares only types with the engine.
 */

/** A join of two nodes: a line with its type as in Diagram, an external leg included. Nodes: points 0…E−1, then vertices. */
type Join = readonly [from: number, to: number, type: number];

interface Nodes {
  readonly external: number;
  /** left[node][h]: half-lines of type h. */
  readonly halfLines: readonly (readonly number[])[];
  readonly kinds: readonly number[];
}

function nodesOf(theory: Theory, legs: readonly number[], content: readonly number[]): Nodes {
  const kinds = content.flatMap((n, kind) => new Array<number>(n).fill(kind));
  const points = legs.map((type) => theory.partner.map((_, h) => (h === type ? 1 : 0)));
  return { external: legs.length, halfLines: [...points, ...kinds.map((kind) => [...theory.kinds[kind]!])], kinds };
}

const written = (joins: readonly Join[]): string =>
  joins
    .map((join) => join.join('.'))
    .sort()
    .join(' ');

function orient({ partner }: Theory, a: number, type: number, b: number): Join {
  if (partner[type] === type) return a <= b ? [a, b, type] : [b, a, type];
  return type < partner[type]! ? [b, a, type] : [a, b, partner[type]!];
}

/** Number of contractions for every way to join the labelled nodes. */
function contractions(theory: Theory, nodes: Nodes): Map<string, { joins: Join[]; count: bigint }> {
  const left = nodes.halfLines.map((counts) => [...counts]);
  const found = new Map<string, { joins: Join[]; count: bigint }>();
  const joins: Join[] = [];
  const contract = (count: bigint): void => {
    const node = left.findIndex((counts) => counts.some((c) => c > 0));
    if (node < 0) {
      const key = written(joins);
      const known = found.get(key);
      if (known) known.count += count;
      else found.set(key, { joins: [...joins], count });
      return;
    }
    const type = left[node]!.findIndex((c) => c > 0);
    const other = theory.partner[type]!;
    left[node]![type]!--;
    left.forEach((counts, to) => {
      const ways = counts[other]!;
      if (ways === 0) return;
      counts[other]!--;
      joins.push(orient(theory, node, type, to));
      contract(count * BigInt(ways));
      joins.pop();
      counts[other]!++;
    });
    left[node]![type]!++;
  };
  contract(1n);
  return found;
}

/** Every renumbering of nodes that exchanges only vertices of one kind. */
function renumberings({ external, kinds }: Nodes): number[][] {
  const out: number[][] = [];
  const image = Array.from({ length: external }, (_, point) => point);
  const place = (v: number): void => {
    if (v === kinds.length) {
      out.push([...image]);
      return;
    }
    kinds.forEach((kind, w) => {
      if (kind !== kinds[v] || image.includes(external + w)) return;
      image.push(external + w);
      place(v + 1);
      image.pop();
    });
  };
  place(0);
  return out;
}

function leastForm(theory: Theory, joins: readonly Join[], images: readonly number[][]): string {
  let least: string | null = null;
  for (const image of images) {
    const moved = joins.map(([from, to, type]): Join => {
      const [a, b] = [image[from]!, image[to]!];
      return theory.partner[type] === type && a > b ? [b, a, type] : [a, b, type];
    });
    const text = written(moved);
    if (least === null || text < least) least = text;
  }
  return least!;
}

/** Connected: one component in all; noVacuum: every component has an external point. */
function admitted(nodes: Nodes, joins: readonly Join[], components: 'any' | 'noVacuum' | 'connected'): boolean {
  if (components === 'any') return true;
  const label = nodes.halfLines.map((_, node) => node);
  for (const _ of label)
    for (const [a, b] of joins) {
      const low = Math.min(label[a]!, label[b]!);
      label[a] = low;
      label[b] = low;
    }
  if (components === 'connected') return new Set(label).size === 1;
  return label.every((low) => low < nodes.external);
}

/**
 * Classes of contractions: least form → symmetry factor S = ∏ n_kind! · ∏ k_field! / contractions of the class.
 * Cost grows as (half-lines)!! · ∏ n_kind!: for up to about 16 half-lines and 5 vertices of one kind.
 */
export function classesByBruteForce(
  theory: Theory,
  legs: readonly number[],
  content: readonly number[],
  components: 'any' | 'noVacuum' | 'connected',
): Map<string, bigint> {
  const nodes = nodesOf(theory, legs, content);
  const images = renumberings(nodes);
  const sizes = new Map<string, bigint>();
  for (const { joins, count } of contractions(theory, nodes).values()) {
    if (!admitted(nodes, joins, components)) continue;
    const form = leastForm(theory, joins, images);
    sizes.set(form, (sizes.get(form) ?? 0n) + count);
  }
  const exchanges =
    content.reduce((product, n) => product * factorial(n), 1n) *
    nodes.halfLines.flat().reduce((product, n) => product * factorial(n), 1n);
  return new Map([...sizes].map(([form, size]) => [form, exchanges / size]));
}

/** The form under which classesByBruteForce knows a diagram. */
export function formOf(theory: Theory, legs: readonly number[], content: readonly number[], diagram: Diagram): string {
  const nodes = nodesOf(theory, legs, content);
  const joins = diagram.lines.map(({ from, to, type }): Join => [from + nodes.external, to + nodes.external, type]);
  diagram.legs.forEach((at, leg) => {
    if (at >= 0) joins.push(orient(theory, leg, legs[leg]!, at + nodes.external));
    else if (-1 - at > leg) joins.push(orient(theory, leg, legs[leg]!, -1 - at));
  });
  return leastForm(theory, joins, renumberings(nodes));
}

/** A list in the form of classesByBruteForce; a class met twice is marked by a factor of 0, which no diagram has. */
export function classesOfList(
  theory: Theory,
  legs: readonly number[],
  content: readonly number[],
  list: Iterable<CountedDiagram>,
): Map<string, bigint> {
  const out = new Map<string, bigint>();
  for (const diagram of list) {
    const form = formOf(theory, legs, content, diagram);
    out.set(form, out.has(form) ? 0n : diagram.symmetryFactor);
  }
  return out;
}

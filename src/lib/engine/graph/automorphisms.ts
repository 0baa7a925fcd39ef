import { factorial } from '../exact/combinatorics.ts';
import type { Diagram } from './diagram.ts';
import { codesOf, joinsOf } from './matrix.ts';
import { label } from './search.ts';
import type { Theory } from './theory.ts';

/** One generator of the automorphism group: images of vertices and of lines (indices into `lines`). */
export interface Generator {
  readonly vertices: readonly number[];
  readonly lines: readonly number[];
  /** vertices: exchanges vertices; parallel: exchanges equal lines; ends: swaps the ends of a self-contraction. */
  readonly kind: 'vertices' | 'parallel' | 'ends';
}

/** The lines that join the same two vertices in the same way; `factor` is what their exchanges contribute to S. */
export interface Bundle {
  readonly from: number;
  readonly to: number;
  readonly type: number;
  readonly lines: readonly number[];
  /** Ends of a real field's self-contraction may be swapped. */
  readonly swappable: boolean;
  readonly factor: bigint;
}

export interface Automorphisms {
  /** S = vertexOrder · ∏ bundle factors. */
  readonly order: bigint;
  /** Order of the group that permutes vertices. */
  readonly vertexOrder: bigint;
  readonly bundles: readonly Bundle[];
  readonly generators: readonly Generator[];
}

export function bundlesOf({ lines }: Diagram, theory: Theory): Bundle[] {
  const groups = new Map<string, number[]>();
  lines.forEach(({ from, to, type }, index) => {
    const real = theory.partner[type] === type;
    const [a, b] = real && from > to ? [to, from] : [from, to];
    const key = `${a},${b},${type}`;
    groups.set(key, [...(groups.get(key) ?? []), index]);
  });
  return [...groups.entries()].map(([key, members]) => {
    const [from, to, type] = key.split(',').map(Number) as [number, number, number];
    const swappable = from === to && theory.partner[type] === type;
    const factor = factorial(members.length) * (swappable ? 2n ** BigInt(members.length) : 1n);
    return { from, to, type, lines: members, swappable, factor };
  });
}

const identity = (n: number): number[] => Array.from({ length: n }, (_, i) => i);

/** How the lines follow a permutation of the vertices: the k-th line of a bundle goes to the k-th of its image. */
function induced(image: readonly number[], bundles: readonly Bundle[], theory: Theory, count: number): number[] {
  const key = (from: number, to: number, type: number): string =>
    theory.partner[type] === type && from > to ? `${to},${from},${type}` : `${from},${to},${type}`;
  const at = new Map(bundles.map((bundle) => [key(bundle.from, bundle.to, bundle.type), bundle]));
  const out = identity(count);
  for (const bundle of bundles) {
    const target = at.get(key(image[bundle.from]!, image[bundle.to]!, bundle.type))!;
    bundle.lines.forEach((line, i) => {
      out[line] = target.lines[i]!;
    });
  }
  return out;
}

/** Exchanges of equal lines and ends: neighbours suffice to generate them all. */
function lineGenerators(diagram: Diagram, bundles: readonly Bundle[]): Generator[] {
  const vertices = identity(diagram.kinds.length);
  const generators: Generator[] = [];
  for (const { lines, swappable } of bundles) {
    for (let i = 0; i + 1 < lines.length; i++) {
      const image = identity(diagram.lines.length);
      [image[lines[i]!], image[lines[i + 1]!]] = [lines[i + 1]!, lines[i]!];
      generators.push({ vertices, lines: image, kind: 'parallel' });
    }
    // Swapping the ends of one self-contraction and exchanging it with the others swaps them all.
    if (swappable) generators.push({ vertices, lines: identity(diagram.lines.length), kind: 'ends' });
  }
  return generators;
}

/**
 * Order and generators of the automorphism group of a diagram; the diagram enters the expansion with weight 1/S.
 *
 * Automorphisms permute vertices of one kind and lines, preserve incidence, field and direction, and fix every external
 * point. S = |vertex automorphisms| · ∏ m! over bundles of m equal lines · 2 for each self-contraction of a real field.
 * The vertex part comes from a refinement search that shares nothing with the enumeration.
 *
 * @example sunset 6, figure-eight 8, φ³ theta graph 12
 * @see H. Kleinert, A. Pelster, B. Kastening, M. Bachmann, Phys. Rev. E 62 (2000) 1537.
 */
export function automorphisms(diagram: Diagram, theory: Theory, legTypes: readonly number[]): Automorphisms {
  const joins = joinsOf(diagram, theory, legTypes);
  const { code } = codesOf(joins, identity(theory.partner.length));
  const legCells = legTypes.map((_, leg) => [leg]);
  const kindCells = theory.kinds.map((_, kind) =>
    diagram.kinds.flatMap((k, v) => (k === kind ? [joins.external + v] : [])),
  );
  const bundles = bundlesOf(diagram, theory);
  const found = joins.n === 0 ? { generators: [], groupOrder: 1n } : label(joins.n, code, [...legCells, ...kindCells]);
  const ofVertices = found.generators.map((image): Generator => {
    const vertices = image.slice(joins.external).map((node) => node - joins.external);
    return { vertices, lines: induced(vertices, bundles, theory, diagram.lines.length), kind: 'vertices' };
  });
  return {
    order: bundles.reduce((product, { factor }) => product * factor, found.groupOrder),
    vertexOrder: found.groupOrder,
    bundles,
    generators: [...ofVertices, ...lineGenerators(diagram, bundles)],
  };
}

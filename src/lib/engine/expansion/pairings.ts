import { factorial } from '../exact/combinatorics.ts';
import type { CountedDiagram } from '../graph/diagram.ts';
import type { Content, Theory } from '../graph/theory.ts';

/** ∏ n_kind! · ∏_vertices ∏ k_field!: the number of ways to exchange equal vertices and equal half-lines of a content. */
export function exchanges(theory: Theory, content: Content): bigint {
  return content.reduce((product, n, kind) => {
    const vertex = theory.kinds[kind]!.reduce((part, count) => part * factorial(count), 1n);
    return product * factorial(n) * vertex ** BigInt(n);
  }, 1n);
}

/** Vertex content of a diagram. */
export function contentOf(diagram: { readonly kinds: readonly number[] }, theory: Theory): number[] {
  const content = theory.kinds.map(() => 0);
  for (const kind of diagram.kinds) content[kind]!++;
  return content;
}

/**
 * The number of contractions in the class of a diagram: exchanges / S.
 * @example φ⁴ sunset with two legs: 2!·4!²/6 = 192
 */
export const pairingsOf = (theory: Theory, diagram: CountedDiagram): bigint =>
  exchanges(theory, contentOf(diagram, theory)) / diagram.symmetryFactor;

import type { Diagram } from './diagram.ts';
import type { Theory } from './theory.ts';

/**
 * A diagram as a matrix: nodes 0…E−1 are external points, then the vertices. joins[i·n + j] lists, by half-line type, how
 * many lines join a half-line of that type at node i with its partner type at node j; a self-contraction of a real field
 * counts once, one of a complex field once under φ and once under φ*.
 */
export interface Joins {
  readonly n: number;
  readonly external: number;
  readonly joins: readonly Uint8Array[];
}

/** O(n² · types). `legTypes[k]` is the half-line type of external point k. */
export function joinsOf(diagram: Diagram, theory: Theory, legTypes: readonly number[]): Joins {
  const external = diagram.legs.length;
  const n = external + diagram.kinds.length;
  const joins = Array.from({ length: n * n }, () => new Uint8Array(theory.partner.length));
  const join = (i: number, j: number, type: number): void => {
    const partner = theory.partner[type]!;
    joins[i * n + j]![type]!++;
    if (i !== j || partner !== type) joins[j * n + i]![partner]!++;
  };
  // `type` is the half-line at the `to` end.
  for (const { from, to, type } of diagram.lines) join(external + to, external + from, type);
  diagram.legs.forEach((at, leg) => {
    if (at >= 0) join(leg, external + at, legTypes[leg]!);
    else if (-1 - at > leg) join(leg, -1 - at, legTypes[leg]!);
  });
  return { n, external, joins };
}

/**
 * Small integer codes of the matrix entries, equal exactly for equal entries, and the dictionary that says what they mean.
 * Types are read in the order given, so codes do not depend on how the theory numbers them.
 */
export function codesOf({ n, joins }: Joins, types: readonly number[]): { code: Uint16Array; dictionary: string } {
  const words = joins.map((counts) => types.map((type) => counts[type]!).join());
  const distinct = [...new Set(words)].sort();
  const rank = new Map(distinct.map((word, index) => [word, index]));
  return { code: Uint16Array.from(words, (word) => rank.get(word)!), dictionary: `${n}:${distinct.join(';')}` };
}

import type { Content, Theory } from '../../graph/theory.ts';
import { type JoinTable, joinTable } from './joins.ts';

/** Which components a diagram may have: any; none without an external point; one in all. */
export type Components = 'any' | 'noVacuum' | 'connected';

/**
 * What the parts of the search share: the nodes (external points first, then vertices kind by kind), the matrix of joins, and
 * the partition of the columns that the finished rows make.
 */
export interface Frame {
  readonly n: number;
  readonly external: number;
  readonly table: JoinTable;
  readonly kinds: readonly number[];
  /** matrix[i·n + j]: join code of i and j seen from i; on the diagonal the code of the self-join. */
  readonly matrix: Int32Array;
  /** runEnd[r·n + j]: end of the run of columns around j ≥ r that are alike in colour and in all rows before r. */
  readonly runEnd: Int32Array;
}

/** Half-line types that occur, renumbered without gaps: used[h] is the type of the theory. */
function usedTypes(theory: Theory, nodes: readonly (readonly number[])[]): number[] {
  const occurs = theory.partner.map((_, h) => nodes.some((counts) => counts[h]! > 0));
  return theory.partner.flatMap((p, h) => (occurs[h] || occurs[p] ? [h] : []));
}

/** A frame with an empty matrix; used: the theory's half-line type behind each type of the table. */
export function newFrame(theory: Theory, legs: readonly number[], content: Content): Frame & { used: number[] } {
  const kinds = content.flatMap((count, kind) => new Array<number>(count).fill(kind));
  const points = legs.map((type) => theory.partner.map((_, h) => (h === type ? 1 : 0)));
  const nodes = [...points, ...kinds.map((kind) => theory.kinds[kind]!)];
  const used = usedTypes(theory, nodes);
  const small: Theory = { partner: used.map((h) => used.indexOf(theory.partner[h]!)), kinds: [] };
  const n = nodes.length;
  const external = legs.length;
  const runEnd = new Int32Array((n + 1) * n);
  for (let j = n - 1; j >= 0; j--) {
    const alike = j >= external && j + 1 < n && kinds[j - external] === kinds[j + 1 - external];
    runEnd[j] = alike ? runEnd[j + 1]! : j + 1;
  }
  const table = joinTable(
    nodes.map((counts) => used.map((h) => counts[h]!)),
    small,
  );
  return { n, external, table, kinds, matrix: new Int32Array(n * n), runEnd, used };
}

import type { DiagramRow, GroupBy, Plate } from '#contract/api.ts';

/** What members of one plate have in common, as text. Couplings are compared whatever the order of their names. */
export function markOf(by: GroupBy, row: DiagramRow): string {
  if (by === 'loops') return String(row.loops);
  if (by === 'factor') return row.symmetryFactor;
  if (by === 'shape') return row.shape;
  return JSON.stringify(Object.entries(row.order).sort(([a], [b]) => (a < b ? -1 : 1)));
}

/**
 * Rows of a list that is there whole, sorted into its plates. A plate's first member says what its members share: the
 * server's keys of coupling powers are its own. Pure; O(rows).
 */
export function sorted(
  by: GroupBy,
  plates: readonly Pick<Plate, 'key' | 'first'>[],
  rows: readonly DiagramRow[],
): Map<string, readonly DiagramRow[]> {
  const members = new Map<string, DiagramRow[]>();
  const first = new Map<number, DiagramRow>();
  for (const row of rows) {
    first.set(row.position, row);
    const mark = markOf(by, row);
    const known = members.get(mark);
    if (known) known.push(row);
    else members.set(mark, [row]);
  }
  return new Map(
    plates.map((plate) => {
      const row = first.get(plate.first);
      return [plate.key, row ? (members.get(markOf(by, row)) ?? []) : []];
    }),
  );
}

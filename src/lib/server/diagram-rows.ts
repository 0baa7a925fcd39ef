import type { StoredDiagram } from '#contract/job.ts';
import type { Clause, SortPlan } from './diagram-query.ts';
import { runtime } from './runtime.ts';

type Value = string | number;

const COLUMNS = `position, label, body, loops, symmetry_factor AS symmetryFactor, weight, pairings, order_key AS "order", shape, flags, picture`;

function all<Row>(sql: string, values: readonly Value[]): Row[] {
  return runtime()
    .db.$client.prepare<Value[], Row>(sql)
    .all(...values);
}

const where = (clauses: readonly Clause[]): string => ['body_id = ?', ...clauses.map(({ sql }) => sql)].join(' AND ');
const valuesOf = (bodyId: number, clauses: readonly Clause[]): Value[] => [
  bodyId,
  ...clauses.flatMap(({ values }) => values),
];

/** Rows of a body that fulfil every clause, in the order of a plan. */
export function selectRows(bodyId: number, clauses: readonly Clause[], plan: SortPlan, limit: number): StoredDiagram[] {
  const direction = plan.descending ? 'DESC' : 'ASC';
  const order = plan.keys.map(({ sql }) => `${sql} ${direction}`).join(', ');
  return all(`SELECT ${COLUMNS} FROM diagrams WHERE ${where(clauses)} ORDER BY ${order} LIMIT ?`, [
    ...valuesOf(bodyId, clauses),
    limit,
  ]);
}

export function countRows(bodyId: number, clauses: readonly Clause[]): number {
  const sql = `SELECT count(*) AS n FROM diagrams WHERE ${where(clauses)}`;
  return all<{ n: number }>(sql, valuesOf(bodyId, clauses))[0]!.n;
}

export function rowAt(bodyId: number, position: number): StoredDiagram | undefined {
  return all<StoredDiagram>(`SELECT ${COLUMNS} FROM diagrams WHERE body_id = ? AND position = ?`, [
    bodyId,
    position,
  ])[0];
}

/** Diagrams that are the same with names forgotten: usually one. */
export function rowsLabelled(bodyId: number, label: string): StoredDiagram[] {
  return all(`SELECT ${COLUMNS} FROM diagrams WHERE body_id = ? AND label = ? ORDER BY position LIMIT 200`, [
    bodyId,
    label,
  ]);
}

/** All rows in order, a page at a time: for downloads of any size. */
export function* storedRows(bodyId: number, page = 500): Generator<StoredDiagram[]> {
  const sql = `SELECT ${COLUMNS} FROM diagrams WHERE body_id = ? AND position > ? ORDER BY position LIMIT ?`;
  for (let after = 0; ; ) {
    const rows = all<StoredDiagram>(sql, [bodyId, after, page]);
    if (rows.length > 0) yield rows;
    if (rows.length < page) return;
    after = rows.at(-1)!.position;
  }
}

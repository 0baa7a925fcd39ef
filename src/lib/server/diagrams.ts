import type { DiagramPageData, DiagramRow, GroupBy, Page, Plate } from '#contract/api.ts';
import type { StoredDiagram } from '#contract/job.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import type { LedgerDTO } from '#contract/result.ts';
import { readCursor, writeCursor } from './cursor.ts';
import { type Clause, conditionsOf, type DiagramFilter, diagramQuerySchema, sortPlan } from './diagram-query.ts';
import {
  describeDiagram,
  drawingOf,
  type Prepared,
  renderDiagram,
  renderLedger,
  rulesUsed,
  workingOf,
} from './engine.ts';
import type { ExpansionRow } from './expansion-record.ts';
import { bodyOf, readable } from './expansions.ts';
import { platesOf } from './plates.ts';
import { preparedOf } from './prepared.ts';
import { notFound, Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

const SELECT = `SELECT position, label, body, loops, symmetry_factor AS symmetryFactor, weight, pairings,
  order_key AS "order", shape, flags FROM diagrams WHERE body_id = ?`;

export const preparedFor = (row: ExpansionRow): Prepared =>
  preparedOf(row.id, JSON.parse(row.request) as ExpansionRequest);

export function rowOf(prepared: Prepared, stored: StoredDiagram): DiagramRow {
  return {
    ...renderDiagram(prepared, stored),
    position: stored.position,
    drawing: drawingOf(prepared, stored),
    description: describeDiagram(prepared, stored),
  };
}

const all = <Row>(sql: string, values: readonly (string | number)[]): Row[] =>
  runtime()
    .db.$client.prepare<(string | number)[], Row>(sql)
    .all(...values);

const where = (clauses: readonly Clause[]): string => clauses.map(({ sql }) => ` AND ${sql}`).join('');
const valuesOf = (clauses: readonly Clause[]) => clauses.flatMap(({ values }) => values);

/** One page of the list of an expansion, drawn and named. While it is still computed: what has been stored so far. */
export function listDiagrams(viewer: Viewer, id: string, asked: DiagramFilter = {}): Page<DiagramRow> {
  const expansion = readable(viewer, id);
  const body = bodyOf(expansion);
  const query = parseQuery(asked);
  const plan = sortPlan(query.sort);
  const conditions = conditionsOf(query);
  const after = readCursor(query.after ?? null);
  if (after && after.length !== plan.keys.length)
    throw new Refusal('bad-request', 'The value of "after" belongs to another sort.');
  const beyond: Clause[] = after
    ? [
        {
          sql: `(${plan.keys.join(', ')}) ${plan.descending ? '<' : '>'} (${after.map(() => '?').join(', ')})`,
          values: after.map((part, at) =>
            plan.keys[at]!.includes('symmetry_factor') && !plan.keys[at]!.startsWith('length')
              ? part
              : plan.keys[at] === 'shape'
                ? part
                : Number(part),
          ),
        },
      ]
    : [];
  const clauses = [...conditions, ...beyond];
  const direction = plan.descending ? 'DESC' : 'ASC';
  const order = plan.keys.map((key) => `${key} ${direction}`).join(', ');
  const rows = all<StoredDiagram>(`${SELECT}${where(clauses)} ORDER BY ${order} LIMIT ?`, [
    body.id,
    ...valuesOf(clauses),
    query.limit + 1,
  ]);
  const prepared = preparedFor(expansion);
  const items = rows.slice(0, query.limit);
  return {
    items: items.map((row) => rowOf(prepared, row)),
    next: rows.length > query.limit ? writeCursor(plan.keyOf(items.at(-1)!)) : null,
    total: countOf(body, conditions),
  };
}

function parseQuery(asked: DiagramFilter) {
  const read = diagramQuerySchema.safeParse(asked);
  if (read.success) return read.data;
  const issue = read.error.issues[0]!;
  throw new Refusal('bad-request', `${issue.path.join('.') || 'query'}: ${issue.message}`);
}

function countOf(body: { id: number; state: string; classes: number }, conditions: readonly Clause[]): number {
  if (conditions.length === 0 && body.state === 'complete') return body.classes;
  return all<{ n: number }>(`SELECT count(*) AS n FROM diagrams WHERE body_id = ?${where(conditions)}`, [
    body.id,
    ...valuesOf(conditions),
  ])[0]!.n;
}

/** Groups of the list with their counts and sums of weights, in the order of their first member. */
export function listPlates(viewer: Viewer, id: string, by: GroupBy): Plate[] {
  const expansion = readable(viewer, id);
  return platesOf(preparedFor(expansion), bodyOf(expansion).id, by);
}

/** The stored row of a diagram: by position, bare label, or full id. */
export function storedDiagram(bodyId: number, name: string): StoredDiagram | undefined {
  if (/^\d{1,9}$/.test(name)) return all<StoredDiagram>(`${SELECT} AND position = ?`, [bodyId, Number(name)])[0];
  return all<StoredDiagram>(`${SELECT} AND label = ?`, [bodyId, name])[0];
}

const labelAt = (bodyId: number, position: number): string | null =>
  all<{ label: string }>('SELECT label FROM diagrams WHERE body_id = ? AND position = ?', [bodyId, position])[0]
    ?.label ?? null;

/** One diagram whole, with its working and its neighbours' labels. @throws Refusal not-found. */
export function getDiagram(viewer: Viewer, id: string, name: string): DiagramPageData {
  const expansion = readable(viewer, id);
  const body = bodyOf(expansion);
  const stored = storedDiagram(body.id, name);
  if (!stored) throw notFound('diagram');
  const prepared = preparedFor(expansion);
  return {
    ...rowOf(prepared, stored),
    working: workingOf(prepared, stored),
    rulesUsed: rulesUsed(prepared, stored),
    previous: labelAt(body.id, stored.position - 1),
    next: labelAt(body.id, stored.position + 1),
  };
}

/** The proof of the list. @throws Refusal conflict while there is none. */
export function getLedger(viewer: Viewer, id: string): LedgerDTO {
  const expansion = readable(viewer, id);
  const body = bodyOf(expansion);
  if (body.ledger === null)
    throw new Refusal('conflict', `This expansion is ${expansion.state}: it has no ledger yet.`);
  return renderLedger(preparedFor(expansion), JSON.parse(body.ledger));
}

/** All rows in order, a page at a time: for downloads of any size. */
export function* storedRows(bodyId: number, page = 500): Generator<StoredDiagram[]> {
  for (let after = 0; ; ) {
    const rows = all<StoredDiagram>(`${SELECT} AND position > ? ORDER BY position LIMIT ?`, [bodyId, after, page]);
    if (rows.length > 0) yield rows;
    if (rows.length < page) return;
    after = rows.at(-1)!.position;
  }
}

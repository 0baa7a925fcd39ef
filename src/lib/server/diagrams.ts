import type { DiagramPageData, DiagramRow, GroupBy, Page, Plate } from '#contract/api.ts';
import type { StoredDiagram } from '#contract/job.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import type { LedgerDTO } from '#contract/result.ts';
import { validate } from '#contract/validate.ts';
import {
  describeDiagram,
  drawingOf,
  type Prepared,
  pictureOf,
  renderDiagram,
  renderLedger,
  rulesUsed,
  workingOf,
} from '#engine/index.ts';
import { writeCursor } from './cursor.ts';
import { beyondClause, conditionsOf, type DiagramFilter, diagramQuerySchema, sortPlan } from './diagram-query.ts';
import { countRows, rowAt, rowsLabelled, selectRows } from './diagram-rows.ts';
import type { ExpansionRow } from './expansion-record.ts';
import { bodyOf, readable } from './expansions.ts';
import { platesOf } from './plates.ts';
import { preparedOf } from './prepared.ts';
import { notFound, Refusal } from './refusal.ts';
import type { Viewer } from './viewer.ts';

export const preparedFor = (row: ExpansionRow): Prepared =>
  preparedOf(row.id, JSON.parse(row.request) as ExpansionRequest);

function rowOf(prepared: Prepared, stored: StoredDiagram): DiagramRow {
  return {
    ...renderDiagram(prepared, stored),
    position: stored.position,
    drawing: drawingOf(prepared, stored),
    description: describeDiagram(prepared, stored),
  };
}

/** One page of the list of an expansion, drawn and named. While it is still computed: what has been stored so far. */
export function listDiagrams(viewer: Viewer, id: string, asked: DiagramFilter = {}): Page<DiagramRow> {
  const expansion = readable(viewer, id);
  const body = bodyOf(expansion);
  const query = validate(diagramQuerySchema, asked);
  const plan = sortPlan(query.sort);
  const conditions = conditionsOf(query);
  const rows = selectRows(body.id, [...conditions, ...beyondClause(plan, query.after)], plan, query.limit + 1);
  const prepared = preparedFor(expansion);
  const items = rows.slice(0, query.limit);
  const whole = conditions.length === 0 && body.state === 'complete';
  return {
    items: items.map((row) => rowOf(prepared, row)),
    next: rows.length > query.limit ? writeCursor(plan.keyOf(items.at(-1)!)) : null,
    total: whole ? body.classes : countRows(body.id, conditions),
  };
}

/** Groups of the list with their counts and sums of weights, in the order of their first member; at most 500 of them. */
export function listPlates(viewer: Viewer, id: string, by: GroupBy): Plate[] {
  return platesPage(viewer, id, by).items;
}

/** The same with the number of all groups. */
export function platesPage(viewer: Viewer, id: string, by: GroupBy): { items: Plate[]; total: number } {
  const expansion = readable(viewer, id);
  return platesOf(preparedFor(expansion), bodyOf(expansion), by);
}

/** A stored diagram by position (digits only), by id, or by bare label where only one diagram has it. */
function findDiagram(prepared: Prepared, bodyId: number, name: string): StoredDiagram | undefined {
  if (/^\d{1,9}$/.test(name)) return rowAt(bodyId, Number(name));
  const candidates = rowsLabelled(bodyId, name.split('-')[0]!);
  const named = candidates.find((row) => renderDiagram(prepared, row).id === name);
  return named ?? (candidates.length === 1 && candidates[0]!.label === name ? candidates[0] : undefined);
}

/** One diagram whole, with its working and its neighbours' ids. @throws Refusal not-found. */
export function getDiagram(viewer: Viewer, id: string, name: string): DiagramPageData {
  const expansion = readable(viewer, id);
  const body = bodyOf(expansion);
  const prepared = preparedFor(expansion);
  const stored = findDiagram(prepared, body.id, name);
  if (!stored) throw notFound('diagram');
  const idAt = (position: number): string | null => {
    const row = rowAt(body.id, position);
    return row ? renderDiagram(prepared, row).id : null;
  };
  return {
    ...rowOf(prepared, stored),
    working: workingOf(prepared, stored),
    picture: pictureOf(prepared, stored),
    rulesUsed: rulesUsed(prepared, stored),
    previous: idAt(stored.position - 1),
    next: idAt(stored.position + 1),
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

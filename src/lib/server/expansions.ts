import { and, desc, eq, gt, inArray, isNull, lt, ne, or, type SQL } from 'drizzle-orm';
import type { ExpansionEvent, ExpansionRecord, ExpansionState, Page } from '#contract/api.ts';
import { bodies, expansions, memberships } from '#db/schema.ts';
import { readCursor, writeCursor } from './cursor.ts';
import { type ExpansionRow, getRow, recordOf } from './expansion-record.ts';
import { now } from './ids.ts';
import { requireMay } from './policy.ts';
import { Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

export { estimateExpansion } from './expansion-cost.ts';
export { createExpansion, retryExpansion } from './expansion-create.ts';

/** Expansions a viewer may list: their groups', their own as a visitor, and the public ones of the demo. */
function visible(viewer: Viewer): SQL {
  const conditions = [eq(expansions.visibility, 'public')];
  if (viewer.user) {
    const mine = runtime()
      .db.select({ id: memberships.groupId })
      .from(memberships)
      .where(eq(memberships.userId, viewer.user.id));
    conditions.push(inArray(expansions.groupId, mine));
  } else if (viewer.visitor) conditions.push(eq(expansions.visitor, viewer.visitor));
  return or(...conditions)!;
}

export interface ExpansionQuery {
  after?: string | null;
  limit?: number;
  modelId?: string;
  /** Only these states: ['queued', 'running'] for what is under way. */
  states?: readonly ExpansionState[];
  /** Leaves out the demo's. */
  mine?: boolean;
}

/** Newest first. */
export function listExpansions(viewer: Viewer, query: ExpansionQuery = {}): Page<ExpansionRecord> {
  const limit = query.limit ?? 30;
  const after = readCursor(query.after ?? null);
  const conditions = [
    isNull(expansions.deletedAt),
    or(isNull(expansions.expiresAt), gt(expansions.expiresAt, now())),
    visible(viewer),
    query.modelId ? eq(expansions.modelId, query.modelId) : undefined,
    query.states ? inArray(expansions.state, [...query.states]) : undefined,
    query.mine ? ne(expansions.visibility, 'public') : undefined,
    after
      ? or(lt(expansions.createdAt, after[0]!), and(eq(expansions.createdAt, after[0]!), lt(expansions.id, after[1]!)))
      : undefined,
  ];
  const rows = runtime()
    .db.select()
    .from(expansions)
    .where(and(...conditions))
    .orderBy(desc(expansions.createdAt), desc(expansions.id))
    .limit(limit + 1)
    .all();
  const items = rows.slice(0, limit);
  const last = items.at(-1);
  return {
    items: items.map((row) => recordOf(viewer, row)),
    next: rows.length > limit && last ? writeCursor([last.createdAt, last.id]) : null,
    total: null,
  };
}

/** @throws Refusal not-found. */
export function getExpansion(viewer: Viewer, id: string): ExpansionRecord {
  return recordOf(viewer, readable(viewer, id));
}

/** The row behind an expansion that the viewer may read. @throws Refusal not-found. */
export function readable(viewer: Viewer, id: string): ExpansionRow {
  const row = getRow(id);
  requireMay(viewer, 'read', row, 'expansion');
  return row!;
}

const isUnderWay = (row: ExpansionRow): boolean => row.state === 'queued' || row.state === 'running';

/** Ends a computation. Others who wait for the same result keep it going. @throws Refusal conflict when it has ended. */
export function cancelExpansion(viewer: Viewer, id: string): ExpansionRecord {
  const row = getRow(id);
  requireMay(viewer, 'write', row, 'expansion');
  if (!isUnderWay(row!)) throw new Refusal('conflict', `This expansion is ${row!.state}: there is nothing to cancel.`);
  stop(row!);
  return getExpansion(viewer, id);
}

function stop(row: ExpansionRow): void {
  const { db, jobs } = runtime();
  const others = db
    .select({ id: expansions.id })
    .from(expansions)
    .where(
      and(
        eq(expansions.bodyId, row.bodyId!),
        ne(expansions.id, row.id),
        inArray(expansions.state, ['queued', 'running']),
        isNull(expansions.deletedAt),
      ),
    )
    .limit(1)
    .get();
  if (!others) {
    jobs.cancel(row.bodyId!);
    return;
  }
  db.update(expansions)
    .set({ state: 'cancelled', finishedAt: now(), bodyId: null })
    .where(eq(expansions.id, row.id))
    .run();
}

/** Takes an expansion away (and ends its computation). The label stays taken: its address answers not-found for good. */
export function removeExpansion(viewer: Viewer, id: string): void {
  const row = getRow(id);
  requireMay(viewer, 'remove', row, 'expansion');
  if (isUnderWay(row!)) stop(row!);
  runtime().db.update(expansions).set({ deletedAt: now() }).where(eq(expansions.id, id)).run();
}

/** Events of a computation under way. @returns a function that ends the subscription, or null when it has ended. */
export function subscribe(viewer: Viewer, id: string, listener: (event: ExpansionEvent) => void): (() => void) | null {
  const row = readable(viewer, id);
  if (!isUnderWay(row) || row.bodyId === null) return null;
  return runtime().jobs.subscribe(row.bodyId, listener);
}

/** Waits until a computation has ended, but no longer than this: short ones are then shown whole at once. */
export async function settled(viewer: Viewer, id: string, milliseconds: number): Promise<void> {
  await new Promise<void>((done) => {
    const timer = setTimeout(done, milliseconds);
    const stop = subscribe(viewer, id, (event) => {
      if (event.type !== 'state' || event.state === 'queued' || event.state === 'running') return;
      clearTimeout(timer);
      done();
    });
    if (!stop) {
      clearTimeout(timer);
      done();
    }
    setTimeout(() => stop?.(), milliseconds);
  });
}

/** Removes what visitors left behind and bodies nobody uses. Runs at start and every hour. */
export function removeExpired(): void {
  const { db } = runtime();
  const old = db.select().from(expansions).where(lt(expansions.expiresAt, now())).limit(500).all();
  for (const row of old) {
    if (isUnderWay(row)) stop(row);
    db.delete(expansions).where(eq(expansions.id, row.id)).run();
  }
  runtime().jobs.abandonUnused();
}

/** The stored body of an expansion. @throws Refusal conflict when it holds no list that may be read. */
export function bodyOf(row: ExpansionRow): typeof bodies.$inferSelect {
  const body =
    row.bodyId === null ? undefined : runtime().db.select().from(bodies).where(eq(bodies.id, row.bodyId)).get();
  if (body && (row.state === 'complete' || row.state === 'running' || row.state === 'queued')) return body;
  throw new Refusal('conflict', `This expansion is ${row.state}: it has no list of diagrams.`);
}

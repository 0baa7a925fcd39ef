import { and, eq, gt, isNull, or } from 'drizzle-orm';
import type { ExpansionRecord } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import { bodies, expansions } from '#db/schema.ts';
import { renderLedger, renderSummary } from '#engine/index.ts';
import { now } from './ids.ts';
import { may } from './policy.ts';
import { preparedOf } from './prepared.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

export type ExpansionRow = typeof expansions.$inferSelect;

/** An expansion that exists: not removed, not expired. */
export function getRow(id: string): ExpansionRow | undefined {
  return runtime()
    .db.select()
    .from(expansions)
    .where(
      and(
        eq(expansions.id, id),
        isNull(expansions.deletedAt),
        or(isNull(expansions.expiresAt), gt(expansions.expiresAt, now())),
      ),
    )
    .get();
}

function progressOf(row: ExpansionRow, classes: number): ExpansionRecord['progress'] {
  const live = row.bodyId === null ? null : runtime().jobs.progressOf(row.bodyId);
  if (live) return { ...live };
  if (row.state === 'complete') return { classes, estimated: classes, fraction: 1, phase: 'complete' };
  return { classes, estimated: null, fraction: row.state === 'queued' ? 0 : null, phase: row.state };
}

/** Where the body was first computed: its id for those who may see it, "another workspace" for everybody else. */
function reusedFrom(viewer: Viewer, row: ExpansionRow): string | null {
  if (row.reusedFrom === null) return null;
  const origin = getRow(row.reusedFrom);
  return origin && may(viewer, 'read', origin) ? origin.id : 'another workspace';
}

/** An expansion as the API shows it, rendered with the names of its own model. */
export function recordOf(viewer: Viewer, row: ExpansionRow): ExpansionRecord {
  const request = JSON.parse(row.request) as ExpansionRequest;
  const prepared = preparedOf(row.id, request);
  const body =
    row.bodyId === null ? undefined : runtime().db.select().from(bodies).where(eq(bodies.id, row.bodyId)).get();
  const usable = row.state === 'complete' || row.state === 'unbalanced';
  return {
    id: row.id,
    title: row.title,
    request,
    modelId: row.modelId,
    state: row.state,
    progress: progressOf(row, body?.classes ?? 0),
    summary: usable && body?.summary ? renderSummary(prepared, JSON.parse(body.summary)) : null,
    ledger: usable && body?.ledger ? renderLedger(prepared, JSON.parse(body.ledger)) : null,
    rules: prepared.rules,
    conventions: prepared.conventions,
    engine: { name: 'Wickwork', version: row.engineVersion },
    error: row.error === null ? null : (JSON.parse(row.error) as ErrorObject),
    contentHash: row.contentHash,
    createdAt: row.createdAt,
    finishedAt: row.finishedAt,
    milliseconds: usable ? (body?.milliseconds ?? null) : null,
    reusedFrom: reusedFrom(viewer, row),
    mine: may(viewer, 'write', row),
  };
}

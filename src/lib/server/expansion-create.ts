import { and, count, eq, inArray, isNull } from 'drizzle-orm';
import type { ExpansionRecord } from '#contract/api.ts';
import { LIMITS } from '#contract/limits.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import { bodies, expansions, jobs } from '#db/schema.ts';
import { ENGINE_VERSION, estimate, prepare } from '#engine/index.ts';
import { contentHashOf, ESTIMATE_MS, refusalReason } from './expansion-cost.ts';
import { type ExpansionRow, getRow, recordOf } from './expansion-record.ts';
import { newId, now, sha256, stableJson } from './ids.ts';
import { getModel } from './models.ts';
import { allowanceOf, requireMay } from './policy.ts';
import { preparedOf } from './prepared.ts';
import { Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import { titleOf } from './title.ts';
import type { Viewer } from './viewer.ts';

/** An estimate may err: the run itself is cut only beyond this multiple of a visitor's allowance. */
const VISITOR_SLACK = 2;

export interface NewExpansion {
  request: ExpansionRequest;
  title?: string;
  modelId?: string | null;
}

export interface Created {
  expansion: ExpansionRecord;
  /** false: an equal expansion was there already and is answered. */
  created: boolean;
}

type Owner = { groupId: string; visitor: null } | { groupId: null; visitor: string };

function ownerOf(viewer: Viewer): Owner {
  if (viewer.user) return { groupId: viewer.user.workspace, visitor: null };
  if (viewer.visitor) return { groupId: null, visitor: viewer.visitor };
  throw new Refusal('not-signed-in', 'Sign in, or allow the visitor cookie, to run an expansion.');
}

const ownedBy = (owner: Owner) =>
  owner.groupId === null ? eq(expansions.visitor, owner.visitor) : eq(expansions.groupId, owner.groupId);

/** The same people asked the same before, and it is complete or under way. */
function equalOne(owner: Owner, requestHash: string): ExpansionRow | undefined {
  return runtime()
    .db.select()
    .from(expansions)
    .where(
      and(
        ownedBy(owner),
        eq(expansions.requestHash, requestHash),
        eq(expansions.engineVersion, ENGINE_VERSION),
        inArray(expansions.state, ['complete', 'queued', 'running']),
        isNull(expansions.deletedAt),
      ),
    )
    .limit(1)
    .get();
}

function requireRoom(viewer: Viewer, owner: Owner): void {
  const allowance = allowanceOf(viewer);
  const { waiting } = runtime()
    .db.select({ waiting: count() })
    .from(expansions)
    .where(and(ownedBy(owner), inArray(expansions.state, ['queued', 'running']), isNull(expansions.deletedAt)))
    .get()!;
  if (waiting < allowance.waiting) return;
  throw new Refusal(
    'rate',
    viewer.user
      ? `You have ${waiting} expansions under way, the most one person may have. Wait for one to end or cancel one.`
      : 'Visitors run one expansion at a time. Wait for it to end or cancel it.',
    {},
    5,
  );
}

/** The body with this content if it is complete or being computed. */
const bodyWith = (contentHash: string) =>
  runtime()
    .db.select()
    .from(bodies)
    .where(and(eq(bodies.contentHash, contentHash), eq(bodies.engineVersion, ENGINE_VERSION)))
    .get();

function firstOf(bodyId: number): string | null {
  const row = runtime()
    .db.select({ id: expansions.id })
    .from(expansions)
    .where(eq(expansions.bodyId, bodyId))
    .orderBy(expansions.createdAt)
    .limit(1)
    .get();
  return row?.id ?? null;
}

function jobOf(viewer: Viewer, bodyId: number, expansionId: string, estimated: number) {
  const allowance = allowanceOf(viewer);
  const slack = viewer.user ? 1 : VISITOR_SLACK;
  return {
    id: newId(),
    bodyId,
    expansionId,
    owner: viewer.user?.id ?? viewer.visitor ?? 'nobody',
    state: 'queued' as const,
    seconds: viewer.user ? LIMITS.job.seconds : Math.max(20, allowance.seconds * slack),
    classes: allowance.classes * slack,
    estimated,
    createdAt: now(),
  };
}

/**
 * Answers a request with an expansion: an equal one of the same people; else a new one on a stored body, or on one that is
 * being computed, equal up to names and order of terms; else a new computation.
 *
 * @throws InputError, LimitError for a wrong request; Refusal limit (too large), rate (too many), not-signed-in.
 */
export function createExpansion(viewer: Viewer, asked: NewExpansion): Created {
  const owner = ownerOf(viewer);
  const prepared = prepare(asked.request);
  const contentHash = contentHashOf(prepared);
  const requestHash = sha256(stableJson(asked.request));
  const equal = equalOne(owner, requestHash);
  if (equal) return { expansion: recordOf(viewer, equal), created: false };
  if (asked.modelId) getModel(viewer, asked.modelId);
  const known = bodyWith(contentHash);
  const expected = known ? null : estimate(prepared, ESTIMATE_MS);
  if (known?.state !== 'complete') requireRoom(viewer, owner);
  const reason = expected && refusalReason(viewer, expected);
  if (reason) throw new Refusal('limit', reason);
  const id = newId();
  runtime().db.transaction(
    (tx) => {
      const body =
        known ??
        tx
          .insert(bodies)
          .values({ contentHash, engineVersion: ENGINE_VERSION, state: 'building', createdAt: now() })
          .returning()
          .get();
      tx.insert(expansions)
        .values({
          ...rowOf(viewer, owner, asked, id),
          requestHash,
          contentHash,
          bodyId: body.id,
          reusedFrom: known ? firstOf(known.id) : null,
          ...stateFor(known?.state),
        })
        .run();
      if (!known)
        tx.insert(jobs)
          .values(jobOf(viewer, body.id, id, Math.round(expected!.classes)))
          .run();
    },
    { behavior: 'immediate' },
  );
  preparedOf(id, asked.request);
  runtime().jobs.wake();
  return { expansion: recordOf(viewer, getRow(id)!), created: true };
}

/** The state of an expansion that joins a body. */
function stateFor(body: 'building' | 'complete' | 'unbalanced' | 'abandoned' | undefined) {
  if (body === 'complete' || body === 'unbalanced') return { state: body, finishedAt: now() };
  return { state: 'queued' as const };
}

function rowOf(viewer: Viewer, owner: Owner, asked: NewExpansion, id: string) {
  const keptUntil = new Date(Date.now() + LIMITS.visitor.keepHours * 3_600_000).toISOString();
  return {
    id,
    ...owner,
    createdBy: viewer.user?.id ?? null,
    modelId: asked.modelId ?? null,
    title: asked.title?.trim() || titleOf(asked.request),
    request: JSON.stringify(asked.request),
    engineVersion: ENGINE_VERSION,
    createdAt: now(),
    expiresAt: owner.visitor === null ? null : keptUntil,
  };
}

/** Starts a failed, cancelled or interrupted expansion again under its own address. @throws Refusal conflict otherwise. */
export function retryExpansion(viewer: Viewer, id: string): ExpansionRecord {
  const row = getRow(id);
  requireMay(viewer, 'write', row, 'expansion');
  if (!['failed', 'cancelled', 'interrupted'].includes(row!.state))
    throw new Refusal('conflict', `This expansion is ${row!.state}: there is nothing to start again.`);
  const request = JSON.parse(row!.request) as ExpansionRequest;
  const contentHash = contentHashOf(prepare(request));
  requireRoom(viewer, ownerOf(viewer));
  const known = bodyWith(contentHash);
  const expected = known ? null : estimate(prepare(request), ESTIMATE_MS);
  const reason = expected && refusalReason(viewer, expected);
  if (reason) throw new Refusal('limit', reason);
  runtime().db.transaction(
    (tx) => {
      const body =
        known ??
        tx
          .insert(bodies)
          .values({ contentHash, engineVersion: ENGINE_VERSION, state: 'building', createdAt: now() })
          .returning()
          .get();
      tx.update(expansions)
        .set({
          bodyId: body.id,
          contentHash,
          engineVersion: ENGINE_VERSION,
          error: null,
          finishedAt: null,
          ...stateFor(known?.state),
        })
        .where(eq(expansions.id, id))
        .run();
      if (!known)
        tx.insert(jobs)
          .values(jobOf(viewer, body.id, id, Math.round(expected!.classes)))
          .run();
    },
    { behavior: 'immediate' },
  );
  runtime().jobs.wake();
  return recordOf(viewer, getRow(id)!);
}

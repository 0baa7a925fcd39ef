import { and, desc, eq, inArray, isNull, lt, or, type SQL } from 'drizzle-orm';
import type { ModelRecord, Page } from '#contract/api.ts';
import type { ModelInput } from '#contract/request.ts';
import { memberships, models, revisions, users } from '#db/schema.ts';
import { readCursor, writeCursor } from './cursor.ts';
import { newId, now, sha256, stableJson } from './ids.ts';
import { may, requireMay, requireUser } from './policy.ts';
import { notFound, Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

export interface ModelDraft {
  title: string;
  description?: string;
  input: ModelInput;
}

export interface RevisionRecord {
  number: number;
  input: ModelInput;
  contentHash: string;
  createdAt: string;
}

type Row = typeof models.$inferSelect;
type RevisionRow = typeof revisions.$inferSelect;

/** The content hash of a model as typed: equal inputs, whatever the order of their keys. */
export const modelHash = (input: ModelInput): string => sha256(stableJson(input));

function recordOf(viewer: Viewer, row: Row, revision: RevisionRow, owner: string | null): ModelRecord {
  return {
    id: row.id,
    title: row.title,
    description: row.description,
    input: JSON.parse(revision.input) as ModelInput,
    revision: revision.number,
    createdAt: row.createdAt,
    updatedAt: row.updatedAt,
    owner,
    contentHash: revision.contentHash,
    mine: may(viewer, 'write', row),
  };
}

const joined = () =>
  runtime()
    .db.select({ model: models, revision: revisions, owner: users.name })
    .from(models)
    .innerJoin(revisions, and(eq(revisions.modelId, models.id), eq(revisions.number, models.revision)))
    .leftJoin(users, eq(users.id, models.createdBy))
    .$dynamic();

/** Groups of the viewer, as a condition on a groupId column. */
function visible(viewer: Viewer): SQL {
  const isPublic = eq(models.visibility, 'public');
  if (!viewer.user) return isPublic;
  const mine = runtime()
    .db.select({ id: memberships.groupId })
    .from(memberships)
    .where(eq(memberships.userId, viewer.user.id));
  return or(isPublic, inArray(models.groupId, mine))!;
}

/** Models of the viewer's groups and the public ones, last changed first. */
export function listModels(viewer: Viewer, page: { after?: string | null; limit?: number } = {}): Page<ModelRecord> {
  const limit = page.limit ?? 50;
  const after = readCursor(page.after ?? null);
  const beyond = after
    ? or(lt(models.updatedAt, after[0]!), and(eq(models.updatedAt, after[0]!), lt(models.id, after[1]!)))
    : undefined;
  const rows = joined()
    .where(and(isNull(models.deletedAt), visible(viewer), beyond))
    .orderBy(desc(models.updatedAt), desc(models.id))
    .limit(limit + 1)
    .all();
  const items = rows.slice(0, limit);
  const last = items.at(-1)?.model;
  return {
    items: items.map(({ model, revision, owner }) => recordOf(viewer, model, revision, owner)),
    next: rows.length > limit && last ? writeCursor([last.updatedAt, last.id]) : null,
    total: null,
  };
}

/** @throws Refusal not-found. */
export function getModel(viewer: Viewer, id: string): ModelRecord {
  const row = joined()
    .where(and(eq(models.id, id), isNull(models.deletedAt)))
    .get();
  requireMay(viewer, 'read', row?.model, 'model');
  return recordOf(viewer, row!.model, row!.revision, row!.owner);
}

/** Stores a model in the viewer's workspace, also one that cannot be read yet: a draft is never lost. */
export function createModel(viewer: Viewer, draft: ModelDraft): ModelRecord {
  const user = requireUser(viewer);
  const id = newId();
  const time = now();
  const { db } = runtime();
  db.transaction(
    (tx) => {
      tx.insert(models)
        .values({
          id,
          groupId: user.workspace,
          createdBy: user.id,
          title: draft.title,
          description: draft.description ?? '',
          revision: 1,
          createdAt: time,
          updatedAt: time,
        })
        .run();
      tx.insert(revisions)
        .values(revisionOf(id, 1, draft.input, user.id, time))
        .run();
    },
    { behavior: 'immediate' },
  );
  return getModel(viewer, id);
}

const revisionOf = (modelId: string, number: number, input: ModelInput, createdBy: string, createdAt: string) => ({
  id: newId(),
  modelId,
  number,
  input: JSON.stringify(input),
  contentHash: modelHash(input),
  createdBy,
  createdAt,
});

/**
 * Changes title or description, or adds a revision when the input differs from the newest one.
 *
 * @param revision the number that the change was made on. @throws Refusal conflict when another has been added since.
 */
export function updateModel(
  viewer: Viewer,
  id: string,
  change: Partial<ModelDraft>,
  revision: number | null = null,
): ModelRecord {
  const { db } = runtime();
  db.transaction(
    (tx) => {
      const before = getModel(viewer, id);
      requireMay(viewer, 'write', tx.select().from(models).where(eq(models.id, id)).get(), 'model');
      if (revision !== null && revision !== before.revision)
        throw new Refusal(
          'conflict',
          `This model was changed elsewhere: it is at revision ${before.revision}, your change was made on revision ${revision}.`,
        );
      const time = now();
      const changed = change.input !== undefined && modelHash(change.input) !== before.contentHash;
      const number = before.revision + (changed ? 1 : 0);
      if (changed)
        tx.insert(revisions)
          .values(revisionOf(id, number, change.input!, requireUser(viewer).id, time))
          .run();
      tx.update(models)
        .set({
          title: change.title ?? before.title,
          description: change.description ?? before.description,
          revision: number,
          updatedAt: time,
        })
        .where(eq(models.id, id))
        .run();
    },
    { behavior: 'immediate' },
  );
  return getModel(viewer, id);
}

/** Takes a model away from lists and links; its expansions stay. */
export function deleteModel(viewer: Viewer, id: string): void {
  const { db } = runtime();
  const row = db
    .select()
    .from(models)
    .where(and(eq(models.id, id), isNull(models.deletedAt)))
    .get();
  requireMay(viewer, 'remove', row, 'model');
  db.update(models).set({ deletedAt: now() }).where(eq(models.id, id)).run();
}

/** All revisions, newest first. */
export function listRevisions(viewer: Viewer, id: string): RevisionRecord[] {
  getModel(viewer, id);
  return runtime()
    .db.select()
    .from(revisions)
    .where(eq(revisions.modelId, id))
    .orderBy(desc(revisions.number))
    .all()
    .map(({ number, input, contentHash, createdAt }) => ({
      number,
      input: JSON.parse(input) as ModelInput,
      contentHash,
      createdAt,
    }));
}

/** One revision. @throws Refusal not-found. */
export function getRevision(viewer: Viewer, id: string, number: number): RevisionRecord {
  const found = listRevisions(viewer, id).find((revision) => revision.number === number);
  if (!found) throw notFound('revision');
  return found;
}

import { and, desc, eq, gt, ne } from 'drizzle-orm';
import { sessions } from '#db/schema.ts';
import { audit } from './audit.ts';
import { requireUser } from './policy.ts';
import { notFound } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

export interface SessionRecord {
  id: string;
  current: boolean;
  createdAt: string;
  lastSeenAt: string;
  expiresAt: string;
  address: string;
  agent: string;
}

/** The viewer's open sessions, last used first. */
export function listSessions(viewer: Viewer): SessionRecord[] {
  const user = requireUser(viewer);
  return runtime()
    .db.select()
    .from(sessions)
    .where(and(eq(sessions.userId, user.id), gt(sessions.expiresAt, Math.floor(Date.now() / 1000))))
    .orderBy(desc(sessions.lastSeenAt))
    .all()
    .map((row) => ({
      id: row.publicId,
      current: row.publicId === viewer.session,
      createdAt: row.createdAt,
      lastSeenAt: row.lastSeenAt,
      expiresAt: new Date(row.expiresAt * 1000).toISOString(),
      address: row.address,
      agent: row.agent,
    }));
}

/** @throws Refusal not-found when it is not one of the viewer's. */
export function endSession(viewer: Viewer, id: string): void {
  const user = requireUser(viewer);
  const { changes } = runtime()
    .db.delete(sessions)
    .where(and(eq(sessions.publicId, id), eq(sessions.userId, user.id)))
    .run();
  if (changes === 0) throw notFound('session');
  audit(viewer, 'session.ended', id);
}

/** Ends all of the viewer's sessions but the current one. @returns how many. */
export function endOtherSessions(viewer: Viewer): number {
  const user = requireUser(viewer);
  const { changes } = runtime()
    .db.delete(sessions)
    .where(and(eq(sessions.userId, user.id), ne(sessions.publicId, viewer.session ?? '')))
    .run();
  audit(viewer, 'session.others-ended', user.id, { changes });
  return changes;
}

import { and, eq } from 'drizzle-orm';
import { LIMITS } from '#contract/limits.ts';
import { memberships } from '#db/schema.ts';
import { Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import { ROLES, type Role, type Viewer } from './viewer.ts';

/**
 * Who may do what: the one place that decides. Each role includes the former.
 * Things that one may not see do not exist for one: reading them answers not-found, never not-allowed.
 */
const LEAST: Record<Action, Role> = {
  read: 'reader',
  comment: 'reader',
  check: 'checker',
  write: 'author',
  remove: 'author',
  administer: 'lead',
};
export type Action = 'read' | 'comment' | 'check' | 'write' | 'remove' | 'administer';

export function roleIn(viewer: Viewer, groupId: string): Role | null {
  if (!viewer.user) return null;
  const row = runtime()
    .db.select({ role: memberships.role })
    .from(memberships)
    .where(and(eq(memberships.groupId, groupId), eq(memberships.userId, viewer.user.id)))
    .get();
  return row?.role ?? null;
}

/** What a thing that belongs to somebody says about who owns it. */
export interface Owned {
  readonly groupId: string | null;
  readonly visitor?: string | null;
  readonly visibility: 'private' | 'public';
}

const reaches = (role: Role | null, least: Role): boolean =>
  role !== null && ROLES.indexOf(role) >= ROLES.indexOf(least);

export function may(viewer: Viewer, action: Action, thing: Owned): boolean {
  if (action === 'read' && thing.visibility === 'public') return true;
  if (thing.visitor) return viewer.visitor === thing.visitor && action !== 'administer';
  return thing.groupId !== null && reaches(roleIn(viewer, thing.groupId), LEAST[action]);
}

/** The signed-in person, or the refusal that sends a visitor to the sign-in page. */
export function requireUser(viewer: Viewer): NonNullable<Viewer['user']> {
  if (viewer.user) return viewer.user;
  throw new Refusal('not-signed-in', 'Sign in to do this.');
}

/** @throws Refusal not-found when it may not be read, not-allowed when it may be read but not changed. */
export function requireMay(viewer: Viewer, action: Action, thing: Owned | undefined, what: string): void {
  if (thing === undefined || !may(viewer, 'read', thing))
    throw new Refusal('not-found', `There is no such ${what}, or it is not yours to see.`);
  if (may(viewer, action, thing)) return;
  if (!viewer.user) throw new Refusal('not-signed-in', `Sign in to change this ${what}.`);
  throw new Refusal('not-allowed', `This ${what} is not yours to change.`);
}

/** What a viewer may have computed: an estimate above it is refused before anything runs. */
export interface Allowance {
  classes: number;
  seconds: number;
  /** Expansions that compute at the same time. */
  running: number;
  /** Expansions that compute or wait. */
  waiting: number;
}

export function allowanceOf(viewer: Viewer): Allowance {
  const { member, visitor } = LIMITS;
  if (viewer.user) return { classes: member.classes, seconds: member.seconds, running: member.running, waiting: 60 };
  return { classes: visitor.classes, seconds: visitor.seconds, running: 1, waiting: 1 };
}

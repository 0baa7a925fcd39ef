import { and, eq } from 'drizzle-orm';
import { groups, memberships, users } from '#db/schema.ts';
import { audit } from './audit.ts';
import { type CookieToSet, openSession } from './auth.ts';
import { newId, now, sha256 } from './ids.ts';
import { hashPassword, needsRehash, passwordMatches, passwordProblem } from './password.ts';
import { requireUser } from './policy.ts';
import { Refusal } from './refusal.ts';
import { runtime } from './runtime.ts';
import { endOtherSessions } from './sessions.ts';
import type { SessionUser, Viewer } from './viewer.ts';

/** The password of all demo accounts: shown on the sign-in page of an instance with DEMO=1. */
export const DEMO_PASSWORD = 'saltmarsh demo';
export const DEMO_ACCOUNTS = ['lead', 'author', 'checker', 'reader'].map((role) => `${role}@saltmarsh.example`);

export const demoEnabled = (): boolean => runtime().config.demo;

const WRONG = 'The e-mail address and the password do not belong together.';
const EMAIL = /^[^\s@<>"]{1,64}@[^\s@<>"]{1,190}\.[^\s@<>".]{2,60}$/;

export const normaliseEmail = (email: string): string => email.trim().toLowerCase();

const formRefusal = (fields: Record<string, string>): Refusal =>
  new Refusal('bad-request', 'Some entries need a change.', { fields });

export interface NewAccount {
  email: string;
  name: string;
  password: string;
}

/** Inserts a person, the personal workspace and the membership as its lead. */
export function insertAccount(account: {
  email: string;
  name: string;
  passwordHash: string;
  demo: boolean;
}): SessionUser {
  const id = newId();
  const workspace = newId();
  const time = now();
  const { email, name, passwordHash, demo } = account;
  runtime().db.transaction(
    (tx) => {
      tx.insert(users).values({ id, email, name, passwordHash, demo, createdAt: time, passwordChangedAt: time }).run();
      tx.insert(groups)
        .values({
          id: workspace,
          slug: `own-${workspace}`,
          name: `${name}’s workspace`,
          personalOf: id,
          createdAt: time,
        })
        .run();
      tx.insert(memberships).values({ groupId: workspace, userId: id, role: 'lead', createdAt: time }).run();
    },
    { behavior: 'immediate' },
  );
  return { id, email, name, demo, workspace };
}

/**
 * Makes an account with its personal workspace and opens a session.
 * @throws Refusal bad-request with a sentence per field; rate.
 */
export async function signUp(
  viewer: Viewer,
  asked: NewAccount,
  agent: string,
): Promise<{ user: SessionUser; cookie: CookieToSet }> {
  const email = normaliseEmail(asked.email);
  const name = asked.name.trim();
  const fields: Record<string, string> = {};
  if (!EMAIL.test(email)) fields.email = 'Enter an e-mail address such as you@example.org.';
  if (name.length === 0 || name.length > 100) fields.name = 'Enter a name of 1 to 100 characters.';
  const problem = passwordProblem(asked.password, email);
  if (problem) fields.password = problem;
  if (Object.keys(fields).length > 0) throw formRefusal(fields);
  runtime().rates.take(
    `sign-up ${viewer.address}`,
    10,
    3_600,
    'Too many accounts were made from this address. Try again later.',
  );
  const passwordHash = await hashPassword(asked.password);
  const { db } = runtime();
  if (db.select({ id: users.id }).from(users).where(eq(users.email, email)).get())
    throw formRefusal({ email: 'There is an account with this address already. Sign in instead.' });
  const user = insertAccount({ email, name, passwordHash, demo: false });
  audit(viewer, 'account.made', user.id);
  keepVisitorResults(viewer, user);
  return { user, cookie: await openSession(user.id, viewer.address, agent) };
}

/** What a visitor computed in this browser goes into the new workspace. */
function keepVisitorResults(viewer: Viewer, user: SessionUser): void {
  if (!viewer.visitor) return;
  runtime()
    .db.$client.prepare(
      'UPDATE expansions SET group_id = ?, created_by = ?, visitor = NULL, expires_at = NULL WHERE visitor = ?',
    )
    .run(user.workspace, user.id, viewer.visitor);
}

/** @throws Refusal not-signed-in with one sentence for every cause; rate after many failures. */
export async function signIn(
  viewer: Viewer,
  asked: { email: string; password: string },
  agent: string,
): Promise<{ user: SessionUser; cookie: CookieToSet }> {
  const email = normaliseEmail(asked.email);
  const { rates, db } = runtime();
  const tooMany = 'Too many tries. Wait a little before the next one.';
  rates.take(`sign-in ${viewer.address}`, 30, 600, tooMany);
  rates.take(`sign-in account ${sha256(email)}`, 10, 300, tooMany);
  const row = db.select().from(users).where(eq(users.email, email)).get();
  const usable = row && Buffer.byteLength(asked.password) <= 1_024 && (!row.demo || demoEnabled());
  const matches = await passwordMatches(usable ? row.passwordHash : null, asked.password.slice(0, 1_024));
  if (!usable || !matches) {
    audit(viewer, 'sign-in.failed', row?.id ?? 'unknown account');
    throw new Refusal('not-signed-in', WRONG);
  }
  if (needsRehash(row.passwordHash))
    db.update(users)
      .set({ passwordHash: await hashPassword(asked.password) })
      .where(eq(users.id, row.id))
      .run();
  const user = userOf({ id: row.id, email: row.email, name: row.name, demo: row.demo });
  keepVisitorResults(viewer, user);
  audit({ ...viewer, user }, 'sign-in', user.id);
  return { user, cookie: await openSession(user.id, viewer.address, agent) };
}

/** A person with their personal workspace. */
export function userOf(row: Omit<SessionUser, 'workspace'>): SessionUser {
  const own = runtime().db.select({ id: groups.id }).from(groups).where(eq(groups.personalOf, row.id)).get();
  if (!own) throw new Error(`user ${row.id} has no personal workspace`);
  return { ...row, workspace: own.id };
}

/** Changes the password and ends all other sessions. @throws Refusal bad-request with a sentence per field. */
export async function changePassword(viewer: Viewer, asked: { current: string; next: string }): Promise<void> {
  const user = requireUser(viewer);
  const { db, rates } = runtime();
  if (user.demo) throw new Refusal('not-allowed', 'The password of a demo account is public and stays as it is.');
  rates.take(`password ${user.id}`, 10, 300, 'Too many tries. Wait a little before the next one.');
  const problem = passwordProblem(asked.next, user.email);
  if (problem) throw formRefusal({ next: problem });
  const row = db.select().from(users).where(eq(users.id, user.id)).get();
  if (!row || !(await passwordMatches(row.passwordHash, asked.current.slice(0, 1_024))))
    throw formRefusal({ current: 'This is not your present password.' });
  const passwordHash = await hashPassword(asked.next);
  db.update(users).set({ passwordHash, passwordChangedAt: now() }).where(eq(users.id, user.id)).run();
  endOtherSessions(viewer);
  audit(viewer, 'password.changed', user.id);
}

/** @throws Refusal bad-request with a sentence per field. */
export function updateProfile(viewer: Viewer, asked: { name: string }): void {
  const user = requireUser(viewer);
  const name = asked.name.trim();
  if (name.length === 0 || name.length > 100) throw formRefusal({ name: 'Enter a name of 1 to 100 characters.' });
  runtime()
    .db.update(users)
    .set({ name })
    .where(and(eq(users.id, user.id)))
    .run();
}

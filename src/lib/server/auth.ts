import { DrizzleSQLiteAdapter } from '@lucia-auth/adapter-drizzle';
import { type Adapter, type DatabaseSession, Lucia, TimeSpan } from 'lucia';
import type { Database } from '#db/open.ts';
import { sessions, users } from '#db/schema.ts';
import { newId, newSecret, now, sha256 } from './ids.ts';
import { runtime } from './runtime.ts';

/**
 * Sessions: the only module that knows lucia. The cookie holds a random secret; the database holds its SHA-256, so
 * a copy of the database opens nothing. A session lasts 14 days from its last use and 60 days from sign-in.
 */
const IDLE_DAYS = 14;
const ABSOLUTE_MS = 60 * 86_400_000;
/** last_seen_at is written at most this often. */
const SEEN_MS = 300_000;

interface SessionColumns {
  publicId: string;
  createdAt: string;
  lastSeenAt: string;
  address: string;
  agent: string;
}

interface UserColumns {
  email: string;
  name: string;
  demo: boolean;
}

declare module 'lucia' {
  interface Register {
    Lucia: Lucia<SessionColumns, UserColumns>;
    DatabaseSessionAttributes: SessionColumns;
    DatabaseUserAttributes: UserColumns;
  }
}

/** The stock adapter with every session id hashed on its way to the table. */
class HashingAdapter implements Adapter {
  readonly #inner: DrizzleSQLiteAdapter;

  constructor(db: Database) {
    this.#inner = new DrizzleSQLiteAdapter(db, sessions, users);
  }

  async getSessionAndUser(secret: string) {
    const [session, user] = await this.#inner.getSessionAndUser(sha256(secret));
    return [session && { ...session, id: secret }, user] as Awaited<ReturnType<Adapter['getSessionAndUser']>>;
  }
  getUserSessions(userId: string) {
    return this.#inner.getUserSessions(userId);
  }
  setSession(session: DatabaseSession) {
    return this.#inner.setSession({ ...session, id: sha256(session.id) });
  }
  updateSessionExpiration(secret: string, expiresAt: Date) {
    return this.#inner.updateSessionExpiration(sha256(secret), expiresAt);
  }
  deleteSession(secret: string) {
    return this.#inner.deleteSession(sha256(secret));
  }
  deleteUserSessions(userId: string) {
    return this.#inner.deleteUserSessions(userId);
  }
  deleteExpiredSessions() {
    return this.#inner.deleteExpiredSessions();
  }
}

const made = new WeakMap<Database, Lucia<SessionColumns, UserColumns>>();

function lucia(): Lucia<SessionColumns, UserColumns> {
  const { db, config } = runtime();
  const known = made.get(db);
  if (known) return known;
  const secure = config.secureCookies;
  const fresh = new Lucia<SessionColumns, UserColumns>(new HashingAdapter(db), {
    sessionExpiresIn: new TimeSpan(IDLE_DAYS, 'd'),
    sessionCookie: {
      name: secure ? '__Host-session' : 'session',
      attributes: { secure, sameSite: 'lax', path: '/' },
    },
    getSessionAttributes: ({ publicId, createdAt, lastSeenAt, address, agent }) => ({
      publicId,
      createdAt,
      lastSeenAt,
      address,
      agent,
    }),
    getUserAttributes: ({ email, name, demo }) => ({ email, name, demo }),
  });
  made.set(db, fresh);
  return fresh;
}

export interface CookieToSet {
  name: string;
  value: string;
  attributes: {
    httpOnly?: boolean;
    secure?: boolean;
    sameSite?: 'lax' | 'strict' | 'none';
    path?: string;
    maxAge?: number;
  };
}

const cookieOf = (cookie: { name: string; value: string; attributes: object }): CookieToSet => ({
  name: cookie.name,
  value: cookie.value,
  attributes: cookie.attributes,
});

/** Opens a session and answers its cookie. */
export async function openSession(userId: string, address: string, agent: string): Promise<CookieToSet> {
  const time = now();
  const attributes = { publicId: newId(), createdAt: time, lastSeenAt: time, address, agent: agent.slice(0, 300) };
  const session = await lucia().createSession(userId, attributes, { sessionId: newSecret() });
  return cookieOf(lucia().createSessionCookie(session.id));
}

export interface OpenSession {
  user: { id: string; email: string; name: string; demo: boolean };
  publicId: string;
  /** Set it again when the session was prolonged. */
  cookie: CookieToSet | null;
}

/** The session of a request's cookies, or null. */
export async function sessionOf(cookieHeader: string): Promise<OpenSession | null> {
  const secret = lucia().readSessionCookie(cookieHeader);
  if (!secret || !/^[0-9a-f]{40}$/.test(secret)) return null;
  const { session, user } = await lucia().validateSession(secret);
  if (!session) return null;
  if (Date.now() - Date.parse(session.createdAt) > ABSOLUTE_MS) {
    await lucia().invalidateSession(secret);
    return null;
  }
  if (Date.now() - Date.parse(session.lastSeenAt) > SEEN_MS)
    runtime()
      .db.$client.prepare('UPDATE sessions SET last_seen_at = ? WHERE public_id = ?')
      .run(now(), session.publicId);
  return {
    user: { id: user.id, email: user.email, name: user.name, demo: user.demo },
    publicId: session.publicId,
    cookie: session.fresh ? cookieOf(lucia().createSessionCookie(secret)) : null,
  };
}

/** Ends the session of a request's cookies. @returns the blank cookie to set. */
export async function closeSession(cookieHeader: string): Promise<CookieToSet> {
  const secret = lucia().readSessionCookie(cookieHeader);
  if (secret) await lucia().invalidateSession(secret);
  return cookieOf(lucia().createBlankSessionCookie());
}

export const removeExpiredSessions = (): Promise<void> => lucia().deleteExpiredSessions();

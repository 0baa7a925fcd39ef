import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { ExpansionRequest } from '#contract/request.ts';
import { expansions, groups, memberships, models, users } from '#db/schema.ts';
import { DEMO_ACCOUNTS, DEMO_PASSWORD, insertAccount, userOf } from './accounts.ts';
import { DEMO_MODELS, type DemoModel } from './demo.ts';
import { createExpansion, getExpansion } from './expansions.ts';
import { newId, now } from './ids.ts';
import { createModel } from './models.ts';
import { hashPassword } from './password.ts';
import { errorOf } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Role, SessionUser, Viewer } from './viewer.ts';

const GROUP = { slug: 'saltmarsh', name: 'Saltmarsh group' };
const WAIT_MS = 60_000;

async function account(email: string): Promise<SessionUser> {
  const known = runtime().db.select().from(users).where(eq(users.email, email)).get();
  if (known) return userOf({ id: known.id, email, name: known.name, demo: known.demo });
  const role = email.split('@')[0]!;
  const name = `Saltmarsh ${role}`;
  return insertAccount({ email, name, passwordHash: await hashPassword(DEMO_PASSWORD), demo: true });
}

/** The group and its four members, each in the role of their name. @returns the group's id. */
async function group(): Promise<{ id: string; author: SessionUser }> {
  const { db } = runtime();
  const people = await Promise.all(DEMO_ACCOUNTS.map(account));
  const known = db.select().from(groups).where(eq(groups.slug, GROUP.slug)).get();
  const id = known?.id ?? newId();
  if (!known)
    db.insert(groups)
      .values({ id, ...GROUP, createdAt: now() })
      .run();
  for (const { email, id: userId } of people)
    db.insert(memberships)
      .values({ groupId: id, userId, role: email.split('@')[0] as Role, createdAt: now() })
      .onConflictDoNothing()
      .run();
  return { id, author: people.find(({ email }) => email.startsWith('author@'))! };
}

function modelId(viewer: Viewer, groupId: string, demo: DemoModel): string {
  const { db } = runtime();
  const known = db
    .select({ id: models.id })
    .from(models)
    .where(and(eq(models.groupId, groupId), eq(models.title, demo.title), isNull(models.deletedAt)))
    .get();
  if (known) return known.id;
  const { id } = createModel(viewer, demo);
  db.update(models).set({ visibility: 'public' }).where(eq(models.id, id)).run();
  return id;
}

async function ended(viewer: Viewer, id: string): Promise<string> {
  for (const until = Date.now() + WAIT_MS; Date.now() < until; ) {
    const { state } = getExpansion(viewer, id);
    if (state !== 'queued' && state !== 'running') return state;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  return 'running';
}

const requestOf = (demo: DemoModel, at: number): ExpansionRequest => ({
  ...demo.input,
  through: false,
  keep: 'connected',
  drop: [],
  with: [],
  ...demo.expansions[at]!.ask,
});

/**
 * Fills in the demo, as its members would: accounts, group, models, and expansions computed by the engine itself.
 * What is there already stays; a new engine adds its own results.
 */
export async function seedDemo(): Promise<{ computed: number; failed: string[] }> {
  const { id: groupId, author } = await group();
  // The author works in the group's workspace here, so that the group owns what is made.
  const viewer: Viewer = { user: { ...author, workspace: groupId }, session: null, visitor: null, address: 'seed' };
  const made: { id: string; title: string }[] = [];
  const failed: string[] = [];
  for (const demo of DEMO_MODELS) {
    const model = modelId(viewer, groupId, demo);
    demo.expansions.forEach(({ title }, at) => {
      try {
        const { expansion, created } = createExpansion(viewer, { request: requestOf(demo, at), title, modelId: model });
        if (created) made.push({ id: expansion.id, title });
      } catch (error) {
        failed.push(`${title}: ${errorOf(error).message}`);
      }
    });
  }
  const ids = made.map(({ id }) => id);
  if (ids.length > 0)
    runtime().db.update(expansions).set({ visibility: 'public' }).where(inArray(expansions.id, ids)).run();
  const states = await Promise.all(made.map(async ({ id, title }) => ({ title, state: await ended(viewer, id) })));
  const unfinished = states.filter(({ state }) => state !== 'complete').map(({ title, state }) => `${title}: ${state}`);
  return { computed: made.length - unfinished.length, failed: [...failed, ...unfinished] };
}

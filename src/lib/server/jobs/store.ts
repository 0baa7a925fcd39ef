import { and, eq, inArray, sql } from 'drizzle-orm';
import type { ErrorObject } from '#contract/errors.ts';
import type { JobEnd, StoredDiagram } from '#contract/job.ts';
import type { Database } from '#db/open.ts';
import { bodies, expansions, jobs } from '#db/schema.ts';
import { now } from '../ids.ts';

export type JobRow = typeof jobs.$inferSelect;

const WAITING = ['queued', 'running'] as const;
/** Rows removed in one transaction: a few milliseconds, so that requests never wait behind a removal. */
const SWEEP_ROWS = 2_000;
const MAX_ATTEMPTS = 3;

/** Every write a computation makes to the database. One chunk is one transaction; the last one flips the state. */
export class JobStore {
  readonly #db: Database;
  readonly #insert;

  constructor(db: Database) {
    this.#db = db;
    this.#insert = db.$client.prepare(
      `INSERT INTO diagrams (body_id, position, label, body, loops, symmetry_factor, weight, pairings, order_key, shape, flags, picture)
       VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    );
  }

  queued(): JobRow[] {
    return this.#db.select().from(jobs).where(eq(jobs.state, 'queued')).orderBy(jobs.createdAt, jobs.id).all();
  }

  requestOf(job: JobRow): { request: string; title: string } | undefined {
    return this.#db
      .select({ request: expansions.request, title: expansions.title })
      .from(expansions)
      .where(eq(expansions.id, job.expansionId))
      .get();
  }

  /** queued → running, for the job and everyone who waits for it. */
  begin(job: JobRow): void {
    this.#db.transaction(
      (tx) => {
        tx.update(jobs)
          .set({ state: 'running', startedAt: now(), attempts: job.attempts + 1 })
          .where(eq(jobs.id, job.id))
          .run();
        tx.update(expansions)
          .set({ state: 'running' })
          .where(and(eq(expansions.bodyId, job.bodyId), inArray(expansions.state, [...WAITING])))
          .run();
      },
      { behavior: 'immediate' },
    );
  }

  addChunk(bodyId: number, rows: readonly StoredDiagram[]): void {
    const write = this.#db.$client.transaction(() => {
      for (const row of rows)
        this.#insert.run(
          bodyId,
          row.position,
          row.label,
          row.body,
          row.loops,
          row.symmetryFactor,
          row.weight,
          row.pairings,
          row.order,
          row.shape,
          row.flags,
          row.picture,
        );
    });
    // Nobody is promised a chunk: the log is flushed by the final transaction, which covers all that came before it.
    this.#db.$client.pragma('synchronous = NORMAL');
    try {
      write.immediate();
    } finally {
      this.#db.$client.pragma('synchronous = FULL');
    }
  }

  /**
   * The final transaction: summary, ledger and state of the body, the job and all expansions that wait for it.
   *
   * @returns the state they are in now. @throws Error when the rows on disk are not those that were counted.
   */
  complete(job: JobRow, end: Extract<JobEnd, { ok: true }>, milliseconds: number): 'complete' | 'unbalanced' {
    const state = end.balanced ? 'complete' : 'unbalanced';
    const finishedAt = now();
    this.#db.transaction(
      (tx) => {
        const rows = tx.get<{ rows: number }>(
          sql`SELECT count(*) AS rows FROM diagrams WHERE body_id = ${job.bodyId}`,
        ).rows;
        if (rows !== end.classes) throw new Error(`${rows} diagrams are stored, ${end.classes} were counted`);
        tx.update(bodies)
          .set({ state, classes: end.classes, summary: end.summary, ledger: end.ledger, milliseconds, finishedAt })
          .where(eq(bodies.id, job.bodyId))
          .run();
        tx.update(jobs).set({ state: 'complete', finishedAt }).where(eq(jobs.id, job.id)).run();
        tx.update(expansions)
          .set({ state, finishedAt })
          .where(and(eq(expansions.bodyId, job.bodyId), inArray(expansions.state, [...WAITING])))
          .run();
      },
      { behavior: 'immediate' },
    );
    return state;
  }

  /** Ends a job without a result; its body is given up and removed piece by piece. */
  abandon(job: JobRow, state: 'failed' | 'cancelled' | 'interrupted', error: ErrorObject | null): void {
    const finishedAt = now();
    this.#db.transaction(
      (tx) => {
        tx.update(jobs).set({ state, finishedAt }).where(eq(jobs.id, job.id)).run();
        tx.update(expansions)
          .set({ state, finishedAt, error: error && JSON.stringify(error) })
          .where(and(eq(expansions.bodyId, job.bodyId), inArray(expansions.state, [...WAITING])))
          .run();
        tx.update(expansions).set({ bodyId: null }).where(eq(expansions.bodyId, job.bodyId)).run();
        tx.update(bodies)
          .set({ state: 'abandoned', contentHash: sql`'abandoned ' || ${bodies.id}` })
          .where(eq(bodies.id, job.bodyId))
          .run();
      },
      { behavior: 'immediate' },
    );
  }

  /** Marks finished bodies without any expansion (all expired) for removal. @returns how many. */
  abandonUnused(): number {
    return this.#db.$client
      .prepare(
        `UPDATE bodies SET state = 'abandoned', content_hash = 'abandoned ' || id WHERE state = 'complete'
         AND NOT EXISTS (SELECT 1 FROM expansions WHERE expansions.body_id = bodies.id)`,
      )
      .run().changes;
  }

  /** Removes some rows of one body. @returns whether more are left. */
  #sweepRows(bodyId: number): boolean {
    const { changes } = this.#db.$client
      .prepare(
        'DELETE FROM diagrams WHERE body_id = ? AND position IN (SELECT position FROM diagrams WHERE body_id = ? LIMIT ?)',
      )
      .run(bodyId, bodyId, SWEEP_ROWS);
    return changes === SWEEP_ROWS;
  }

  /** One step of removing abandoned bodies. @returns whether there is more to do. */
  sweep(): boolean {
    const body = this.#db.select({ id: bodies.id }).from(bodies).where(eq(bodies.state, 'abandoned')).limit(1).get();
    if (!body) return false;
    if (!this.#sweepRows(body.id)) this.#db.delete(bodies).where(eq(bodies.id, body.id)).run();
    return true;
  }

  /**
   * After a crash: what was running starts again from nothing (its partial rows go), unless it has been tried
   * too often, which makes it interrupted. Nothing partial can ever be read as complete: only `complete` says so.
   */
  recover(): { requeued: number; interrupted: number } {
    const running = this.#db.select().from(jobs).where(eq(jobs.state, 'running')).all();
    let requeued = 0;
    for (const job of running) {
      if (job.attempts >= MAX_ATTEMPTS) {
        this.abandon(job, 'interrupted', {
          code: 'interrupted',
          message:
            'The server stopped several times while this was computed, so it was given up. You can start it again.',
          line: null,
          column: null,
        });
        continue;
      }
      while (this.#sweepRows(job.bodyId));
      this.#db.transaction((tx) => {
        tx.update(jobs).set({ state: 'queued', startedAt: null }).where(eq(jobs.id, job.id)).run();
        tx.update(expansions)
          .set({ state: 'queued' })
          .where(and(eq(expansions.bodyId, job.bodyId), eq(expansions.state, 'running')))
          .run();
      });
      requeued++;
    }
    return { requeued, interrupted: running.length - requeued };
  }
}

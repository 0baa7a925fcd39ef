import { type ErrorObject, errorObject } from '#contract/errors.ts';
import type { JobAcknowledgement, JobEnd, JobMessage, JobTask, StoredDiagram } from '#contract/job.ts';
import { prepare, runExpansion } from '#engine/index.ts';
import { misbehave } from './misbehave.ts';
import { assertRules } from './symbolic.ts';

/** Few enough that the server stores them in a few milliseconds, between requests. */
const CHUNK_ROWS = 100;
/** Rows go out at least this often, so that the first diagrams are seen at once. */
const CHUNK_MS = 150;
/** Diagrams that are laid out here, so that the server draws them at once; beyond them it lays out what is asked for. */
const PICTURES = 1_000;
/** Chunks that may be under way: the child never runs ahead of the disk. */
const WINDOW = 2;

// The server that owns this process is gone: nobody will store what is computed here.
process.on('disconnect', () => process.exit(0));

const post = (message: JobMessage): void => {
  process.send?.(message);
};

/** Sends rows and waits while too many chunks are unacknowledged. */
class Outlet {
  #rows: StoredDiagram[] = [];
  #sequence = 0;
  #stored = 0;
  #flushedAt = performance.now();
  #resume: (() => void) | null = null;

  constructor() {
    process.on('message', (message: JobAcknowledgement | { kind?: undefined } | null) => {
      if (message?.kind !== 'stored') return;
      this.#stored = message.sequence;
      this.#resume?.();
    });
  }

  /** @returns a promise only when there is something to wait for: the loop stays synchronous otherwise. */
  push(row: StoredDiagram): Promise<void> | null {
    this.#rows.push(row);
    const due = this.#rows.length >= CHUNK_ROWS || performance.now() - this.#flushedAt > CHUNK_MS;
    return due ? this.flush() : null;
  }

  async flush(limit = WINDOW): Promise<void> {
    if (this.#rows.length > 0) post({ kind: 'chunk', sequence: ++this.#sequence, rows: this.#rows });
    this.#rows = [];
    this.#flushedAt = performance.now();
    do {
      await new Promise<void>((resolve) => {
        this.#resume = resolve;
        // Acknowledgements arrive through the event loop, so let it turn even when the window is open.
        if (this.#sequence - this.#stored < limit) setImmediate(resolve);
      });
    } while (this.#sequence - this.#stored >= limit);
    this.#resume = null;
  }
}

async function expand(task: JobTask): Promise<JobEnd> {
  const prepared = prepare(task.request);
  const outlet = new Outlet();
  const run = runExpansion(prepared, { pictures: PICTURES });
  // The independent count comes first: nothing streams until it is done.
  post({ kind: 'progress', classes: 0, phase: 'counting' });
  let classes = 0;
  for (;;) {
    const step = run.next();
    if (step.done) {
      await outlet.flush(1);
      post({ kind: 'progress', classes, phase: 'checking the rules' });
      assertRules(prepared.model);
      post({ kind: 'progress', classes, phase: 'storing' });
      const { summary, ledger } = step.value;
      return {
        ok: true,
        classes,
        balanced: ledger.state !== 'unbalanced',
        summary: JSON.stringify(summary),
        ledger: JSON.stringify(ledger),
      };
    }
    if (++classes > task.maxClasses) return { ok: false, error: tooMany(task.maxClasses) };
    const wait = outlet.push(step.value);
    if (wait) await wait;
    if (task.misbehave === 'slow') await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

const tooMany = (limit: number): ErrorObject => ({
  code: 'limit',
  message: `This expansion has more than ${limit} diagrams, the limit for it; it was ended. Ask for a lower order, or keep or drop more.`,
  line: null,
  column: null,
});

/** Computes one expansion in a process of its own. Answers bad input and limits; anything else is a crash. */
export default async function job(task: JobTask): Promise<JobEnd> {
  if (task.misbehave) await misbehave(task.misbehave);
  try {
    return await expand(task);
  } catch (error) {
    const answer = errorObject(error);
    if (answer) return { ok: false, error: answer };
    throw error;
  }
}

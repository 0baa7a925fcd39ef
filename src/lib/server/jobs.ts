import { EventEmitter } from 'node:events';
import type { Logger } from 'pino';
import type { ExpansionEvent, ExpansionRecord } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import { type JobMessage, MISBEHAVIOURS, type Misbehaviour, type StoredDiagram } from '#contract/job.ts';
import { LIMITS } from '#contract/limits.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import type { Database } from '#db/open.ts';
import { crashError, type JobProcess, JobProcesses, memoryError, timeError } from './jobs/process.ts';
import { nextJob } from './jobs/queue.ts';
import { type JobRow, JobStore } from './jobs/store.ts';

export type Progress = ExpansionRecord['progress'];

export interface JobsOptions {
  slots: number;
  entry: string;
  heapMiB: number | null;
  seconds: number | null;
  testJobs: boolean;
}

interface Running {
  job: JobRow;
  process: JobProcess;
  progress: Progress;
  timedOut: boolean;
  /** Its end is written: what still comes from the process is dropped. */
  ended: boolean;
  /** First position that listeners have not been told of, and when they were last told. */
  untold: number;
  toldAt: number;
}

/** Listeners hear of progress at most this often. */
const TELL_MS = 150;
const TEST_TITLE = 'test job: ';

/**
 * The queue of computations. The server owns every job: it goes on when nobody looks, is stored in chunks as it comes,
 * survives a restart, and ends with a sentence when it needs too much time or memory.
 */
export class Jobs {
  readonly #store: JobStore;
  readonly #processes: JobProcesses;
  readonly #running = new Map<number, Running>();
  readonly #events = new EventEmitter().setMaxListeners(0);
  readonly #lastServed = new Map<string, number>();
  #closing = false;
  #sweeping = false;

  constructor(
    db: Database,
    private readonly log: Logger,
    private readonly options: JobsOptions,
  ) {
    this.#store = new JobStore(db);
    this.#processes = new JobProcesses({
      slots: options.slots,
      entry: options.entry,
      heapMiB: this.heapMiB,
    });
  }

  private get heapMiB(): number {
    return this.options.heapMiB ?? LIMITS.job.heapMiB;
  }

  /** At start: takes up what a crash or stop left, then runs what waits. */
  recover(): void {
    const found = this.#store.recover();
    if (found.requeued + found.interrupted > 0) this.log.info(found, 'took up unfinished jobs');
    this.#sweepSoon();
    this.wake();
  }

  /** Starts waiting jobs while there is room. Call it after adding one. */
  wake(): void {
    while (!this.#closing && this.#running.size < this.options.slots) {
      const job = nextJob(
        this.#store.queued().filter(({ bodyId }) => !this.#running.has(bodyId)),
        [...this.#running.values()].map((entry) => entry.job.owner),
        this.#lastServed,
      );
      if (!job) return;
      this.#lastServed.set(job.owner, performance.now());
      void this.#run(job);
    }
  }

  /** Ends the job of a body, running or waiting. The expansions that wait for it become cancelled. */
  cancel(bodyId: number): void {
    const running = this.#running.get(bodyId);
    const job = running?.job ?? this.#store.queued().find((entry) => entry.bodyId === bodyId);
    if (!job) return;
    this.#store.abandon(job, 'cancelled', null);
    if (running) {
      running.ended = true;
      running.process.kill();
    }
    this.#emit(bodyId, { type: 'state', state: 'cancelled' });
    this.#sweepSoon();
  }

  /** Gives up complete bodies that no expansion refers to any more. */
  abandonUnused(): void {
    if (this.#store.abandonUnused() > 0) this.#sweepSoon();
  }

  progressOf(bodyId: number): Progress | null {
    return this.#running.get(bodyId)?.progress ?? null;
  }

  /** @returns a function that ends the subscription. */
  subscribe(bodyId: number, listener: (event: ExpansionEvent) => void): () => void {
    this.#events.on(String(bodyId), listener);
    return () => this.#events.off(String(bodyId), listener);
  }

  get busy(): number {
    return this.#running.size;
  }

  /** Stops all processes; what was running is taken up at the next start. */
  async close(): Promise<void> {
    this.#closing = true;
    const ends = [...this.#running.values()].map(({ process }) => {
      process.kill();
      return process.end;
    });
    await Promise.all(ends);
    await this.#processes.close();
  }

  #emit(bodyId: number, event: ExpansionEvent): void {
    this.#events.emit(String(bodyId), event);
  }

  async #run(job: JobRow): Promise<void> {
    const asked = this.#store.requestOf(job);
    if (!asked) return this.#store.abandon(job, 'failed', crashError);
    this.#store.begin(job);
    this.#emit(job.bodyId, { type: 'state', state: 'running' });
    const progress: Progress = { classes: 0, estimated: job.estimated, fraction: 0, phase: 'starting' };
    const task = {
      request: JSON.parse(asked.request) as ExpansionRequest,
      maxClasses: job.classes,
      misbehave: this.#misbehaviour(asked.title),
    };
    const started = performance.now();
    const process = this.#processes.start(task, (message) => this.#onMessage(job, message));
    const running: Running = { job, process, progress, timedOut: false, ended: false, untold: 1, toldAt: 0 };
    this.#running.set(job.bodyId, running);
    const clock = setTimeout(() => {
      running.timedOut = true;
      process.kill();
    }, this.#seconds(job) * 1000);
    try {
      await this.#finish(running, started);
    } catch (error) {
      this.log.error({ err: error, job: job.id }, 'a job could not be finished');
      if (!this.#closing) this.#fail(running, crashError);
    } finally {
      clearTimeout(clock);
      this.#running.delete(job.bodyId);
      this.wake();
    }
  }

  #seconds(job: JobRow): number {
    return Math.min(job.seconds, this.options.seconds ?? LIMITS.job.seconds);
  }

  #onMessage(job: JobRow, message: JobMessage): void {
    const running = this.#running.get(job.bodyId);
    if (!running || running.ended || this.#closing) return;
    const { progress } = running;
    if (message.kind === 'chunk') {
      if (!this.#stored(running, message.rows)) return;
      progress.classes = message.rows.at(-1)!.position;
      progress.phase = 'diagrams';
    } else {
      progress.classes = Math.max(progress.classes, message.classes);
      progress.phase = message.phase;
    }
    // Never quite done before it is: the estimate may be short.
    if (progress.estimated)
      progress.fraction = Math.max(progress.fraction ?? 0, Math.min(0.99, progress.classes / progress.estimated));
    if (performance.now() - running.toldAt > TELL_MS) this.#tell(running);
  }

  /** Tells listeners how far it is; not at every chunk, which may come a hundred times a second. */
  #tell(running: Running): void {
    const { job, progress } = running;
    running.toldAt = performance.now();
    if (progress.classes >= running.untold)
      this.#emit(job.bodyId, { type: 'diagrams', from: running.untold, to: progress.classes });
    running.untold = progress.classes + 1;
    this.#emit(job.bodyId, { type: 'progress', progress: { ...progress } });
  }

  /** A full disk or a defect ends the job, not the server. */
  #stored(running: Running, rows: readonly StoredDiagram[]): boolean {
    try {
      this.#store.addChunk(running.job.bodyId, rows);
      return true;
    } catch (error) {
      this.log.error({ err: error, job: running.job.id }, 'a chunk could not be stored');
      this.#fail(running, crashError);
      running.process.kill();
      return false;
    }
  }

  async #finish(running: Running, started: number): Promise<void> {
    const { job, process } = running;
    const end = await process.end;
    if (this.#closing || running.ended) return;
    if ('ended' in end) {
      if (running.timedOut) this.#fail(running, timeError(this.#seconds(job)));
      else if (end.ended === 'memory') this.#fail(running, memoryError(this.heapMiB));
      else this.#fail(running, crashError);
      return;
    }
    if (!end.ok) return this.#fail(running, end.error);
    const state = this.#store.complete(job, end, Math.round(performance.now() - started));
    if (state === 'unbalanced') this.log.error({ job: job.id, body: job.bodyId }, 'a ledger does not balance');
    this.#tell(running);
    this.#emit(job.bodyId, { type: 'state', state });
  }

  #fail(running: Running, error: ErrorObject): void {
    const { job } = running;
    running.ended = true;
    if (error.code === 'defect') this.log.error({ job: job.id }, 'a job crashed');
    this.#store.abandon(job, 'failed', error);
    this.#emit(job.bodyId, { type: 'state', state: 'failed' });
    this.#sweepSoon();
  }

  #misbehaviour(title: string): Misbehaviour | null {
    if (!this.options.testJobs || !title.startsWith(TEST_TITLE)) return null;
    return MISBEHAVIOURS.find((kind) => kind === title.slice(TEST_TITLE.length)) ?? null;
  }

  /** Removes given-up rows a few at a time, between requests. */
  #sweepSoon(): void {
    if (this.#sweeping) return;
    this.#sweeping = true;
    const step = () => {
      if (!this.#closing && this.#store.sweep()) setTimeout(step, 5);
      else this.#sweeping = false;
    };
    setTimeout(step, 5);
  }
}

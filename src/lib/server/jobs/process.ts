import { readFileSync } from 'node:fs';
import { Tinypool } from 'tinypool';
import type { ErrorObject } from '#contract/errors.ts';
import type { JobAcknowledgement, JobEnd, JobMessage, JobTask } from '#contract/job.ts';

const PAGE = 4_096;
const MIB = 1_048_576;
/** Memory outside the heap (buffers, code) that a job may have on top of its heap. */
const BESIDE_HEAP_MIB = 256;
const WATCH_MS = 250;

export interface ProcessLimits {
  slots: number;
  /** The bundled job entry. */
  entry: string;
  heapMiB: number;
}

export interface JobProcess {
  /** The job's own answer, or why its process ended without one. */
  readonly end: Promise<JobEnd | { ended: 'killed' | 'memory' | 'crash' }>;
  /** Ends the process at once, whatever it is doing. */
  kill(): void;
}

const refuse = (message: string): ErrorObject => ({ code: 'limit', message, line: null, column: null });

export const memoryError = (heapMiB: number): ErrorObject =>
  refuse(
    `The computation was ended: it needed more than ${heapMiB} MiB of memory, the limit for one expansion. Ask for a lower order, or keep or drop more.`,
  );

export const timeError = (seconds: number): ErrorObject =>
  refuse(
    `The computation was ended after ${seconds} s, the limit for one expansion. Ask for a lower order, or keep or drop more.`,
  );

export const crashError: ErrorObject = {
  code: 'defect',
  message:
    'The process that computed this ended unexpectedly. It has been written to the log; nothing partial was kept.',
  line: null,
  column: null,
};

/** Resident memory of a process in MiB, or 0 where it cannot be read. */
function residentMiB(pid: number): number {
  try {
    return (Number(readFileSync(`/proc/${pid}/statm`, 'utf8').split(' ')[1]) * PAGE) / MIB;
  } catch {
    return 0;
  }
}

/**
 * Child processes, one for each job: a thread would take the server down with it when memory runs out.
 * Each gets a heap limit, and a watch on its whole memory; the caller keeps the clock.
 */
export class JobProcesses {
  readonly #pool: Tinypool;
  readonly #limits: ProcessLimits;

  constructor(limits: ProcessLimits) {
    this.#limits = limits;
    this.#pool = new Tinypool({
      runtime: 'child_process',
      filename: limits.entry,
      minThreads: 0,
      // One more than the slots: a killed process may still be going when the next job starts.
      maxThreads: limits.slots + 1,
      isolateWorkers: true,
      execArgv: [`--max-old-space-size=${limits.heapMiB}`],
      env: { PATH: process.env.PATH ?? '', NODE_ENV: 'production' },
    });
    // A process that ends between jobs (killed from outside) is replaced at the next job: nothing to do.
    this.#pool.on('error', () => {});
  }

  start(task: JobTask, onMessage: (message: JobMessage) => void): JobProcess {
    const abort = new AbortController();
    let why: 'killed' | 'memory' | null = null;
    let send: (message: JobAcknowledgement) => void = () => {};
    const before = new Set(this.#pool.threads.map(({ threadId }) => threadId));
    const result: Promise<JobEnd> = this.#pool.run(task, {
      signal: abort.signal,
      channel: {
        onMessage: (listener) => {
          send = listener;
        },
        postMessage: (message: JobMessage) => {
          const began = performance.now();
          onMessage(message);
          if (message.kind !== 'chunk') return;
          // The next chunk may come after as long a pause as this one took: half of the time is everybody else's.
          const answer = () => send({ kind: 'stored', sequence: message.sequence });
          setTimeout(answer, performance.now() - began);
        },
      },
    });
    const child = this.#pool.threads.find(({ threadId }) => !before.has(threadId));
    let signal: string | null = null;
    child?.once('exit', (code: number | null, by: string | null) => {
      signal = by ?? (code === 134 ? 'SIGABRT' : null);
    });
    const stop = (reason: 'killed' | 'memory') => {
      why ??= reason;
      abort.abort();
      if (child) killNow(child.threadId);
    };
    const watch = setInterval(() => {
      if (child && residentMiB(child.threadId) > this.#limits.heapMiB + BESIDE_HEAP_MIB) stop('memory');
    }, WATCH_MS);
    watch.unref();
    const end = result
      .catch(async () => {
        // The exit event follows the error by a turn or two of the event loop.
        await new Promise((resolve) => setImmediate(resolve));
        if (why) return { ended: why };
        return { ended: signal === 'SIGABRT' || signal === 'SIGKILL' ? ('memory' as const) : ('crash' as const) };
      })
      .finally(() => clearInterval(watch));
    return { end, kill: () => stop('killed') };
  }

  async close(): Promise<void> {
    await this.#pool.destroy();
  }
}

/** A process that is busy or out of memory may ignore a polite signal. */
function killNow(pid: number): void {
  try {
    process.kill(pid, 'SIGKILL');
  } catch {
    // It has ended already.
  }
}

import type { ExpansionRecord } from '#contract/api.ts';
import { countWords, elapsedWords, timeWords } from '#features/compose/words.ts';

/** What the jobs page shows of a computation; a part of the record, so that the page stays small. */
export interface Job
  extends Pick<ExpansionRecord, 'id' | 'title' | 'state' | 'progress' | 'createdAt' | 'finishedAt' | 'mine'> {
  /** Time the computation took, when it is complete; a result taken from store took none. */
  readonly milliseconds: number | null;
  readonly reused: boolean;
  readonly failure: string | null;
  readonly classes: number | null;
}

export function jobOf(record: ExpansionRecord): Job {
  const { id, title, state, progress, createdAt, finishedAt, mine, milliseconds, reusedFrom, error, summary } = record;
  return {
    id,
    title,
    state,
    progress,
    createdAt,
    finishedAt,
    mine,
    milliseconds,
    reused: reusedFrom !== null,
    failure: error?.message ?? null,
    classes: summary?.classes ?? null,
  };
}

export const isUnderWay = ({ state }: Pick<Job, 'state'>): boolean => state === 'queued' || state === 'running';
export const mayRetry = ({ state }: Pick<Job, 'state'>): boolean =>
  state === 'failed' || state === 'cancelled' || state === 'interrupted';

/** The share that is done, 0 … 1, or null where it cannot be told. */
export function shareOf({ fraction, classes, estimated }: Job['progress']): number | null {
  if (fraction !== null) return Math.min(1, Math.max(0, fraction));
  return estimated === null || estimated <= 0 ? null : Math.min(1, classes / estimated);
}

/** How a computation stands, after its state, in a line. @param now milliseconds of the clock that createdAt is compared with */
export function standing(job: Job, now: number): string {
  const { state, progress, createdAt } = job;
  if (state === 'queued') return `${elapsedWords(now - Date.parse(createdAt))} so far`;
  if (state === 'running') {
    const expected = progress.estimated === null ? '' : ` of ${countWords(progress.estimated, 'estimate')}`;
    const so = expected === '' ? countWords(progress.classes, 'exact') : String(progress.classes);
    return `${so}${expected}, ${elapsedWords(now - Date.parse(createdAt))}`;
  }
  return ended(job);
}

function ended({ state, classes, milliseconds, reused, failure }: Job): string {
  if (state === 'complete') {
    const how = reused ? 'taken from store' : `computed in ${timeWords((milliseconds ?? 0) / 1000)}`;
    return `${countWords(classes ?? 0, 'exact')}, ${how}, balanced`;
  }
  if (state === 'unbalanced')
    return 'Its ledger does not balance: a defect of the program, which has been written to the log.';
  return failure ?? 'without a result';
}

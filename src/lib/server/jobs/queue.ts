import { LIMITS } from '#contract/limits.ts';
import type { JobRow } from './store.ts';

/**
 * The next job to run: of the people who have something waiting, whoever has the fewest jobs running, and among equals
 * whoever was served longest ago; of theirs, the oldest. Nobody has more than their share while others wait.
 *
 * @param waiting in order of arrival. @param runningOwners one entry for each running job.
 */
export function nextJob(
  waiting: readonly JobRow[],
  runningOwners: readonly string[],
  lastServed: ReadonlyMap<string, number>,
): JobRow | null {
  const running = new Map<string, number>();
  for (const owner of runningOwners) running.set(owner, (running.get(owner) ?? 0) + 1);
  const load = (job: JobRow) => running.get(job.owner) ?? 0;
  const served = (job: JobRow) => lastServed.get(job.owner) ?? 0;
  let best: JobRow | null = null;
  for (const job of waiting) {
    if (load(job) >= LIMITS.member.running) continue;
    if (best === null || load(job) < load(best) || (load(job) === load(best) && served(job) < served(best))) best = job;
  }
  return best;
}

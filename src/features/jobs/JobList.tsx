import { useEffect, useState } from 'react';
import type { ExpansionRecord, Page } from '#contract/api.ts';
import { useAlive } from '#features/model/hooks.ts';
import { isUnderWay, type Job, jobOf, mayRetry, shareOf, standing } from './rows.ts';

interface Props {
  readonly jobs: readonly Job[];
  /** The server's clock when it wrote the page, in milliseconds. */
  readonly now: number;
}

const FAST_MS = 1_000;
const SLOW_MS = 10_000;

/**
 * Computations under way and ended. Asks again each second while something runs and the page is looked at. What is done to
 * one goes through plain forms, so that it works without JavaScript and nothing is done twice.
 */
export default function JobList({ jobs: first, now: firstNow }: Props) {
  const [jobs, setJobs] = useState(first);
  const [now, setNow] = useState(firstNow);
  const [failed, setFailed] = useState(false);
  const alive = useAlive();
  const running = jobs.filter(isUnderWay);
  const busy = running.length > 0;

  // biome-ignore lint/correctness/useExhaustiveDependencies: the timer starts anew when what runs changes, not at each look
  useEffect(() => {
    const control = new AbortController();
    const look = async () => {
      if (document.hidden) return;
      try {
        setJobs(await lookAgain(jobs, control.signal));
        setFailed(false);
      } catch {
        if (!control.signal.aborted) setFailed(true);
      }
      setNow(Date.now());
    };
    const timer = setInterval(look, busy ? FAST_MS : SLOW_MS);
    return () => {
      clearInterval(timer);
      control.abort();
    };
  }, [idsOf(running)]);

  return (
    <>
      <p role="status" className="sr-only">
        {alive ? `${running.length} under way` : ''}
      </p>
      {failed && <p className="notice notice-caution">The server does not answer; what stands here may be old.</p>}
      <Group title="Under way" jobs={running} now={now} none="Nothing is being computed." />
      <Group title="Ended" jobs={jobs.filter((job) => !isUnderWay(job))} now={now} none="Nothing has ended yet." />
      {busy && (
        <p className="mt-6 only-scriptless">
          <a className="btn" href="/jobs">
            Look again
          </a>
        </p>
      )}
    </>
  );
}

async function fetchJobs(state: 'active' | 'ended', limit: number, signal: AbortSignal): Promise<readonly Job[]> {
  const reply = await fetch(`/api/v1/expansions?mine=true&state=${state}&limit=${limit}`, { signal });
  if (!reply.ok) throw new Error(`the server answered ${reply.status}`);
  return ((await reply.json()) as Page<ExpansionRecord>).items.map(jobOf);
}

const idsOf = (jobs: readonly Job[]): string => jobs.map(({ id }) => id).join(' ');

/** The jobs as they are now. Ended ones are large and do not change: they are asked for only when one may have been added. */
async function lookAgain(before: readonly Job[], signal: AbortSignal): Promise<readonly Job[]> {
  const active = await fetchJobs('active', 60, signal);
  const same = active.length > 0 && idsOf(active) === idsOf(before.filter(isUnderWay));
  const ended = same ? before.filter((job) => !isUnderWay(job)) : await fetchJobs('ended', 20, signal);
  return [...active, ...ended];
}

interface GroupProps {
  readonly title: string;
  readonly jobs: readonly Job[];
  readonly now: number;
  readonly none: string;
}

function Group({ title, jobs, now, none }: GroupProps) {
  return (
    <section className="mt-8" aria-label={title}>
      <h2 className="eyebrow mb-2">
        {title}
        {jobs.length > 0 && ` · ${jobs.length}`}
      </h2>
      {jobs.length === 0 ? (
        <p className="quiet">{none}</p>
      ) : (
        <ul>
          {jobs.map((job) => (
            <Row key={job.id} job={job} now={now} />
          ))}
        </ul>
      )}
    </section>
  );
}

function Row({ job, now }: { readonly job: Job; readonly now: number }) {
  const share = shareOf(job.progress);
  return (
    <li className="job">
      <div className="job-words">
        <a href={`/expansions/${job.id}`}>{job.title}</a>
        {isUnderWay(job) && (
          <progress
            className="meter"
            aria-label={`Progress of ${job.title}`}
            max={1}
            {...(share === null ? {} : { value: share })}
          />
        )}
        <p className="quiet">
          <span className={`state state-${job.state}`}>{STATES[job.state]}</span> · {standing(job, now)}
          {job.finishedAt && ` · ${whenOf(job.finishedAt)}`}
        </p>
      </div>
      {job.mine && (
        <form method="post" action="/jobs" className="row">
          <input type="hidden" name="id" value={job.id} />
          {isUnderWay(job) && <Act intent="cancel" of={job.title} label="Cancel" />}
          {mayRetry(job) && <Act intent="retry" of={job.title} label="Try again" />}
        </form>
      )}
    </li>
  );
}

/** A stored time for people: minutes, UTC. */
const whenOf = (time: string): string => `${time.slice(0, 10)} ${time.slice(11, 16)} UTC`;

const Act = ({ intent, label, of }: { readonly intent: string; readonly label: string; readonly of: string }) => (
  <button type="submit" name="intent" value={intent} className="btn btn-small" aria-label={`${label}: ${of}`}>
    {label}
  </button>
);

const STATES: Readonly<Record<Job['state'], string>> = {
  queued: 'Waiting',
  running: 'Running',
  complete: 'Complete',
  failed: 'Failed',
  cancelled: 'Cancelled',
  interrupted: 'Interrupted',
  unbalanced: 'Unbalanced',
};

import type { ExpansionRecord } from '#contract/api.ts';

export const many = (count: number, one: string, more = `${one}s`): string =>
  `${count.toLocaleString('en-GB')} ${count === 1 ? one : more}`;

/** "3 ms", "1.4 s", "2 min 5 s"; rounded before it is split, so that no part reaches its next unit. */
export function duration(milliseconds: number): string {
  const whole = Math.max(1, Math.round(milliseconds));
  if (whole < 1000) return `${whole} ms`;
  if (whole < 59_950) return `${(whole / 1000).toFixed(1)} s`;
  const seconds = Math.round(whole / 1000);
  return `${Math.floor(seconds / 60)} min ${seconds % 60} s`;
}

const PROOF = {
  balanced:
    'The sum of all 1/S equals the coefficient of the zero-dimensional theory, computed without generating any diagram, content by content: no diagram is missing, none stands twice, and no factor is wrong.',
  rests:
    'No closed form is known for this cut of the list. It rests on the whole list before the cut, which equals the coefficient of the zero-dimensional theory, content by content.',
  unbalanced:
    'The list and the independent count disagree. This is a defect of the program: do not use this list. It is kept for diagnosis.',
} as const;

/** One paragraph: what the ledger proves, how and when the result was computed. */
export function standing({ ledger, engine, finishedAt, milliseconds, reusedFrom }: ExpansionRecord): string[] {
  if (!ledger) return [];
  const when = finishedAt ? ` on ${finishedAt.slice(0, 10)}` : '';
  const took = milliseconds === null ? '' : ` in ${duration(milliseconds)}`;
  const reused = reusedFrom
    ? ' The list was computed before, for a model that is the same up to names and order of terms, and is shown here with the names of this one.'
    : '';
  return [
    PROOF[ledger.state],
    `Computed by ${engine.name} ${engine.version}${when}${took}.${reused}`,
    'Nobody has countersigned it yet.',
  ];
}

export const CAUTIONS = [
  'A ledger proves counting, not physics: that the list is complete and its weights are right.',
  'The perturbative series is asymptotic; results hold within its range, and scheme, scale and normalisation matter.',
] as const;

/** What is told where a list would stand, by state. */
export function stateText({
  state,
  progress,
  error,
}: ExpansionRecord): { title: string; text: string; tone: 'plain' | 'caution' | 'bad' } | null {
  switch (state) {
    case 'queued':
      return {
        title: 'Waiting for its turn',
        text: 'It starts as soon as a place is free. You may close this page.',
        tone: 'plain',
      };
    case 'running':
      return {
        title: `Computing: ${many(progress.classes, 'diagram')} so far`,
        text: 'What is listed here is not complete yet. You may close this page: the server goes on.',
        tone: 'plain',
      };
    case 'failed':
      return { title: 'This computation failed', text: error?.message ?? 'It ended without a result.', tone: 'bad' };
    case 'cancelled':
      return {
        title: 'Cancelled',
        text: 'It was ended before it was complete; nothing partial was kept.',
        tone: 'caution',
      };
    case 'interrupted':
      return {
        title: 'Interrupted',
        text: error?.message ?? 'The server stopped while this was computed; nothing partial was kept.',
        tone: 'caution',
      };
    case 'unbalanced':
      return { title: 'The ledger does not balance', text: PROOF.unbalanced, tone: 'bad' };
    default:
      return null;
  }
}

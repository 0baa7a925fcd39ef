import type { Misbehaviour } from '#contract/job.ts';

/** What the tests of the server's limits make a job do. The server asks for it only when TEST_JOBS is set. */
export async function misbehave(kind: Misbehaviour): Promise<void> {
  const kept: unknown[] = [];
  if (kind === 'hog') for (;;) kept.push(new Array(10_000).fill(kept.length).map((n) => ({ n })));
  if (kind === 'buffers')
    for (;;) {
      kept.push(Buffer.alloc(16_000_000, 1));
      await new Promise((resolve) => setTimeout(resolve, 20));
    }
  if (kind === 'spin') for (;;) kept.length = 0;
  if (kind === 'crash') process.exit(3);
}

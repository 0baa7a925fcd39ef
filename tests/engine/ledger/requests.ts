import { format, rational } from '#engine/exact/rational.ts';
import type { CountingRequest, Drop, Keep, Order, Theory } from '#engine/graph/theory.ts';
import { independentSums } from '#engine/ledger/independent.ts';

/** One real field with vertices of the given valences. */
export const real = (...kinds: number[]): Theory => ({ partner: [0], kinds: kinds.map((k) => [k]) });

/** One power per kind, so that a request names its content. */
export const exactly = (content: readonly number[]): Order => ({
  by: 'powers',
  weights: content.map((_, k) => content.map((_, c) => rational(k === c ? 1 : 0))),
  bound: content.map((n) => rational(n)),
  through: false,
});

/** Order by loops of a theory whose couplings carry none. */
export const byLoops = (theory: Theory, bound: number, through = false): Order => ({
  by: 'loops',
  kindLoops: theory.kinds.map(() => 0),
  bound,
  through,
});

/** The request for one real field, `legs` points and the given numbers of vertices. */
export const oneField = (
  kinds: readonly number[],
  content: readonly number[],
  legs: number,
  keep: Keep,
  drop: readonly Drop[] = [],
): CountingRequest => ({
  theory: real(...kinds),
  legs: new Array<number>(legs).fill(0),
  order: exactly(content),
  keep,
  drop,
});

/** Σ 1/S of a request as text; the test fails when the sum is not proved. */
export function weightOf(request: CountingRequest): string {
  const sums = independentSums(request);
  if (sums.state !== 'proved') throw new Error('the independent sum was not proved');
  return format(sums.weight);
}

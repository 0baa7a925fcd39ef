import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { format, multiply, ONE, power, rational, sum } from '#engine/exact/rational.ts';
import type { Content, CountingRequest, Keep, Theory } from '#engine/graph/theory.ts';
import { independentSums } from '#engine/ledger/independent.ts';
import { exactly, real, weightOf } from './requests.ts';

/** Pairings of a request that names its content. */
function pairings(request: CountingRequest): bigint {
  const sums = independentSums(request);
  if (sums.state !== 'proved') throw new Error('not proved');
  return sums.pairings;
}

/** Pairings of one content summed over every loop number: the same request, ordered by loops. */
function overLoops(request: CountingRequest, content: Content): bigint {
  const order = { by: 'loops' as const, kindLoops: content.map(() => 0), bound: 4, through: true };
  const sums = independentSums({ ...request, order });
  if (sums.state !== 'proved') throw new Error('not proved');
  return sums.rows.find((row) => row.content.join() === content.join())?.pairings ?? 0n;
}

/** Two real fields and a complex one (types 0, 1 and 2, 3), vertices of valence 3 or 4. */
const theory: Theory = {
  partner: [0, 1, 3, 2],
  kinds: [
    [3, 0, 0, 0],
    [1, 2, 0, 0],
    [1, 0, 1, 1],
    [0, 2, 1, 1],
  ],
};
const small = fc.record({
  content: fc.tuple(fc.nat(2), fc.nat(2), fc.nat(1), fc.nat(1)),
  legs: fc.constantFrom([], [0], [0, 0], [1, 1], [2, 3], [0, 1, 1]),
});
const keeps: readonly Keep[] = ['all', 'normalised', 'connected', '1PI'];

describe('laws of the generating functions', () => {
  it('components put together give Z and Z[J]/Z[0]: exp of the logarithm, summed over loops', () => {
    fc.assert(
      fc.property(small, fc.constantFrom<Keep>('all', 'normalised'), ({ content, legs }, keep) => {
        const request = { theory: { ...theory, kinds: theory.kinds.slice(0, 3) }, legs, keep, drop: [] };
        const part = content.slice(0, 3).map((n) => Math.min(n, 1));
        // Nine half-lines make at most 4 lines, and three vertices at most 3 components: never more than 4 − 3 + 3 loops.
        expect(overLoops({ ...request, order: exactly(part) }, part)).toBe(
          pairings({ ...request, order: exactly(part) }),
        );
      }),
      { numRuns: 12 },
    );
  });
  it('names do not matter: permuted fields and kinds give the same sums', () => {
    const types = [1, 0, 3, 2];
    const kinds = [2, 0, 3, 1];
    const permuted: Theory = {
      partner: types.map((h) => types.indexOf(theory.partner[h]!)),
      kinds: kinds.map((k) => types.map((h) => theory.kinds[k]![h]!)),
    };
    fc.assert(
      fc.property(small, fc.constantFrom(...keeps), fc.boolean(), ({ content, legs }, keep, scaleless) => {
        const drop = scaleless ? (['scaleless'] as const) : [];
        const here = pairings({ theory, legs, order: exactly(content), keep, drop });
        const there = pairings({
          theory: permuted,
          legs: legs.map((h) => types.indexOf(h)),
          order: exactly(kinds.map((k) => content[k]!)),
          keep,
          drop,
        });
        expect(there).toBe(here);
      }),
      { numRuns: 60 },
    );
  });
  it('each cut keeps no more than the one before; without legs nothing is normalised', () => {
    fc.assert(
      fc.property(small, ({ content, legs }) => {
        const order = exactly(content);
        const cuts = keeps.filter((keep) => legs.length > 0 || keep !== 'normalised');
        const chain = cuts.map((keep) => pairings({ theory, legs, order, keep, drop: [] }));
        expect([...chain].sort((a, b) => (a < b ? 1 : a > b ? -1 : 0))).toEqual(chain);
      }),
      { numRuns: 60 },
    );
  });
  it('one complex field split into two real ones: the sums over all splittings agree', () => {
    // φ = (a + ib)/√2 turns g (φ*φ)²/(2!2!) into g (a² + b²)²/16: kinds a⁴/4!, b⁴/4! with 3g/2 and a²b²/(2!2!) with g/2.
    const complex: Theory = { partner: [1, 0], kinds: [[2, 2]] };
    const split: Theory = {
      partner: [0, 1],
      kinds: [
        [4, 0],
        [2, 2],
        [0, 4],
      ],
    };
    for (const n of [1, 2, 3, 4]) {
      const order = {
        by: 'powers' as const,
        weights: split.kinds.map(() => [ONE]),
        bound: [rational(n)],
        through: false,
      };
      const sums = independentSums({ theory: split, legs: [], order, keep: 'connected', drop: [] });
      if (sums.state !== 'proved') throw new Error('not proved');
      const value = sum(
        sums.rows.map(({ content: [a, ab, b], weight }) =>
          multiply(weight, multiply(power(rational(3, 2), a! + b!), power(rational(1, 2), ab!))),
        ),
      );
      expect(format(value)).toBe(
        weightOf({ theory: complex, legs: [], order: exactly([n]), keep: 'connected', drop: [] }),
      );
    }
  });
});

describe('common practice', () => {
  it('two derivatives of the free generating functional give the propagator back', () => {
    expect(weightOf({ theory: real(4), legs: [0, 0], order: exactly([0]), keep: 'connected', drop: [] })).toBe('1');
    const complex: Theory = { partner: [1, 0], kinds: [[2, 2]] };
    const free = { theory: complex, order: exactly([0]), keep: 'connected' as const, drop: [] };
    expect(weightOf({ ...free, legs: [0, 1] })).toBe('1');
    expect(weightOf({ ...free, legs: [0, 0] })).toBe('0');
  });
  it.each([2, 4, 6, 8, 10])('the %i-point moment of a Gaussian is the sum over (2n − 1)!! pairings', (points) => {
    let double = 1;
    for (let odd = points - 1; odd > 1; odd -= 2) double *= odd;
    const legs = new Array<number>(points).fill(0);
    for (const keep of ['all', 'normalised'] as const)
      expect(weightOf({ theory: real(4), legs, order: exactly([0]), keep, drop: [] })).toBe(String(double));
  });
  it('a quadratic action has no connected part beyond ½ J·D·J', () => {
    for (const points of [1, 3, 4, 6])
      expect(
        weightOf({
          theory: real(4),
          legs: new Array<number>(points).fill(0),
          order: exactly([0]),
          keep: 'connected',
          drop: [],
        }),
      ).toBe('0');
  });
  it('with no legs and no vertices: one empty diagram under all and normalised, none under connected and 1PI', () => {
    const weights = keeps.map((keep) => weightOf({ theory: real(4), legs: [], order: exactly([0]), keep, drop: [] }));
    expect(weights).toEqual(['1', '1', '0', '0']);
  });
  it('a bare propagator is connected but not 1PI; one bare vertex is 1PI', () => {
    const bare = { theory: real(4), legs: [0, 0], order: exactly([0]), drop: [] };
    expect(weightOf({ ...bare, keep: 'connected' })).toBe('1');
    expect(weightOf({ ...bare, keep: '1PI' })).toBe('0');
    expect(weightOf({ theory: real(4), legs: [0, 0, 0, 0], order: exactly([1]), keep: '1PI', drop: [] })).toBe('1');
  });
  it('a chain of mass insertions has weight 1 at every order', () => {
    for (const n of [1, 2, 3, 4])
      expect(weightOf({ theory: real(2), legs: [0, 0], order: exactly([n]), keep: 'connected', drop: [] })).toBe('1');
  });
});

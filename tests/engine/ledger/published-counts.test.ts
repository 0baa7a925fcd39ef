import { describe, expect, it } from 'vitest';
import { factorial } from '#engine/exact/combinatorics.ts';
import { format, multiply, parse, rational } from '#engine/exact/rational.ts';
import type { Drop, Keep } from '#engine/graph/theory.ts';
import counts from '../../reference/counts.json' with { type: 'json' };
import oeis from '../../reference/oeis.json' with { type: 'json' };
import { byLoops, oneField, real, weightOf } from './requests.ts';

/** Sums of weights over explicit lists: tests/reference/counts.json (recomputed by separate enumeration, its "definitions" say each restriction). */
const restrictions: Record<string, [Keep, Drop[]]> = {
  connected: ['connected', []],
  connected_no_selfloop: ['connected', ['self-contractions']],
  '1PI': ['1PI', []],
  '1PI_no_selfloop': ['1PI', ['self-contractions']],
  '1PI_no_tadpole': ['1PI', ['scaleless']],
  no_bridge_tadpole: ['connected', ['tadpoles']],
};

const lists = Object.entries(counts.own_enumeration).flatMap(([name, rows]) => {
  const single = /^phi(\d)_(vacuum|(\d)pt_(un)?labelled_legs)$/.exec(name);
  const mixed = /^phi3\+phi4_vacuum\(n3=(\d),n4=(\d)\)$/.exec(name);
  return (rows as Record<string, unknown>[]).map((row) => ({
    name: `${name}, ${row.internal_vertices} vertices`,
    kinds: single ? [Number(single[1])] : [3, 4],
    content: single ? [row.internal_vertices as number] : [Number(mixed![1]), Number(mixed![2])],
    legs: Number(single?.[3] ?? 0),
    labelled: single?.[4] !== 'un',
    row,
  }));
});

describe('sums over explicit lists', () => {
  it('reads every list of the file', () => expect(lists.length).toBeGreaterThan(60));
  it.each(lists)('$name', ({ kinds, content, legs, labelled, row }) => {
    for (const [restriction, [keep, drop]] of Object.entries(restrictions)) {
      const pair = row[restriction] as [number, string] | undefined;
      if (!pair) continue;
      const exchanges = labelled ? 1n : factorial(legs);
      const expected = format(multiply(parse(pair[1]), rational(exchanges)));
      expect([restriction, weightOf(oneField(kinds, content, legs, keep, drop))]).toEqual([restriction, expected]);
    }
  });
});

/** OEIS weight sequences: tests/reference/oeis.json. */
describe('OEIS', () => {
  const values = (id: string): string[] => {
    const entry = oeis.entries.find((e) => e.id === id)!;
    return entry.values.map(String);
  };
  it.each([
    ['A225697/A225698', 4, 'all', 1],
    ['A226258/A226259', 4, 'connected', 1],
    ['A226256/A226257', 6, 'all', 1],
    ['A226260/A226261', 3, 'connected', 2],
  ] as const)('%s', (id, valence, keep, step) => {
    const published = values(id);
    published.forEach((value, n) => {
      if (n === 0) return;
      expect(weightOf(oneField([valence], [n * step], 0, keep))).toBe(value);
    });
  });
  it('A062980: rooted trivalent maps, 2^(2n+1) times the φ³ one-point sums', () => {
    values('A062980').forEach((value, n) => {
      const weight = parse(weightOf(oneField([3], [2 * n + 1], 1, 'connected')));
      expect(format(multiply(weight, rational(2n ** BigInt(2 * n + 1))))).toBe(value);
    });
  });
  it('A267827: bridgeless rooted trivalent maps, the same of the 1PI one-point sums', () => {
    values('A267827').forEach((value, n) => {
      const weight = parse(weightOf(oneField([3], [2 * n + 1], 1, '1PI')));
      expect(format(multiply(weight, rational(2n ** BigInt(2 * n + 1))))).toBe(value);
    });
  });
});

describe('trees', () => {
  const tree = counts.tree_level_labelled;
  it('φ³: (2n − 5)!! trees with n labelled points', () => {
    tree['phi3 n-pt, n=3..8'].forEach((number, i) => {
      const theory = real(3);
      const request = {
        theory,
        legs: new Array<number>(i + 3).fill(0),
        order: byLoops(theory, 0),
        keep: 'connected' as const,
        drop: [],
      };
      expect(weightOf(request)).toBe(String(number));
    });
  });
  it('φ⁴: 1, 10, 280, 15400 for 4, 6, 8, 10 points', () => {
    tree['phi4 n-pt, n=4,6,8,10'].forEach((number, i) => {
      const theory = real(4);
      const request = {
        theory,
        legs: new Array<number>(2 * i + 4).fill(0),
        order: byLoops(theory, 0),
        keep: 'connected' as const,
        drop: [],
      };
      expect(weightOf(request)).toBe(String(number));
    });
  });
});

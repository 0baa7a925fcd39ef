import { describe, expect, it } from 'vitest';
import { rational, ZERO } from '#engine/exact/rational.ts';
import type { CountingRequest, Theory } from '#engine/graph/theory.ts';
import { divisor, independentSums } from '#engine/ledger/independent.ts';
import { allPairings, isDropped, isKept, loopNumber } from './contractions.ts';
import { byLoops, exactly, real } from './requests.ts';
import { drops, keeps, smallCases } from './smallCases.ts';

/** The definitions of physics, applied to every contraction: no source needed beyond them. */
describe('every contraction of a small case', () => {
  it.each(smallCases)('%s', (_, theory, legs, content) => {
    const pairings = allPairings(theory, legs, content);
    for (const keep of keeps) {
      for (const drop of drops) {
        const expected = pairings
          .filter((p) => isKept(p, keep) && !isDropped(p, drop))
          .reduce((sum, p) => sum + p.count, 0n);
        const request: CountingRequest = { theory, legs, order: exactly(content), keep, drop };
        const sums = independentSums(request);
        const got = sums.state === 'proved' ? sums : null;
        expect([keep, drop, got?.pairings]).toEqual([keep, drop, expected]);
        expect(got?.weight).toEqual(expected === 0n ? ZERO : rational(expected, divisor(request, content)));
      }
    }
  });
});

describe('every contraction, by loops', () => {
  const loopCases: [string, Theory, number[], number[][]][] = [
    ['φ³', real(3), [0, 0], [[0], [2]]],
    [
      'φ³ + φ⁴',
      real(3, 4),
      [0, 0],
      [
        [0, 0],
        [0, 1],
        [2, 0],
        [2, 1],
      ],
    ],
    [
      'charged',
      {
        partner: [1, 0, 2],
        kinds: [
          [1, 1, 1],
          [2, 2, 0],
        ],
      },
      [0, 1],
      [
        [0, 0],
        [0, 1],
        [2, 0],
        [2, 1],
        [0, 2],
      ],
    ],
  ];
  it.each(loopCases)('%s', (_, theory, legs, contents) => {
    for (const keep of keeps) {
      for (const drop of [[], ['tadpoles'], ['scaleless']] as const) {
        for (const [bound, through] of [
          [0, false],
          [1, false],
          [2, false],
          [1, true],
          [2, true],
        ] as const) {
          const sums = independentSums({ theory, legs, order: byLoops(theory, bound, through), keep, drop });
          const rows = sums.state === 'proved' ? sums.rows : [];
          for (const content of contents) {
            const expected = allPairings(theory, legs, content)
              .filter((p) => isKept(p, keep) && !isDropped(p, drop))
              .filter((p) => (through ? loopNumber(p) <= bound : loopNumber(p) === bound))
              .reduce((sum, p) => sum + p.count, 0n);
            const row = rows.find((r) => r.content.join() === content.join());
            expect([keep, drop, bound, through, content, row?.pairings ?? 0n]).toEqual([
              keep,
              drop,
              bound,
              through,
              content,
              expected,
            ]);
          }
        }
      }
    }
  });
});

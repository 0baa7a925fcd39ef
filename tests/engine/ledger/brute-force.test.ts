import { describe, expect, it } from 'vitest';
import { rational, ZERO } from '#engine/exact/rational.ts';
import type { CountingRequest, Drop, Keep, Theory } from '#engine/graph/theory.ts';
import { divisor, independentSums } from '#engine/ledger/independent.ts';
import { allPairings, isDropped, isKept, loopNumber } from './contractions.ts';
import { byLoops, exactly, real } from './requests.ts';

/** The definitions of physics, applied to every contraction: no source needed beyond them. */
const keeps: readonly Keep[] = ['all', 'normalised', 'connected', '1PI'];
const drops: readonly (readonly Drop[])[] = [
  [],
  ['self-contractions'],
  ['tadpoles'],
  ['scaleless'],
  ['self-contractions', 'tadpoles'],
  ['self-contractions', 'scaleless'],
  ['tadpoles', 'scaleless'],
  ['self-contractions', 'tadpoles', 'scaleless'],
];

const portal: Theory = {
  partner: [0, 1],
  kinds: [
    [1, 0],
    [1, 2],
    [3, 0],
    [2, 2],
    [0, 2],
    [0, 4],
  ],
};
/** Types φ, φ*, χ. */
const charged: Theory = {
  partner: [1, 0, 2],
  kinds: [
    [1, 1, 1],
    [2, 2, 0],
    [0, 0, 1],
    [1, 1, 0],
    [0, 0, 3],
    [2, 0, 1],
    [0, 2, 1],
    [1, 0, 0],
    [0, 1, 0],
    [2, 1, 0],
    [1, 2, 0],
  ],
};
const twoComplex: Theory = {
  partner: [1, 0, 3, 2],
  kinds: [
    [1, 1, 1, 1],
    [1, 0, 1, 0],
    [0, 1, 0, 1],
    [2, 2, 0, 0],
  ],
};

const cases: [string, Theory, number[], number[]][] = [
  ['φ³ vacuum', real(3), [], [4]],
  ['φ³ one-point', real(3), [0], [3]],
  ['φ³ two-point', real(3), [0, 0], [2]],
  ['φ³ three-point', real(3), [0, 0, 0], [3]],
  ['φ³ four-point', real(3), [0, 0, 0, 0], [2]],
  ['φ⁴ vacuum', real(4), [], [3]],
  ['φ⁴ two-point', real(4), [0, 0], [2]],
  ['φ⁴ four-point', real(4), [0, 0, 0, 0], [2]],
  ['φ³ two-point, 14 half-lines', real(3), [0, 0], [4]],
  ['φ⁴ two-point, 14 half-lines', real(4), [0, 0], [3]],
  ['φ⁶ two-point', real(6), [0, 0], [2]],
  ['φ³ + φ⁴', real(3, 4), [0, 0], [2, 1]],
  ['φ + φ³ vacuum', real(1, 3), [], [2, 2]],
  ['φ + φ³ vacuum, three tadpoles', real(1, 3), [], [3, 3]],
  ['φ + φ³ one-point', real(1, 3), [0], [2, 3]],
  ['φ + φ³ two-point', real(1, 3), [0, 0], [2, 2]],
  ['φ + φ⁴ two-point', real(1, 4), [0, 0], [2, 2]],
  ['φ + φ² + φ³ + φ⁴', real(1, 2, 3, 4), [0, 0], [1, 1, 1, 1]],
  ['φ² insertions', real(2, 4), [0, 0], [2, 1]],
  ['φ² ring', real(2), [], [4]],
  ['φ² + φ³ vacuum', real(2, 3), [], [2, 2]],
  ['φ one-point', real(1), [0], [1]],
  ['two one-point vertices', real(1), [], [2]],
  ['bare lines only', real(3), [0, 0, 0, 0], [0]],
  ['nothing at all', real(3), [], [0]],
  ['portal hss', portal, [0, 0], [0, 2, 0, 1, 0, 0]],
  ['portal with a tadpole', portal, [1, 1], [1, 1, 1, 1, 0, 0]],
  ['portal with tadpoles, vacuum', portal, [], [2, 2, 0, 0, 1, 0]],
  ['portal ⟨hhss⟩', portal, [0, 0, 1, 1], [0, 0, 0, 2, 0, 0]],
  ['portal one-point', portal, [0], [1, 2, 1, 0, 0, 0]],
  ['charged ⟨φφ*⟩', charged, [0, 1], [2, 1, 0, 1, 0, 0, 0, 0, 0, 0, 0]],
  ['charged vacuum', charged, [], [2, 1, 0, 1, 0, 0, 0, 0, 0, 0, 0]],
  ['charged with a χ tadpole', charged, [0, 1], [1, 0, 2, 1, 1, 0, 0, 0, 0, 0, 0]],
  ['charge broken by φφχ', charged, [2, 2], [0, 1, 0, 0, 0, 1, 1, 0, 0, 0, 0]],
  ['complex one-point vertices', charged, [0], [0, 0, 0, 1, 0, 0, 0, 0, 1, 1, 1]],
  ['complex one-point vertices, vacuum', charged, [], [0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1]],
  ['charged four-point, 14 half-lines', charged, [0, 1, 0, 1], [2, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0]],
  ['two complex fields', twoComplex, [0, 1], [2, 1, 1, 0]],
  ['two complex fields, mixing', twoComplex, [0, 2], [0, 1, 2, 1]],
];

describe('every contraction of a small case', () => {
  it.each(cases)('%s', (_, theory, legs, content) => {
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

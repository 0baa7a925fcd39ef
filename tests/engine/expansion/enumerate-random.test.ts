import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { enumerateContent } from '#engine/expansion/enumerate.ts';
import type { Theory } from '#engine/graph/theory.ts';
import { classesByBruteForce, classesOfList } from '../../support/bruteForce.ts';

/** Up to three fields, real or complex, up to three kinds of vertices. */
const theories: fc.Arbitrary<Theory> = fc
  .array(fc.boolean(), { minLength: 1, maxLength: 3 })
  .map((complex) => {
    const partner: number[] = [];
    for (const pair of complex) partner.push(...(pair ? [partner.length + 1, partner.length] : [partner.length]));
    return partner;
  })
  .chain((partner) => {
    const kind = fc.array(fc.nat(2), { minLength: partner.length, maxLength: partner.length });
    const some = kind.filter((counts) => counts.some((count) => count > 0));
    return fc.array(some, { minLength: 1, maxLength: 3 }).map((kinds) => ({ partner, kinds }));
  });

/** With legs and content of 14 half-lines at most that can all be contracted. */
const cases = theories
  .chain((theory) =>
    fc.record({
      theory: fc.constant(theory),
      legs: fc.array(fc.nat(theory.partner.length - 1), { maxLength: 4 }),
      content: fc.array(fc.nat(3), { minLength: theory.kinds.length, maxLength: theory.kinds.length }),
    }),
  )
  .filter(({ theory: { partner, kinds }, legs, content }) => {
    const halfLines = partner.map(
      (_, h) => legs.filter((l) => l === h).length + content.reduce((sum, n, k) => sum + n * kinds[k]![h]!, 0),
    );
    const balanced = partner.every((p, h) => (p === h ? halfLines[h]! % 2 === 0 : halfLines[h] === halfLines[p]));
    return balanced && halfLines.reduce((a, b) => a + b) <= 14;
  });

describe('random theories against brute force', () => {
  it.each(['any', 'noVacuum', 'connected'] as const)('components: %s', (components) => {
    fc.assert(
      fc.property(cases, ({ theory, legs, content }) => {
        const list = enumerateContent(theory, legs, content, { components });
        const ours = classesOfList(theory, legs, content, list);
        expect([...ours].sort()).toEqual([...classesByBruteForce(theory, legs, content, components)].sort());
      }),
      { numRuns: 300, seed: 1978 },
    );
  });
});

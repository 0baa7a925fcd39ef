import { describe, expect, it } from 'vitest';
import { enumerateContent } from '#engine/expansion/enumerate.ts';
import { automorphisms } from '#engine/graph/automorphisms.ts';
import { classesByBruteForce, classesOfList } from '../../support/bruteForce.ts';
import { smallCases } from '../ledger/smallCases.ts';

const components = ['any', 'noVacuum', 'connected'] as const;
const sorted = (classes: Map<string, bigint>): [string, bigint][] =>
  [...classes].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));

describe('every class of contractions once, with its factor (counted by brute force)', () => {
  it.each(smallCases)('%s', (_, theory, legs, content) => {
    for (const mode of components) {
      const list = [...enumerateContent(theory, legs, content, { components: mode })];
      const expected = classesByBruteForce(theory, legs, content, mode);
      expect([mode, sorted(classesOfList(theory, legs, content, list))]).toEqual([mode, sorted(expected)]);
      for (const diagram of list) expect(diagram.symmetryFactor).toBe(automorphisms(diagram, theory, legs).order);
    }
  });
});

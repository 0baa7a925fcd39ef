import { describe, expect, it } from 'vitest';
import { factorial } from '#engine/exact/combinatorics.ts';
import { enumerateContent } from '#engine/expansion/enumerate.ts';
import { automorphisms } from '#engine/graph/automorphisms.ts';
import type { Theory } from '#engine/graph/theory.ts';
import { classesByBruteForce, classesOfList } from '../../support/bruteForce.ts';
import { real } from '../ledger/requests.ts';
import { smallCases } from '../ledger/smallCases.ts';

/** φ*φ and (φ*φ)² of a complex field. */
const charged: Theory = {
  partner: [1, 0],
  kinds: [
    [1, 1],
    [2, 2],
  ],
};
/** Field i meets field i + 1 at φᵢ²φᵢ₊₁²: more half-line types than one packed word of the generator holds. */
const ring: Theory = {
  partner: [0, 1, 2, 3, 4, 5, 6, 7],
  kinds: Array.from({ length: 8 }, (_, i) =>
    Array.from({ length: 8 }, (_, h) => (h === i || h === (i + 1) % 8 ? 2 : 0)),
  ),
};
const cases: [string, Theory, number[], number[]][] = [
  ...smallCases,
  ['φ⁵ vacuum', real(5), [], [2]],
  ['φ⁸ vacuum', real(8), [], [2]],
  ['six points, one vertex', real(4), [0, 0, 0, 0, 0, 0], [1]],
  ['φ*φ and (φ*φ)², vacuum', charged, [], [3, 2]],
  ['φ*φ and (φ*φ)², four-point', charged, [0, 0, 1, 1], [1, 2]],
  ['four complex points joined', charged, [0, 1, 1, 0], [0, 0]],
  ['unbalanced charge', charged, [0, 0], [1, 1]],
  ['eight fields', ring, [], [1, 1, 1, 1, 1, 1, 1, 1]],
  ['eight fields with legs', ring, [0, 0, 4, 4], [1, 0, 0, 1, 1, 0, 0, 1]],
];
const components = ['any', 'noVacuum', 'connected'] as const;
const sorted = (classes: Map<string, bigint>): [string, bigint][] =>
  [...classes].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));

describe('every class of contractions once, with its factor (counted by brute force)', () => {
  it.each(cases)('%s', (_, theory, legs, content) => {
    for (const mode of components) {
      const list = [...enumerateContent(theory, legs, content, { components: mode })];
      const expected = classesByBruteForce(theory, legs, content, mode);
      expect([mode, sorted(classesOfList(theory, legs, content, list))]).toEqual([mode, sorted(expected)]);
      for (const diagram of list) expect(diagram.symmetryFactor).toBe(automorphisms(diagram, theory, legs).order);
    }
  });
});

/** The refinement search of graph/automorphisms.ts shares nothing with the generator. */
describe('factors of larger and very symmetric diagrams, by the refinement search', () => {
  it.each([
    ['φ⁴ vacuum', real(4), [], [8], 'connected'],
    ['φ³ vacuum', real(3), [], [10], 'connected'],
    ['figure-eights and more', real(4), [], [7], 'any'],
    ['stars', real(1, 6), [], [10, 4], 'any'],
    ['rings of two-point vertices', real(2), [], [16], 'any'],
    ['chains between one-point vertices', real(2, 1), [], [5, 8], 'any'],
    ['pairs of one-point vertices', real(1), [], [20], 'any'],
    ['φ³ trees', real(3), [0, 0, 0, 0, 0, 0], [4], 'connected'],
    ['charged rings', charged, [], [4, 4], 'any'],
  ] as const)('%s', (_, theory, legs, content, mode) => {
    let classes = 0;
    for (const diagram of enumerateContent(theory, legs, content, { components: mode })) {
      expect(diagram.symmetryFactor).toBe(automorphisms(diagram, theory, legs).order);
      classes++;
    }
    expect(classes).toBeGreaterThan(0);
  });

  /** By hand: 2^10 10! for ten lines between one-point vertices, 12! for the star, 8^9 9! for nine figure-eights. */
  it('by hand', () => {
    const factors = (valences: number[], content: number[]): bigint[] =>
      [...enumerateContent(real(...valences), [], content, { components: 'any' })].map((d) => d.symmetryFactor);
    expect(factors([1], [20])).toEqual([3715891200n]);
    expect(factors([1, 12], [12, 1])).toContain(479001600n);
    expect(factors([4], [9])).toContain(8n ** 9n * factorial(9));
  });
});

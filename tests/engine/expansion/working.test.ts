import { describe, expect, it } from 'vitest';
import { format, rational } from '#engine/exact/rational.ts';
import { countContractions } from '#engine/expansion/contractions.ts';
import { expandRequest } from '#engine/expansion/expand.ts';
import { pairingsOf } from '#engine/expansion/pairings.ts';
import { automorphisms } from '#engine/graph/automorphisms.ts';
import type { Diagram } from '#engine/graph/diagram.ts';
import type { CountingRequest, Theory } from '#engine/graph/theory.ts';
import { exactly, real } from '../ledger/requests.ts';

const charged: Theory = {
  partner: [1, 0, 2],
  kinds: [
    [1, 1, 1],
    [2, 2, 0],
    [0, 0, 3],
  ],
};
const portal: Theory = {
  partner: [0, 1],
  kinds: [
    [4, 0],
    [2, 2],
    [0, 4],
  ],
};

const requests: [string, CountingRequest][] = [
  ['φ⁴ vacuum, three vertices', { theory: real(4), legs: [], order: exactly([3]), keep: 'all', drop: [] }],
  ['φ⁴ four legs, two vertices', { theory: real(4), legs: [0, 0, 0, 0], order: exactly([2]), keep: 'all', drop: [] }],
  ['φ³ two legs, four vertices', { theory: real(3), legs: [0, 0], order: exactly([4]), keep: 'all', drop: [] }],
  ['φ⁶ and φ³', { theory: real(3, 6), legs: [0, 0], order: exactly([2, 1]), keep: 'all', drop: [] }],
  ['charged, mixed', { theory: charged, legs: [0, 1, 2], order: exactly([1, 1, 0]), keep: 'all', drop: [] }],
  ['charged, mixed', { theory: charged, legs: [0, 1], order: exactly([2, 1, 0]), keep: 'all', drop: [] }],
  ['portal', { theory: portal, legs: [0, 0, 1, 1], order: exactly([1, 1, 0]), keep: 'all', drop: [] }],
  ['portal vacuum', { theory: portal, legs: [], order: exactly([1, 2, 1]), keep: 'connected', drop: [] }],
];

describe('the factor by three routes: enumerator, contractions step by step, automorphism group', () => {
  it.each(requests)('%s', (_, request) => {
    let diagrams = 0;
    for (const diagram of expandRequest(request)) {
      diagrams++;
      const counted = countContractions(diagram, request.theory, request.legs);
      const group = automorphisms(diagram, request.theory, request.legs);
      expect(group.order).toBe(diagram.symmetryFactor);
      expect(counted.total).toBe(pairingsOf(request.theory, diagram));
      expect(format(rational(counted.total, counted.divisor))).toBe(format(rational(1n, group.order)));
    }
    expect(diagrams).toBeGreaterThan(3);
  });
});

/** Symmetry factors of well-known diagrams, common practice. */
const line = (from: number, to: number) => ({ from, to, type: 0 });
const known: [string, number, Diagram, number[], bigint][] = [
  ['figure-eight', 4, { kinds: [0], legs: [], lines: [line(0, 0), line(0, 0)] }, [], 8n],
  ['sunset', 4, { kinds: [0, 0], legs: [0, 1], lines: [line(0, 1), line(0, 1), line(0, 1)] }, [0, 0], 6n],
  ['basketball', 4, { kinds: [0, 0], legs: [], lines: [line(0, 1), line(0, 1), line(0, 1), line(0, 1)] }, [], 48n],
  ['φ³ theta', 3, { kinds: [0, 0], legs: [], lines: [line(0, 1), line(0, 1), line(0, 1)] }, [], 12n],
  ['dumbbell', 3, { kinds: [0, 0], legs: [], lines: [line(0, 0), line(0, 1), line(1, 1)] }, [], 8n],
  [
    'tetrahedron',
    3,
    { kinds: [0, 0, 0, 0], legs: [], lines: [line(0, 1), line(0, 2), line(0, 3), line(1, 2), line(1, 3), line(2, 3)] },
    [],
    24n,
  ],
];

describe('well-known factors', () => {
  it.each(known)('%s', (_, valence, diagram, legs, S) => {
    expect(automorphisms(diagram, real(valence), legs).order).toBe(S);
    const { total, divisor } = countContractions(diagram, real(valence), legs);
    expect(divisor / total).toBe(S);
  });
  it('counts the sunset as one does on paper: 2 · 4 · 4 · 3! of 2!·4!²', () => {
    const [, , sunset, legs] = known[1]!;
    const { steps, total, divisor } = countContractions(sunset, real(4), legs);
    expect(steps.map(({ ways }) => ways)).toEqual([2n, 4n, 4n, 6n]);
    expect([total, divisor]).toEqual([192n, 1152n]);
  });
});

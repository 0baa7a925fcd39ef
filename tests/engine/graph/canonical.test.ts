import { describe, expect, it } from 'vitest';
import { expandRequest } from '#engine/expansion/expand.ts';
import { automorphisms } from '#engine/graph/automorphisms.ts';
import { canonicalLabel, diagramId, shapeId } from '#engine/graph/canonical.ts';
import { facts } from '#engine/graph/facts.ts';
import type { CountingRequest, Theory } from '#engine/graph/theory.ts';
import { exactly, real } from '../ledger/requests.ts';
import { relabelled, seeded } from './relabel.ts';

const portal: Theory = {
  partner: [0, 1],
  kinds: [
    [4, 0],
    [2, 2],
    [0, 4],
  ],
};
const charged: Theory = {
  partner: [1, 0, 2],
  kinds: [
    [1, 1, 1],
    [2, 2, 0],
  ],
};
const requests: [string, CountingRequest][] = [
  ['φ⁴ vacuum', { theory: real(4), legs: [], order: exactly([4]), keep: 'all', drop: [] }],
  ['φ³ two legs', { theory: real(3), legs: [0, 0], order: exactly([4]), keep: 'connected', drop: [] }],
  ['portal four legs', { theory: portal, legs: [0, 0, 1, 1], order: exactly([1, 1, 1]), keep: 'connected', drop: [] }],
  ['charged', { theory: charged, legs: [0, 1], order: exactly([2, 1]), keep: 'all', drop: [] }],
];
const names = { fields: ['h', 's', 'chi'], couplings: ['a', 'b', 'c'] };

describe('canonical label', () => {
  it.each(requests)('tells all diagrams of a list apart and survives relabelling: %s', (_, request) => {
    const { theory, legs } = request;
    const below = seeded(7);
    const seen = new Set<string>();
    for (const diagram of expandRequest(request)) {
      const label = canonicalLabel(diagram, theory, legs);
      const id = diagramId(label, names);
      expect(label.bare).toMatch(/^w1[0-9a-z]{26}$/);
      expect(seen.has(id)).toBe(false);
      seen.add(id);
      for (let i = 0; i < 5; i++) {
        const other = relabelled(diagram, theory, below);
        expect(diagramId(canonicalLabel(other, theory, legs), names)).toBe(id);
        expect(automorphisms(other, theory, legs).order).toBe(diagram.symmetryFactor);
        expect(facts(other)).toEqual(facts(diagram));
      }
    }
    expect(seen.size).toBeGreaterThan(5);
  });
  it('is unchanged under a thousand relabellings', () => {
    const [, request] = requests[2]!;
    const below = seeded(11);
    const [diagram] = [...expandRequest(request)].slice(-1);
    const id = diagramId(canonicalLabel(diagram!, request.theory, request.legs), names);
    for (let i = 0; i < 1000; i++) {
      const other = relabelled(diagram!, request.theory, below);
      expect(diagramId(canonicalLabel(other, request.theory, request.legs), names)).toBe(id);
    }
  });
  it('forgets names in the bare label and keeps them in the id', () => {
    // The same loop of h or of s between two vertices of one mixed kind.
    const theory: Theory = { partner: [0, 1], kinds: [[2, 2]] };
    const bubble = (type: number) => ({
      kinds: [0, 0],
      legs: [0, 0, 1, 1],
      lines: [
        { from: 0, to: 1, type },
        { from: 0, to: 1, type },
      ],
    });
    const ofH = canonicalLabel(bubble(0), theory, [1, 1, 1, 1]);
    const ofS = canonicalLabel(bubble(1), theory, [0, 0, 0, 0]);
    expect(ofH.bare).toBe(ofS.bare);
    expect(diagramId(ofH, names)).not.toBe(diagramId(ofS, names));
    const exchanged = { fields: ['s', 'h'], couplings: ['a'] };
    expect(diagramId(ofS, exchanged)).toBe(diagramId(ofH, { fields: ['h', 's'], couplings: ['a'] }));
  });
});

describe('shape', () => {
  it('joins the s, t and u channels of φ⁴ and nothing else', () => {
    const request: CountingRequest = {
      theory: real(4),
      legs: [0, 0, 0, 0],
      order: exactly([2]),
      keep: '1PI',
      drop: [],
    };
    const diagrams = [...expandRequest(request)];
    expect(diagrams).toHaveLength(3);
    const shapes = diagrams.map((diagram) => shapeId(diagram, request.theory, request.legs, names));
    expect(new Set(shapes).size).toBe(1);
    const ids = diagrams.map((diagram) => canonicalLabel(diagram, request.theory, request.legs).bare);
    expect(new Set(ids).size).toBe(3);
  });
});

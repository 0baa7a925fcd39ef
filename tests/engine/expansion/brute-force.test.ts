import { describe, expect, it } from 'vitest';
import { add, rational, ZERO } from '#engine/exact/rational.ts';
import { expandRequest } from '#engine/expansion/expand.ts';
import { passesDrop, passesKeep } from '#engine/expansion/filters.ts';
import { pairingsOf } from '#engine/expansion/pairings.ts';
import { divisor } from '#engine/ledger/independent.ts';
import { allPairings, isDropped, isKept } from '../ledger/contractions.ts';
import { exactly } from '../ledger/requests.ts';
import { drops, keeps, smallCases } from '../ledger/smallCases.ts';

/** The list of diagrams against every contraction, one by one, under every keep and drop (definitions: conventions page). */
describe('the list against all contractions', () => {
  it.each(smallCases)('%s', (_, theory, legs, content) => {
    const contractions = allPairings(theory, legs, content);
    const request = { theory, legs, order: exactly(content), keep: 'all', drop: [] } as const;
    const list = [...expandRequest(request)];
    for (const keep of keeps)
      for (const drop of drops) {
        const expected = contractions
          .filter((p) => isKept(p, keep) && !isDropped(p, drop))
          .reduce((sum, p) => sum + p.count, 0n);
        const kept = list.filter(({ facts }) => passesKeep(facts, keep) && passesDrop(facts, drop));
        const pairings = kept.reduce((sum, diagram) => sum + pairingsOf(theory, diagram), 0n);
        expect([keep, drop, pairings]).toEqual([keep, drop, expected]);
        const weight = kept.reduce((sum, diagram) => add(sum, rational(1n, diagram.symmetryFactor)), ZERO);
        expect(weight).toEqual(rational(expected, divisor(request, content)));
        const again = [...expandRequest({ ...request, keep, drop })];
        expect(again.length).toBe(kept.length);
      }
  });
});

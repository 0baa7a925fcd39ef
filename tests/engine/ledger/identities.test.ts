import { describe, expect, it } from 'vitest';
import { identities } from '#engine/ledger/identities.ts';
import { byLoops, oneField, real } from './requests.ts';

describe('identities', () => {
  it('two φ⁴ vertices: common practice, (2n − 1)!! pairings of 2n half-lines', () => {
    const found = identities(oneField([4], [2], 0, 'connected'));
    expect(found.map(({ left, right, holds }) => [left, right, holds])).toEqual([
      ['7·5·3·1', '105', true],
      ['105/(2!·4!·4!)', '35/384', true],
      ['105', '96 + 3·3', true],
    ]);
  });
  it('a complex field has n! pairings, and every text names its vertices', () => {
    const theory = { partner: [1, 0], kinds: [[2, 2]] };
    const found = identities({ theory, legs: [0, 1], order: byLoops(theory, 1), keep: 'connected', drop: [] }, [
      'lambda',
    ]);
    expect(found[0]).toEqual({
      left: '3!',
      right: '6',
      holds: true,
      text: '1 vertex lambda and 2 external points: ways to join the 6 half-lines in pairs.',
    });
    expect(found[2]).toMatchObject({ left: '6', right: '4 + 2', holds: true });
  });
  it('shows the lowest contents only', () => {
    const theory = real(3, 4);
    const found = identities({ theory, legs: [0, 0], order: byLoops(theory, 2), keep: '1PI', drop: [] });
    expect(found.every((identity) => identity.holds)).toBe(true);
    expect(found.length).toBeLessThanOrEqual(9);
    expect(found[0]!.text).toContain('2 vertices kind 2');
  });
});

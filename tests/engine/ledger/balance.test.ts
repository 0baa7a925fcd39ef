import { describe, expect, it } from 'vitest';
import { LimitError } from '#engine/errors.ts';
import { ONE, rational } from '#engine/exact/rational.ts';
import { balance, type ListSum } from '#engine/ledger/balance.ts';
import { independentSums } from '#engine/ledger/independent.ts';
import { byLoops, oneField, real } from './requests.ts';

/** φ⁴ vacuum, two vertices: three bubbles in a row (1/16) and four parallel lines (1/48), common practice. */
const sums = independentSums(oneField([4], [2], 0, 'connected'));
const list: ListSum = { content: [2], classes: 2, weight: rational(1, 12), pairings: 96n };

describe('balance', () => {
  it('balances a complete list', () => {
    const ledger = balance(sums, [list]);
    expect(ledger.state).toBe('balanced');
    expect(ledger.rows).toEqual([
      {
        content: [2],
        list: { classes: 2, weight: rational(1, 12), pairings: 96n },
        independent: { weight: rational(1, 12), pairings: 96n },
        balanced: true,
      },
    ]);
    expect(ledger.independentPairings).toBe(96n);
  });
  it('adds rows of one content', () => {
    const parts: ListSum[] = [
      { content: [2], classes: 1, weight: rational(1, 16), pairings: 72n },
      { content: [2], classes: 1, weight: rational(1, 48), pairings: 24n },
    ];
    expect(balance(sums, parts)).toMatchObject({ state: 'balanced', pairings: 96n, weight: rational(1, 12) });
  });
  it.each([
    ['a missing diagram', [{ ...list, weight: rational(1, 16), pairings: 72n }]],
    ['a missing content', []],
    ['a content that should not be there', [list, { content: [1], classes: 1, weight: rational(1, 8), pairings: 3n }]],
    ['a wrong weight', [{ ...list, weight: ONE }]],
    ['wrong pairings', [{ ...list, pairings: 95n }]],
  ])('does not balance %s', (_, rows) => {
    expect(balance(sums, rows).state).toBe('unbalanced');
  });
  it('balances two wrong rows whose totals agree only row by row', () => {
    const theory = real(3, 4);
    const two = independentSums({ theory, legs: [0, 0], order: byLoops(theory, 1), keep: '1PI', drop: [] });
    const swapped: ListSum[] = [
      { content: [2, 0], classes: 1, weight: rational(1, 4), pairings: 18n },
      { content: [0, 1], classes: 1, weight: rational(3, 4), pairings: 30n },
    ];
    const ledger = balance(two, swapped);
    expect(ledger.weight).toEqual(ledger.independentWeight);
    expect(ledger.state).toBe('unbalanced');
  });
  it('an empty list balances an empty sum: none exist', () => {
    expect(balance(independentSums(oneField([4], [2], 0, 'normalised')), [])).toMatchObject({
      state: 'balanced',
      rows: [],
    });
  });
});

describe('a cut that cannot be summed within the bound', () => {
  const request = oneField([4], [6], 2, '1PI', ['scaleless']);
  const whole = independentSums({ ...request, drop: [] });
  const limited = independentSums(request, 900);
  const cut: ListSum = { content: [6], classes: 1, weight: ONE, pairings: 1n };
  it('rests on the uncut sums', () => {
    expect(limited.state).toBe('rests');
    if (limited.state !== 'rests' || whole.state !== 'proved') throw new Error('states');
    expect(limited.uncut.weight).toEqual(whole.weight);
    const uncut: ListSum = { content: [6], classes: 30, weight: whole.weight, pairings: whole.pairings };
    expect(balance(limited, [cut], [uncut])).toMatchObject({
      state: 'rests',
      independentWeight: null,
      uncut: { weight: whole.weight, independentWeight: whole.weight, classes: 30 },
    });
    expect(balance(limited, [cut], [{ ...uncut, pairings: 1n }]).state).toBe('unbalanced');
    expect(balance(limited, [cut]).state).toBe('unbalanced');
  });
  it('is refused with the bound when the uncut sums do not fit either', () => {
    expect(() => independentSums(request, 5)).toThrow(LimitError);
    expect(() => independentSums(request, 5)).toThrow('5 multiplications');
  });
});

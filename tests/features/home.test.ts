import { describe, expect, it } from 'vitest';
import { expansionRequestSchema } from '#contract/request.ts';
import {
  couplingsLatex,
  FIRST,
  grouped,
  legsOf,
  numeral,
  questionOf,
  requestOf,
  wordsOf,
} from '#features/home/question.ts';

describe('the question of the live example', () => {
  it('is the portal at one loop when the address asks nothing', () => {
    expect(questionOf(new URLSearchParams())).toEqual(FIRST);
    expect(expansionRequestSchema.parse(requestOf(FIRST))).toMatchObject({
      legs: ['h', 'h', 's', 's'],
      order: { loops: 1 },
      keep: '1PI',
    });
  });

  it('comes back from its own address', () => {
    const question = { lagrangian: '½(∂φ)² − g φ³', legs: 'phi phi', by: 'total', n: '2', keep: 'connected' } as const;
    expect(questionOf(new URLSearchParams(question))).toEqual(question);
  });

  it('keeps to the choices of the form', () => {
    expect(questionOf(new URLSearchParams('keep=everything&by=luck'))).toMatchObject({ keep: '1PI', by: 'loops' });
  });

  it('reads legs with or without brackets and commas', () => {
    expect(legsOf('⟨h, h  s s⟩')).toEqual(['h', 'h', 's', 's']);
    expect(legsOf('<phi phi^*>')).toEqual(['phi', 'phi^*']);
    expect(legsOf('  ')).toEqual([]);
  });

  it('is refused by the contract when the order is no number', () => {
    for (const n of ['', 'x'])
      expect(expansionRequestSchema.safeParse(requestOf({ ...FIRST, n })).success, n).toBe(false);
  });

  it('says itself in words', () => {
    expect(wordsOf(FIRST)).toBe('1PI, one loop');
    expect(wordsOf({ ...FIRST, by: 'total', n: '3', keep: 'all' })).toBe('all diagrams, total power 3');
  });
});

describe('plates', () => {
  it('are numbered in Roman numerals', () => {
    expect([1, 3, 4, 8, 9, 14, 40, 49, 88].map(numeral)).toEqual([
      'I',
      'III',
      'IV',
      'VIII',
      'IX',
      'XIV',
      'XL',
      'XLIX',
      'LXXXVIII',
    ]);
  });

  it('hold the members of a group in order', () => {
    expect(grouped([3, 1, 4, 1, 5], (item) => String(item % 2))).toEqual([[3, 1, 1, 5], [4]]);
  });

  it('are titled by their couplings', () => {
    expect(couplingsLatex({ lambda: '1', rho: '2', v: '0' }, (name) => `\\${name}`)).toBe('\\lambda\\,\\rho^{2}');
    expect(couplingsLatex({}, (name) => name)).toBe('1');
  });
});

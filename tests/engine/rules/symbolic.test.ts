import { describe, expect, it } from 'vitest';
import { rational } from '#engine/exact/rational.ts';
import { readModel } from '#engine/lagrangian/read.ts';
import { assertRules, checkRules, derivativeAgrees } from '#jobs/symbolic.ts';

/** The models without derivative couplings of tests/reference/feynman_rules.json and of the other tests of the rules. */
const texts = [
  '1/2 (d a)^2 + 1/2 (d b)^2 - lambda/4! (a^2 + b^2)^2',
  '1/2 (d s)^2 + 1/2 (d q)^2 - lambda/4 (q^2 + 2 v s + s^2)^2',
  '1/2 (d h)^2 - lambda/4! (h^4 + 4 v h^3)',
  '1/2 (d chi)^2 + 1/2 (d phi)^2 - g/2 chi^2 phi - y chi^4 phi^2',
  '1/2 (d A)^2 + 1/2 (d B)^2 + 1/2 (d C)^2 - g A B C - k A^2 B',
  '1/2 (d phi)^2 - g/3! phi^3 - lambda/4! phi^4 - y/5! phi^5 - z/6! phi^6',
  '1/2 (d phi)^2 - 7/5 g phi^3 - 24 lambda phi^4 - a/12! phi^12',
  '1/2 (d h)^2 + 1/2 (d s)^2 - lh/4! h^4 - ls/4! s^4 - lhs/4 h^2 s^2 - kappa/2 h s^2 - k3/3! h^3 - t h',
  '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - g chi phi^* phi - lambda/4 (phi^* phi)^2 - mu (phi^3 + phi^*^3)',
];

describe('vertex rules against derivatives by a computer algebra system', () => {
  it.each(texts)('%s', (lagrangian) => {
    const checks = checkRules(readModel({ lagrangian }));
    expect(checks.length).toBeGreaterThan(1);
    expect(checks.every(({ agrees }) => agrees === true)).toBe(true);
  });
  it('tells a rule that disagrees', () => {
    const [kind] = readModel({ lagrangian: '1/2 (d phi)^2 - 5/7 lambda phi^4' }).kinds;
    expect(derivativeAgrees(kind!, rational(-120, 7))).toBe(true);
    expect(derivativeAgrees(kind!, rational(-60, 7))).toBe(false);
    expect(derivativeAgrees(kind!, rational(120, 7))).toBe(false);
  });
  it('leaves derivative couplings and irrational numbers to other checks', () => {
    const model = readModel({ lagrangian: '1/2 (d phi)^2 + b phi (d phi)^2 - sqrt(2) g phi^4 - pi g phi^6' });
    expect(checkRules(model).map(({ agrees }) => agrees)).toEqual([null, null, null]);
    expect(() => assertRules(model)).not.toThrow();
  });
});

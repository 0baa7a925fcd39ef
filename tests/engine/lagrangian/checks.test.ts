import { describe, expect, it } from 'vitest';
import { boundedness } from '#engine/lagrangian/boundedness.ts';
import type { Check } from '#engine/lagrangian/check.ts';
import { modelChecks } from '#engine/lagrangian/checks.ts';
import {
  couplingDimensions,
  fieldDimension,
  parameterDimension,
  parameterDimensions,
} from '#engine/lagrangian/massDimension.ts';
import { linearText } from '#engine/lagrangian/spacetime.ts';
import { modelOf } from './plain.ts';

const inDimension = (text: string, dimension: string) =>
  modelOf(text, { conventions: { signature: '+---', dimension } });
const codesOf = (text: string, verdict: Check['verdict']): string[] =>
  modelChecks(modelOf(text)).flatMap((check) => (check.verdict === verdict ? [check.code] : []));

/** Mass dimensions: common practice, [φ] = (d − 2)/2 and [∫dᵈx L] = 0. */
describe('mass dimensions', () => {
  it.each([
    ['4', '1'],
    ['3', '1/2'],
    ['2', '0'],
    ['1', '-1/2'],
    ['6', '2'],
    ['4-2eps', '1 - eps'],
    ['4 - ε', '1 - 1/2 eps'],
    ['6-2\\epsilon', '2 - eps'],
    ['10/3', '2/3'],
  ])('of a field in d = %s: %s', (dimension, expected) => {
    expect(linearText(fieldDimension(inDimension('1/2 (d phi)^2', dimension)))).toBe(expected);
  });

  it.each([
    ['4', 'lambda phi^4', '0', 'just renormalisable'],
    ['4-2eps', 'lambda phi^4', '2eps', 'just renormalisable'],
    ['4-eps', 'lambda phi^4', 'eps', 'just renormalisable'],
    ['4', 'lambda phi^3', '1', 'super-renormalisable'],
    ['6', 'lambda phi^3', '0', 'just renormalisable'],
    ['6-2eps', 'lambda phi^3', 'eps', 'just renormalisable'],
    ['3', 'lambda phi^6', '0', 'just renormalisable'],
    ['3-2eps', 'lambda phi^6', '4eps', 'just renormalisable'],
    ['4', 'lambda phi^6', '-2', 'non-renormalisable'],
    ['2', 'lambda phi^12', '2', 'super-renormalisable'],
    ['4', 'lambda phi^2 (d phi)^2', '-2', 'non-renormalisable'],
    ['2', 'lambda phi^2 (d phi)^2', '0', 'just renormalisable'],
    ['4', 'lambda phi', '3', 'super-renormalisable'],
  ])('in d = %s the coupling of %s has dimension %s', (dimension, term, expected, renormalisability) => {
    const model = inDimension(`1/2 (d phi)^2 - ${term}`, dimension);
    expect(couplingDimensions(model)).toEqual([{ name: 'lambda', dimension: expected, renormalisability }]);
    expect(parameterDimension(model, 'lambda')).toBe(expected);
  });

  it('parameters one by one, as far as the terms fix them', () => {
    const model = modelOf('1/2 (d h)^2 - 1/2 m^2 h^2 - lambda v h^3 - lambda/4 h^4 - a b h^3 - h^6/f^2');
    const of = (name: string) => parameterDimension(model, name);
    expect(['m', 'lambda', 'v', 'f', 'a', 'b'].map(of)).toEqual(['1', '0', '1', '1', null, null]);
    expect(parameterDimensions(model).clash).toBeNull();
  });

  it.each(['1/2 (d h)^2 - g h^3 - g h^4', '1/2 (d h)^2 - h^3', '1/2 (d h)^2 - g h^3 - g^2 h^6'])(
    'a scale is left out of %s',
    (text) => {
      expect(parameterDimensions(modelOf(text)).clash).not.toBeNull();
      expect(codesOf(text, 'caution')).toContain('dimension-clash');
    },
  );
});

const R = '1/2 (d x)^2 + 1/2 (d y)^2 - ';

/** Signs read off by hand; two fields by a x⁴ + b x²y² + c y⁴ ≥ 0 ⇔ a, c ≥ 0 and b ≥ −2√(ac) (K. Kannike, Eur. Phys. J. C 72 (2012) 2093). */
describe('boundedness of the potential', () => {
  it.each([
    ['1/2 (d x)^2 - 1/2 m^2 x^2', 'free'],
    ['1/2 (d x)^2 - lambda/4! x^4', 'bounded'],
    ['1/2 (d x)^2 + lambda/4! x^4', 'unbounded'],
    ['1/2 (d x)^2 - g/3! x^3', 'unbounded'],
    ['1/2 (d x)^2 - g x^3 - k x^4', 'bounded'],
    ['1/2 (d x)^2 + g x^4 - k x^6', 'bounded'],
    ['1/2 (d x)^2 - (a - b) x^4', 'undecided'],
    ['(d x^*)(d x) - lambda (x^* x)^2', 'bounded'],
    ['(d x^*)(d x) + lambda (x^* x)^2', 'unbounded'],
    ['(d x^*)(d x) - lambda (x^4 + h.c.)', 'undecided'],
    [`${R}a x^4 - b x^2 y^2 - c y^4`, 'bounded'],
    [`${R}a x^4 + b x^2 y^2 - c y^4`, 'condition'],
    [`${R}a x^4 + a x^2 y^2 - a y^4`, 'bounded'],
    [`${R}a x^4 + 3 a x^2 y^2 - a y^4`, 'unbounded'],
    [`${R}a x^4 + 2 a x^2 y^2 - a y^4`, 'undecided'],
    [`${R}a x^4 + b x^2 y^2 + c y^4`, 'unbounded'],
    [`${R}a x^2 y^2`, 'undecided'],
    [`${R}0 + a x^2 y^2`, 'unbounded'],
    [`${R}a x^3 y`, 'undecided'],
    [`${R}a (x^2 + y^2)^2`, 'bounded'],
  ])('%s: %s', (text, answer) => {
    expect(boundedness(modelOf(text)).answer).toBe(answer);
  });

  it('is the same for a Euclidean action', () => {
    const euclidean = modelOf('1/2 (d x)^2 + lambda/4! x^4', {
      conventions: { signature: 'euclidean', dimension: '4' },
    });
    expect(boundedness(euclidean).answer).toBe('bounded');
  });

  it.each([
    ['a x^4 + b x^2 y^2 - c y^4', 'b^2 < 4 a*c'],
    ['a/4 x^4 + b/2 x^2 y^2 - c/4 y^4', 'b^2 < a*c'],
    ['a/4! x^4 + b/4 x^2 y^2 - c/4! y^4', '9 b^2 < a*c'],
    ['x^4 + b x^2 y^2 - y^4', 'b^2 < 4'],
  ])('the condition for %s is %s', (potential, condition) => {
    expect(boundedness(modelOf(`${R}${potential}`)).text).toContain(`if ${condition}. `);
  });
});

describe('the list of checks', () => {
  it('of a healthy model has nothing to warn of', () => {
    const text = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
    expect(codesOf(text, 'caution')).toEqual([]);
    expect(codesOf(text, 'bad')).toEqual([]);
    expect(codesOf(text, 'good')).toEqual(['hermiticity', 'kinetic-signs', 'renormalisability', 'boundedness']);
    expect(codesOf(text, 'note')).toEqual(['dimensions', 'discrete']);
  });

  it.each([
    ['1/2 (d phi)^2 + 1/2 m^2 phi^2 - g phi^4', 'caution', 'mass-sign'],
    ['1/2 (d phi)^2 - J phi', 'caution', 'tadpole-term'],
    ['1/2 (d phi)^2 - g phi^3', 'note', 'tadpole-allowed'],
    ['(Z - 1/2 W) (d phi)^2 - g phi^4', 'caution', 'kinetic-signs'],
    ['(d phi)^2 - g/4! phi^4', 'note', 'kinetic-normalisation'],
    ['1/2 (d phi)^2 - g phi^4', 'note', 'normalisation'],
    ['1/2 (d phi)^2 + g phi^4', 'caution', 'boundedness'],
    ['(d phi^*)(d phi) - g (phi^* phi)^2', 'note', 'charge'],
    ['(d phi^*)(d phi) - g (phi^* phi)^2', 'note', 'conjugation'],
    ['1/2 (d x)^2 + 1/2 (d y)^2 - g x^2 y^2', 'note', 'permutations'],
  ] as const)('%s: %s %s', (text, verdict, code) => {
    expect(codesOf(text, verdict)).toContain(code);
  });

  it.each(['1/2 (d phi)^2 - g/4! phi^4', '(d phi^*)(d phi) - g/4 (phi^* phi)^2', '1/2 (d phi)^2 - g phi^2 (d phi)^2'])(
    'the usual normalisation of %s goes without a note',
    (text) => {
      expect(codesOf(text, 'note')).not.toContain('normalisation');
    },
  );

  it('says what an unusual normalisation does to the vertex factor', () => {
    const found = modelChecks(modelOf('1/2 (d phi)^2 - g phi^4')).find(({ code }) => code === 'normalisation');
    expect(found!.text).toContain('-24 g');
  });

  it('every check is a sentence', () => {
    const text = '1/2 (d x)^2 + (d z^*)(d z) - a x^4 - b x z^* z - c x^2 (d x)^2 - J x';
    for (const { title, text: sentence } of modelChecks(modelOf(text))) {
      expect(title).toMatch(/^[A-Z]/);
      expect(sentence).toMatch(/\.$/);
    }
  });
});

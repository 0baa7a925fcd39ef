import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { modelLatex, modelText } from '#engine/lagrangian/print.ts';
import { modelOf, plainModel } from './plain.ts';
import { lagrangians } from './randomModels.ts';

describe('the printed normal form', () => {
  it('reads back to the same model, as text', () => {
    fc.assert(
      fc.property(lagrangians, (text) => {
        const model = modelOf(text);
        expect(plainModel(modelOf(modelText(model)))).toEqual(plainModel(model));
      }),
      { numRuns: 150, seed: 2024 },
    );
  });

  it('reads back to the same model, as LaTeX', () => {
    fc.assert(
      fc.property(lagrangians, (text) => {
        const model = modelOf(text);
        expect(plainModel(modelOf(modelLatex(model)))).toEqual(plainModel(model));
      }),
      { numRuns: 150, seed: 2025 },
    );
  });

  it('is its own normal form', () => {
    fc.assert(
      fc.property(lagrangians, (text) => {
        const printed = modelText(modelOf(text));
        expect(modelText(modelOf(printed))).toBe(printed);
      }),
      { numRuns: 50, seed: 2026 },
    );
  });
});

describe('the normal form looks as on paper', () => {
  it.each([
    ['1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4', '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4'],
    ['½(∂φ)² − ½m²φ² − λ/24 φ⁴', '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4'],
    ['|d phi|^2 - lambda/4 |phi|^4', '(d phi)(d phi^*) - lambda/4 phi^2 (phi^*)^2'],
    ['1/2 (d x)^2 + 1/2 (d y)^2 - q/36 x^3 y^3', '1/2 (d x)^2 + 1/2 (d y)^2 - q/(3! 3!) x^3 y^3'],
    ['1/2 (d x)^2 - 3 g^2 x^4/8', '1/2 (d x)^2 - 3 g^2/8 x^4'],
    ['1/2 (d x)^2 - g x^3', '1/2 (d x)^2 - g x^3'],
    ['1/2 (d x)^2 - (1 + sqrt(2)) g x^3', '1/2 (d x)^2 + (-1 - sqrt(2)) g x^3'],
    ['1/2 (d x)^2 - x^2 (d x)^2/f^2', '1/2 (d x)^2 - 1/f^2 x^2 (d x)^2'],
    ['1/2 (d h)^2 - m^2/(2 v) h^3 - m^2/8/v^2 h^4', '1/2 (d h)^2 - m^2/(2 v) h^3 - m^2/(8 v^2) h^4'],
    ['1/2 (d x)^2 - c x^4/(4! f g^2)', '1/2 (d x)^2 - c/(4! f*g^2) x^4'],
    ['1/2 (d x)^2 - c x^2 d^2 x', '1/2 (d x)^2 - c x^2 d^2 x'],
  ])('%s', (typed, printed) => {
    expect(modelText(modelOf(typed))).toBe(printed);
  });

  it('in LaTeX', () => {
    const model = modelOf('1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4');
    expect(modelLatex(model)).toBe(
      String.raw`\frac{1}{2} (\partial \phi)^{2} - \frac{1}{2} m^{2} \phi^{2} - \frac{\lambda}{4!} \phi^{4}`,
    );
  });
});

import { describe, expect, it } from 'vitest';
import { renameField, rotateFields, shiftField, splitComplexField } from '#engine/lagrangian/substitute.ts';
import { modelOf, plainModel } from './plain.ts';

/** Two texts are the same model. */
const same = (a: string, b: string): void => expect(plainModel(modelOf(a))).toEqual(plainModel(modelOf(b)));

describe('shift of a field', () => {
  /** V = −μ²φ² + λφ⁴/4! about φ = √(12/λ) μ: −V = 6μ⁴/λ − 2μ²ψ² − μ√(λ/3) ψ³ − λψ⁴/4!; worked out by hand. */
  it('about a minimum: no linear term, the right mass and cubic coupling', () => {
    const model = modelOf('1/2 (d phi)^2 + mu^2 phi^2 - lambda/4! phi^4');
    const text = shiftField(model, 'phi', 'sqrt(12/lambda) mu', 'psi');
    same(text, '1/2 (d psi)^2 - 2 mu^2 psi^2 - mu sqrt(lambda/3) psi^3 - lambda/4! psi^4');
  });

  it('by a parameter: the tadpole and the shifted mass appear', () => {
    const model = modelOf('1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4');
    same(
      shiftField(model, 'φ', 'v', 'h'),
      '1/2 (d h)^2 - m^2 v h - lambda v^3/6 h - 1/2 m^2 h^2 - lambda v^2/4 h^2 - lambda v/6 h^3 - lambda/4! h^4',
    );
  });

  it('by v and back by −v is the model itself', () => {
    const text = '1/2 (d phi)^2 - c phi^2 (d phi)^2 - b phi^2 d^2 phi - g/3! phi^3 - lambda/4! phi^4';
    const there = modelOf(shiftField(modelOf(text), 'phi', 'v', 'h'));
    same(shiftField(there, 'h', '-v', 'phi'), text);
  });

  it('of a complex field keeps it complex', () => {
    const model = modelOf('(d phi^*)(d phi) - lambda (phi^* phi)^2');
    same(shiftField(model, 'phi', 'v', 'phi'), '(d phi^*)(d phi) - lambda ((v + phi^*)(v + phi))^2');
  });
});

describe('components of a complex field', () => {
  it('kinetic and mass terms of both are those of a healthy real field', () => {
    const model = modelOf('(d phi^*)(d phi) - m^2 phi^* phi - lambda/4 (phi^* phi)^2');
    same(
      splitComplexField(model, 'phi', '0', ['h', 'G']),
      '1/2 (d h)^2 + 1/2 (d G)^2 - 1/2 m^2 (h^2 + G^2) - lambda/16 (h^2 + G^2)^2',
    );
  });

  /** Broken phase, m² = λv²/4 in −V = m²|φ|² − λ|φ|⁴/4: the second component is massless (J. Goldstone, 1961). */
  it('about the minimum the second component is massless', () => {
    const model = modelOf('(d phi^*)(d phi) + 1/4 lambda v^2 phi^* phi - lambda/4 (phi^* phi)^2');
    const broken = modelOf(splitComplexField(model, 'phi', 'v', ['h', 'G']));
    const massOf = (name: string) => broken.propagators.find(({ field }) => field === name)!.massSquared;
    expect(massOf('G')).toEqual([]);
    expect(massOf('h')).toHaveLength(1);
    expect(broken.kinds.filter(({ fields }) => fields.length === 1)).toEqual([]);
  });
});

describe('rotation of two fields', () => {
  const text = '1/2 (d x)^2 + 1/2 (d y)^2 - a (x^2 + y^2)^2 - mu x y';

  it('leaves what is invariant and turns the mixing term into masses', () => {
    same(
      rotateFields(modelOf(text), ['x', 'y'], ['1/sqrt(2)', '1/sqrt(2)']),
      '1/2 (d x)^2 + 1/2 (d y)^2 - a (x^2 + y^2)^2 - mu/2 x^2 + mu/2 y^2',
    );
  });

  it('by an angle and back is the model itself', () => {
    const there = modelOf(rotateFields(modelOf(text), ['x', 'y'], ['3/5', '4/5'], ['u', 'w']));
    same(rotateFields(there, ['u', 'w'], ['3/5', '-4/5'], ['x', 'y']), text);
  });

  it('must be a rotation', () => {
    expect(() => rotateFields(modelOf(text), ['x', 'y'], ['1/2', '1/2'])).toThrow(/c\^2 \+ s\^2 = 1/);
    expect(() => rotateFields(modelOf(text), ['x', 'x'], ['1', '0'])).toThrow(/different real fields/);
  });
});

describe('names', () => {
  const model = modelOf('1/2 (d phi)^2 + 1/2 (d h)^2 - g phi^2 h');

  it('a field is renamed throughout', () => {
    same(renameField(model, 'phi', 'σ'), '1/2 (d sigma)^2 + 1/2 (d h)^2 - g sigma^2 h');
  });

  it.each([
    ['h', /stands in this model already/],
    ['g', /stands in this model already/],
    ['2', /not a name/],
    ['x^*', /not a name/],
  ])('%s is refused as a new name', (name, message) => {
    expect(() => renameField(model, 'phi', name)).toThrow(message);
  });

  it('a field that is none is refused', () => {
    expect(() => renameField(model, 'chi', 'x')).toThrow(/no field of this model/);
  });
});

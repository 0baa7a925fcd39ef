import { describe, expect, it } from 'vitest';
import { kindLines, modelOf, propagatorLines } from './plain.ts';

const K = '1/2 (d x)^2 + 1/2 (d y)^2 - ';
const diagonal = (text: string) => modelOf(text, { mixing: 'diagonalise' });

/** Masses of a symmetric 2 × 2 matrix: its eigenvalues, by hand. */
describe('diagonalised masses', () => {
  it.each([
    [`${K}mu x y`, ['x: Z = 1, M^2 = 1 mu:1', 'y: Z = 1, M^2 = -1 mu:1']],
    [`${K}1/2 m^2 (x^2 + y^2) - mu x y`, ['x: Z = 1, M^2 = 1 m:2 + 1 mu:1', 'y: Z = 1, M^2 = 1 m:2 + -1 mu:1']],
    [`${K}7/2 m^2 x^2 - 2 m^2 y^2 - 2 m^2 x y`, ['x: Z = 1, M^2 = 8 m:2', 'y: Z = 1, M^2 = 3 m:2']],
    [`${K}7/2 m^2 x^2 - 2 m^2 y^2 + 2 m^2 x y`, ['x: Z = 1, M^2 = 8 m:2', 'y: Z = 1, M^2 = 3 m:2']],
    [`${K}2 m^2 x^2 - 7/2 m^2 y^2 - 2 m^2 x y`, ['x: Z = 1, M^2 = 3 m:2', 'y: Z = 1, M^2 = 8 m:2']],
    [`${K}1/2 (3 x + 4 y)^2`, ['x: Z = 1, M^2 = 0', 'y: Z = 1, M^2 = 25']],
  ])('%s', (text, propagators) => {
    const model = diagonal(text);
    expect(propagatorLines(model)).toEqual(propagators);
    expect(model.kinds).toEqual([]);
    expect(model.notes.map(({ code }) => code)).toEqual(['rotated']);
  });

  it('interactions are rotated along: an invariant one stays as it is', () => {
    const text = `${K}mu x y - a (x^2 + y^2)^2`;
    expect(kindLines(diagonal(text))).toEqual(kindLines(modelOf(`${K}a (x^2 + y^2)^2`)));
  });

  it('a Euclidean action has the same masses', () => {
    const model = modelOf('1/2 (d x)^2 + 1/2 (d y)^2 + 7/2 x^2 + 2 y^2 + 2 x y', {
      mixing: 'diagonalise',
      conventions: { signature: 'euclidean', dimension: '4' },
    });
    expect(propagatorLines(model)).toEqual(['x: Z = 1, M^2 = 8', 'y: Z = 1, M^2 = 3']);
  });

  it('what is marked as a vertex stays one', () => {
    const model = modelOf(`${K}mu x y`, { mixing: 'diagonalise', parameters: { mu: { vertex: true } } });
    expect(kindLines(model)).toEqual(['mu: x y: -1']);
  });

  it('without mixing nothing is changed', () => {
    expect(diagonal(`${K}g x^2 y`)).toEqual(modelOf(`${K}g x^2 y`));
  });

  it.each([
    [`${K}1/2 m^2 x^2 - mu x y`, /without naming an angle/],
    [`${K}m^2 x^2 - m^2 x y`, /roots of roots/],
    [`${K}k d x d y`, /offered for masses of real fields/],
    [`(d x)^2 + 1/2 (d y)^2 - mu x y`, /offered for masses of real fields/],
    [`${K}mu x y + 1/2 (d z)^2 - mu y z`, /only pairs/],
  ])('%s is refused', (text, message) => {
    expect(() => diagonal(text)).toThrow(message);
  });
});

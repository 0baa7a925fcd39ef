import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { annihilator, charge, echelonBasis } from '#engine/lagrangian/lattice.ts';
import type { FieldFactor } from '#engine/lagrangian/model.ts';
import { exchangeableFields, isChargeConjugationInvariant } from '#engine/lagrangian/permutations.ts';
import { forbiddenBySymmetry, phaseSymmetries, symmetryText } from '#engine/lagrangian/symmetries.ts';
import { modelOf } from './plain.ts';

const factors = (text: string): FieldFactor[] =>
  text.split(' ').map((name) => ({ field: name.replace('*', ''), conjugate: name.endsWith('*') }));

const REAL = (...names: string[]): string => names.map((name) => `1/2 (d ${name})^2`).join(' + ');
const COMPLEX = (...names: string[]): string => names.map((name) => `(d ${name}^*)(d ${name})`).join(' + ');

/** Lagrangian and its phase symmetries. Common practice: read off the vertices by hand. */
const GROUPS: readonly (readonly [text: string, symmetries: readonly string[]])[] = [
  [`${REAL('phi')} - phi^4`, ['phi → −phi']],
  [`${REAL('phi')} - phi^3`, []],
  [`${REAL('phi')} - J phi`, []],
  [`${REAL('x', 'y')} - x^2 y^2`, ['x → −x', 'y → −y']],
  [`${REAL('x', 'y')} - x^3 y`, ['x → −x, y → −y']],
  [`${REAL('x', 'y')} - mu x y - x^4`, ['x → −x, y → −y']],
  [`${REAL('x', 'y')} - x y^2`, ['y → −y']],
  [`${COMPLEX('phi')} - (phi^* phi)^2`, ['U(1) with charge 1 of phi']],
  [`${COMPLEX('phi')} - (phi^3 + h.c.)`, ['phi → e^(2πi/3) phi']],
  [`${COMPLEX('phi')} - (phi^2 + h.c.)`, ['phi → −phi']],
  [`${COMPLEX('phi')} - (phi + h.c.)`, []],
  [`${COMPLEX('a', 'b')} - (a^2 b^* + h.c.)`, ['U(1) with charges 1 of a, 2 of b']],
  [`${COMPLEX('a', 'b')} - a^* a b^* b`, ['U(1) with charge 1 of a', 'U(1) with charge 1 of b']],
  [`${COMPLEX('a')} + ${REAL('h')} - h a^* a`, ['U(1) with charge 1 of a']],
  [`${COMPLEX('a')} + ${REAL('h')} - h (a^2 + h.c.)`, ['a → e^(2πi/4) a, h → −h']],
];

describe('phase symmetries', () => {
  it.each(GROUPS)('%s', (text, symmetries) => {
    const model = modelOf(text);
    expect(phaseSymmetries(model).map((symmetry) => symmetryText(model, symmetry))).toEqual(symmetries);
  });
});

describe('correlators that a symmetry forbids', () => {
  it.each([
    [`${REAL('phi')} - phi^4`, 'phi', true],
    [`${REAL('phi')} - phi^4`, 'phi phi', false],
    [`${REAL('phi')} - phi^3`, 'phi', false],
    [`${REAL('x', 'y')} - x^3 y`, 'x y', false],
    [`${REAL('x', 'y')} - x^3 y`, 'x x y', true],
    [`${REAL('x', 'y')} - x^2 y^2`, 'x y', true],
    [`${COMPLEX('phi')} - (phi^* phi)^2`, 'phi phi', true],
    [`${COMPLEX('phi')} - (phi^* phi)^2`, 'phi phi*', false],
    [`${COMPLEX('phi')} - (phi^3 + h.c.)`, 'phi phi', true],
    [`${COMPLEX('phi')} - (phi^3 + h.c.)`, 'phi phi phi', false],
    [`${COMPLEX('phi')} - (phi^3 + h.c.)`, 'phi* phi* phi*', false],
    [`${COMPLEX('a', 'b')} - (a^2 b^* + h.c.)`, 'a a b*', false],
    [`${COMPLEX('a', 'b')} - (a^2 b^* + h.c.)`, 'a b*', true],
  ])('%s: <%s> forbidden %s', (text, legs, forbidden) => {
    const sentence = forbiddenBySymmetry(modelOf(text), factors(legs));
    expect(sentence !== null).toBe(forbidden);
    if (sentence) expect(sentence).toMatch(/^This correlator vanishes at every order: .*\.$/);
  });

  it('the vacuum is never forbidden', () => {
    for (const [text] of GROUPS) expect(forbiddenBySymmetry(modelOf(text), [])).toBeNull();
  });
});

describe('characters of a lattice', () => {
  const vector = fc.array(fc.integer({ min: -3, max: 3 }), { minLength: 3, maxLength: 3 }).map((v) => v.map(BigInt));
  const vectors = fc.array(vector, { maxLength: 4 });
  const range = [-4n, -3n, -2n, -1n, 0n, 1n, 2n, 3n, 4n];

  /** All combinations of the vectors with small coefficients: counted by brute force. */
  const combinations = (rows: readonly bigint[][]): bigint[][] =>
    rows.reduce<bigint[][]>(
      (sums, row) => sums.flatMap((sum) => range.map((c) => sum.map((n, i) => n + c * row[i]!))),
      [[0n, 0n, 0n]],
    );

  it('vanish on every vector of the lattice', () => {
    fc.assert(
      fc.property(vectors, (rows) => {
        const characters = annihilator(3, echelonBasis(3, rows));
        for (const v of combinations(rows.slice(0, 2)))
          for (const character of characters) expect(charge(character, v)).toBe(0n);
      }),
      { numRuns: 100, seed: 1 },
    );
  });

  it('tell apart every vector outside it: their number is the index of the lattice', () => {
    fc.assert(
      fc.property(fc.tuple(vector, vector, vector), ([a, b, c]) => {
        const determinant =
          a[0]! * (b[1]! * c[2]! - b[2]! * c[1]!) -
          a[1]! * (b[0]! * c[2]! - b[2]! * c[0]!) +
          a[2]! * (b[0]! * c[1]! - b[1]! * c[0]!);
        fc.pre(determinant !== 0n);
        const characters = annihilator(3, echelonBasis(3, [a, b, c]));
        const index = characters.reduce((product, { order }) => product * order, 1n);
        expect(index).toBe(determinant < 0n ? -determinant : determinant);
      }),
      { numRuns: 200, seed: 2 },
    );
  });

  it('as many are continuous as dimensions are missing', () => {
    const rows = [
      [1n, 1n, 0n],
      [2n, 2n, 0n],
    ];
    expect(annihilator(3, echelonBasis(3, rows)).filter(({ order }) => order === 0n)).toHaveLength(2);
  });
});

describe('permutations of fields', () => {
  it.each([
    [`${REAL('x', 'y')} - a (x^2 + y^2)^2`, [['x', 'y']]],
    [`${REAL('x', 'y')} - a x^4 - b y^4`, []],
    [`${REAL('x', 'y')} - 1/2 m^2 x^2 - a (x^2 + y^2)^2`, []],
    [`${REAL('x', 'y', 'z')} - g x y z`, [['x', 'y', 'z']]],
    [`${REAL('x', 'y', 'z')} - g x^2 z - g y^2 z`, [['x', 'y']]],
    [
      `${REAL('w', 'x', 'y', 'z')} - g w x - g y z`,
      [
        ['w', 'x'],
        ['y', 'z'],
      ],
    ],
    [`${REAL('x', 'y')} - g x^2 (d y)^2`, []],
    [`${REAL('x', 'y')} - g x^2 (d y)^2 - g y^2 (d x)^2`, [['x', 'y']]],
    [`${COMPLEX('a', 'b')} - (g a b^*^2 + h.c.)`, []],
  ] as const)('%s', (text, sets) => {
    expect(exchangeableFields(modelOf(text))).toEqual(sets);
  });

  it.each([
    [`${REAL('x')} - x^4`, null],
    [`${COMPLEX('a')} - (g a^3 + h.c.)`, true],
    [`${COMPLEX('a')} - (i g a^3 + h.c.)`, false],
    [`${COMPLEX('a')} - y a^3 - conj(y) a^*^3`, false],
  ])('charge conjugation of %s: %s', (text, invariant) => {
    expect(isChargeConjugationInvariant(modelOf(text))).toBe(invariant);
  });
});

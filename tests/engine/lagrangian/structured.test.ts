import { describe, expect, it } from 'vitest';
import type { ModelSource } from '#engine/lagrangian/input.ts';
import { readModel } from '#engine/lagrangian/read.ts';
import { modelOf, plainModel } from './plain.ts';

type Terms = NonNullable<ModelSource['model']>['terms'];

/** A list of terms and the text that says the same. */
const SAME: readonly (readonly [text: string, terms: Terms])[] = [
  [
    '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4',
    [
      { coefficient: '1/2', fields: ['phi', 'phi'], derivatives: [[1, 2]] },
      { coefficient: '-m^2/2', fields: ['phi', 'φ'] },
      { coefficient: '-lambda/4!', fields: ['phi', 'phi', '\\phi', '\\varphi'] },
    ],
  ],
  [
    '(d phi^*)(d phi) - y phi^3 - conj(y) phi^*^3',
    [
      { coefficient: '1', fields: ['phi^*', 'phi'], derivatives: [[1, 2]] },
      { coefficient: '-y', fields: ['phi', 'phi', 'phi'] },
      { coefficient: '-conj(y)', fields: ['φ†', 'phi^\\dagger', 'conj(phi)'] },
    ],
  ],
  [
    '-1/2 phi d^2 phi - c phi^2 d^2 phi - b phi (d phi)^2 d^2 phi',
    [
      { coefficient: '-1/2', fields: ['phi', 'phi'], derivatives: [[2, 2]] },
      { coefficient: '-c', fields: ['phi', 'phi', 'phi'], derivatives: [[1, 1]] },
      {
        coefficient: '-b',
        fields: ['phi', 'phi', 'phi', 'phi'],
        derivatives: [
          [4, 2],
          [3, 3],
        ],
      },
    ],
  ],
  [
    '1/2 (d h)^2 - (a + sqrt(2) b) h^3',
    [
      { coefficient: '1/2', fields: ['h', 'h'], derivatives: [[1, 2]] },
      { coefficient: '-(a + sqrt(2) b)', fields: ['h', 'h', 'h'] },
    ],
  ],
];

describe('a model given as terms', () => {
  it.each(SAME)('is that of %s', (text, terms) => {
    expect(plainModel(readModel({ model: { terms } }))).toEqual(plainModel(modelOf(text)));
  });

  it('has no places in a text', () => {
    const [, terms] = SAME[0]!;
    const model = readModel({ model: { terms } });
    expect(model.kinds.flatMap((kind) => kind.terms.map(({ span }) => span))).toEqual([null]);
  });
});

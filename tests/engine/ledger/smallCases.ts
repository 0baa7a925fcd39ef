import type { Drop, Keep, Theory } from '#engine/graph/theory.ts';
import { real } from './requests.ts';

/** Small theories and contents, every one of which can be contracted in all ways. */
export const keeps: readonly Keep[] = ['all', 'normalised', 'connected', '1PI'];
export const drops: readonly (readonly Drop[])[] = [
  [],
  ['self-contractions'],
  ['tadpoles'],
  ['scaleless'],
  ['self-contractions', 'tadpoles'],
  ['self-contractions', 'scaleless'],
  ['tadpoles', 'scaleless'],
  ['self-contractions', 'tadpoles', 'scaleless'],
];

const portal: Theory = {
  partner: [0, 1],
  kinds: [
    [1, 0],
    [1, 2],
    [3, 0],
    [2, 2],
    [0, 2],
    [0, 4],
  ],
};
/** Types φ, φ*, χ. */
const charged: Theory = {
  partner: [1, 0, 2],
  kinds: [
    [1, 1, 1],
    [2, 2, 0],
    [0, 0, 1],
    [1, 1, 0],
    [0, 0, 3],
    [2, 0, 1],
    [0, 2, 1],
    [1, 0, 0],
    [0, 1, 0],
    [2, 1, 0],
    [1, 2, 0],
  ],
};
const twoComplex: Theory = {
  partner: [1, 0, 3, 2],
  kinds: [
    [1, 1, 1, 1],
    [1, 0, 1, 0],
    [0, 1, 0, 1],
    [2, 2, 0, 0],
  ],
};

export const smallCases: [string, Theory, number[], number[]][] = [
  ['φ³ vacuum', real(3), [], [4]],
  ['φ³ one-point', real(3), [0], [3]],
  ['φ³ two-point', real(3), [0, 0], [2]],
  ['φ³ three-point', real(3), [0, 0, 0], [3]],
  ['φ³ four-point', real(3), [0, 0, 0, 0], [2]],
  ['φ⁴ vacuum', real(4), [], [3]],
  ['φ⁴ two-point', real(4), [0, 0], [2]],
  ['φ⁴ four-point', real(4), [0, 0, 0, 0], [2]],
  ['φ³ two-point, 14 half-lines', real(3), [0, 0], [4]],
  ['φ⁴ two-point, 14 half-lines', real(4), [0, 0], [3]],
  ['φ⁶ two-point', real(6), [0, 0], [2]],
  ['φ³ + φ⁴', real(3, 4), [0, 0], [2, 1]],
  ['φ + φ³ vacuum', real(1, 3), [], [2, 2]],
  ['φ + φ³ vacuum, three tadpoles', real(1, 3), [], [3, 3]],
  ['φ + φ³ one-point', real(1, 3), [0], [2, 3]],
  ['φ + φ³ two-point', real(1, 3), [0, 0], [2, 2]],
  ['φ + φ⁴ two-point', real(1, 4), [0, 0], [2, 2]],
  ['φ + φ² + φ³ + φ⁴', real(1, 2, 3, 4), [0, 0], [1, 1, 1, 1]],
  ['φ² insertions', real(2, 4), [0, 0], [2, 1]],
  ['φ² ring', real(2), [], [4]],
  ['φ² + φ³ vacuum', real(2, 3), [], [2, 2]],
  ['φ one-point', real(1), [0], [1]],
  ['two one-point vertices', real(1), [], [2]],
  ['bare lines only', real(3), [0, 0, 0, 0], [0]],
  ['nothing at all', real(3), [], [0]],
  ['portal hss', portal, [0, 0], [0, 2, 0, 1, 0, 0]],
  ['portal with a tadpole', portal, [1, 1], [1, 1, 1, 1, 0, 0]],
  ['portal with tadpoles, vacuum', portal, [], [2, 2, 0, 0, 1, 0]],
  ['portal ⟨hhss⟩', portal, [0, 0, 1, 1], [0, 0, 0, 2, 0, 0]],
  ['portal one-point', portal, [0], [1, 2, 1, 0, 0, 0]],
  ['charged ⟨φφ*⟩', charged, [0, 1], [2, 1, 0, 1, 0, 0, 0, 0, 0, 0, 0]],
  ['charged vacuum', charged, [], [2, 1, 0, 1, 0, 0, 0, 0, 0, 0, 0]],
  ['charged with a χ tadpole', charged, [0, 1], [1, 0, 2, 1, 1, 0, 0, 0, 0, 0, 0]],
  ['charge broken by φφχ', charged, [2, 2], [0, 1, 0, 0, 0, 1, 1, 0, 0, 0, 0]],
  ['complex one-point vertices', charged, [0], [0, 0, 0, 1, 0, 0, 0, 0, 1, 1, 1]],
  ['complex one-point vertices, vacuum', charged, [], [0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1]],
  ['charged four-point, 14 half-lines', charged, [0, 1, 0, 1], [2, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0]],
  ['two complex fields', twoComplex, [0, 1], [2, 1, 1, 0]],
  ['two complex fields, mixing', twoComplex, [0, 2], [0, 1, 2, 1]],
];

import { describe, expect, it } from 'vitest';
import { InputError, LimitError } from '#engine/errors.ts';
import { rational } from '#engine/exact/rational.ts';
import type { CountingRequest, Keep, Order } from '#engine/graph/theory.ts';
import { admittedContents } from '#engine/ledger/contents.ts';
import { byLoops, oneField, real } from './requests.ts';

const powers = (weights: (number | [number, number])[][], bound: number[], through = false): Order => ({
  by: 'powers',
  weights: weights.map((row) => row.map((w) => (Array.isArray(w) ? rational(...w) : rational(w)))),
  bound: bound.map((b) => rational(b)),
  through,
});

const request = (kinds: number[], order: Order, legs = 0, keep: Keep = 'connected'): CountingRequest => ({
  theory: real(...kinds),
  legs: new Array<number>(legs).fill(0),
  order,
  keep,
  drop: [],
});

/** The relations of physics "Order", worked out by hand. */
describe('contents of an order', () => {
  it('total: only balanced contents of the total power', () => {
    expect(admittedContents(request([3, 4], powers([[1], [1]], [3])))).toEqual([
      [0, 3],
      [2, 1],
    ]);
  });
  it('through: every lower total too', () => {
    expect(admittedContents(request([3, 4], powers([[1], [1]], [2], true)))).toEqual([
      [0, 0],
      [0, 1],
      [0, 2],
      [2, 0],
    ]);
  });
  it('loops: Σ n (k − 2) = 2(L − 1) + E', () => {
    const theory = real(3, 4);
    expect(admittedContents(request([3, 4], byLoops(theory, 1), 2))).toEqual([
      [0, 1],
      [2, 0],
    ]);
    expect(admittedContents(request([3, 4], byLoops(theory, 1, true), 2))).toEqual([
      [0, 0],
      [0, 1],
      [2, 0],
    ]);
  });
  it('a counterterm carries its loop order', () => {
    const order: Order = { by: 'loops', kindLoops: [0, 1], bound: 1, through: false };
    expect(admittedContents(request([4, 2], order, 2))).toEqual([
      [0, 1],
      [1, 0],
    ]);
  });
  it('fractional and negative powers: a component bounded by another is finite', () => {
    expect(admittedContents(request([4], powers([[[1, 2]]], [2])))).toEqual([[4]]);
    expect(
      admittedContents(
        request(
          [4, 6],
          powers(
            [
              [1, -2],
              [0, 1],
            ],
            [2, -3],
          ),
        ),
      ),
    ).toEqual([[2, 1]]);
  });
  it.each([
    ['weight zero', request([4], powers([[0]], [2]))],
    ['a mass insertion by loops', request([2, 4], byLoops(real(2, 4), 1), 2)],
    ['a tadpole term by loops', request([1, 4], byLoops(real(1, 4), 1), 2)],
    ['a total with a negative power', request([4, 6], powers([[1], [-2]], [2]))],
  ])('%s is infinite', (_, infinite) => {
    expect(() => admittedContents(infinite)).toThrowError(expect.objectContaining({ code: 'infinite-order' }));
    expect(() => admittedContents(infinite)).toThrow(InputError);
  });
  it('one-point vertices are exempt under 1PI, where only the bare one occurs', () => {
    expect(admittedContents(request([1, 4], byLoops(real(1, 4), 1), 2, '1PI'))).toEqual([[0, 1]]);
    expect(admittedContents(request([1, 4], byLoops(real(1, 4), 0), 1, '1PI'))).toEqual([[1, 0]]);
    expect(admittedContents(oneField([1, 3], [1, 0], 1, '1PI'))).toEqual([[1, 0]]);
  });
  it('refuses an order of too many contents with its bound', () => {
    const kinds = new Array<number>(30).fill(4);
    expect(() =>
      admittedContents(
        request(
          kinds,
          powers(
            kinds.map(() => [1]),
            [12],
          ),
        ),
      ),
    ).toThrow(LimitError);
  });
});

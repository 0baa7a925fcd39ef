import { describe, expect, it } from 'vitest';
import { LimitError } from '#engine/errors.ts';
import { Arithmetic } from '#engine/lagrangian/arithmetic.ts';
import { BOUNDS } from '#engine/lagrangian/bounds.ts';
import { parameterMonomial } from '#engine/lagrangian/monomial.ts';
import { Source } from '#engine/lagrangian/source.ts';
import { modelOf, refusal } from './plain.ts';

const K = '1/2 (d phi)^2 - ';
const many = (n: number, piece: (k: number) => string, mark: string): string =>
  Array.from({ length: n }, (_, k) => piece(k)).join(mark);

/** Just inside and just outside of each bound, and the bound that the message must state. */
const EDGES: readonly (readonly [name: string, inside: string, outside: string, bound: number])[] = [
  ['power', `${K}g^20 phi^3`, `${K}g^21 phi^3`, BOUNDS.power],
  ['fields in a monomial', `${K}g phi^12`, `${K}g phi^13`, BOUNDS.fieldDegree],
  ['factorial', `${K}40! phi^3`, `${K}41! phi^3`, BOUNDS.factorial],
  ['digits', `${K}${'9'.repeat(40)} phi^3`, `${K}${'9'.repeat(41)} phi^3`, BOUNDS.digits],
  ['power of ten', `${K}1e40 phi^3`, `${K}1e41 phi^3`, BOUNDS.digits],
  ['name', `${K}${'g'.repeat(40)} phi^3`, `${K}${'g'.repeat(41)} phi^3`, BOUNDS.nameLength],
  ['derivative pairs', `${K}g phi^2 d^16 phi`, `${K}g phi^2 d^16 d^2 phi`, BOUNDS.derivativePairs],
  ['fields', many(40, (k) => `1/2 (d f_${k})^2`, '+'), many(41, (k) => `1/2 (d f_${k})^2`, '+'), BOUNDS.fields],
  [
    'parameters',
    K + many(200, (k) => `g_${k} phi^3`, '-'),
    K + many(201, (k) => `g_${k} phi^3`, '-'),
    BOUNDS.parameters,
  ],
  [
    'nesting',
    `${K}${'('.repeat(63)}phi^3${')'.repeat(63)}`,
    `${K}${'('.repeat(65)}phi^3${')'.repeat(65)}`,
    BOUNDS.nesting,
  ],
  ['length', `${K}phi^3${' '.repeat(9_900)}`, `${K}phi^3${' '.repeat(10_000)}`, BOUNDS.lagrangianLength],
  ['parameter power', `${K}(g^20)^5 phi^3`, `${K}(g^20)^5 g phi^3`, BOUNDS.parameterPower],
];

describe('bounds', () => {
  it.each(EDGES)('%s', (_, inside, outside, bound) => {
    expect(modelOf(inside).fields.length).toBeGreaterThan(0);
    const error = refusal(() => modelOf(outside));
    expect(error).toBeInstanceOf(LimitError);
    expect(error.message).toContain(String(bound));
    expect((error as LimitError).limit).toBe(bound);
    expect((error as LimitError).place).not.toBeNull();
  });
});

describe('work is counted before it is done', () => {
  const source = new Source('');
  const span = { start: 0, end: 0 };
  const sum = (n: number) => Array.from({ length: n }, (_, k) => parameterMonomial(`x_${k}`));

  it('a product with more terms than the bound is refused without a single product', () => {
    const arithmetic = new Arithmetic(source);
    arithmetic.charge(BOUNDS.steps - 1, span);
    expect(() => arithmetic.multiply(sum(100), sum(100), span)).toThrow(/10000 terms/);
  });

  it('the budget of a text is finite, whatever it is spent on', () => {
    const arithmetic = new Arithmetic(source);
    let products = 0;
    const spend = (): void => {
      for (;;) {
        arithmetic.multiply(sum(10), sum(10), span);
        products += 100;
      }
    };
    expect(spend).toThrow(LimitError);
    expect(products).toBeLessThanOrEqual(BOUNDS.steps);
    expect(products).toBeGreaterThan(1_000);
  });

  it('a power of a sum is counted by its number of monomials', () => {
    expect(() => modelOf(`${K}(a + b + c + e)^20 phi^3`)).toThrow(/more than 1000 terms/);
  });
});

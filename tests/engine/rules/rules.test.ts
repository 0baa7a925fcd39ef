import { describe, expect, it } from 'vitest';
import { factorial } from '#engine/exact/combinatorics.ts';
import type { Signature, Term, VertexKind } from '#engine/lagrangian/model.ts';
import { readModel } from '#engine/lagrangian/read.ts';
import { conventionRecord } from '#engine/rules/conventions.ts';
import { vertexFactor } from '#engine/rules/factor.ts';
import { assignments, monomialText } from '#engine/rules/momenta.ts';
import { modelRules } from '#engine/rules/rules.ts';

const kindOf = (lagrangian: string): VertexKind => readModel({ lagrangian }).kinds[0]!;

function permutations(items: readonly number[]): number[][] {
  if (items.length < 2) return [[...items]];
  return items.flatMap((item, at) => permutations(items.filter((_, i) => i !== at)).map((rest) => [item, ...rest]));
}

/** The permutation sum written out: every assignment of identical fields' momenta, one by one. */
function writtenOut(term: Term): Map<string, bigint> {
  const name = (at: number): string => `${term.factors[at]!.field} ${term.factors[at]!.conjugate}`;
  const groups = new Map<string, number[]>();
  term.factors.forEach((_, at) => {
    groups.set(name(at), [...(groups.get(name(at)) ?? []), at]);
  });
  let images: Map<number, number>[] = [new Map()];
  for (const group of groups.values())
    images = images.flatMap((image) =>
      permutations(group).map(
        (order) => new Map([...image, ...group.map((at, i): [number, number] => [at, order[i]! + 1])]),
      ),
    );
  const counts = new Map<string, bigint>();
  for (const image of images) {
    const pairs = term.derivatives
      .map(([i, j]) => [image.get(i)!, image.get(j)!].sort((a, b) => a - b) as [number, number])
      .sort((a, b) => a[0] - b[0] || a[1] - b[1]);
    counts.set(monomialText(pairs), (counts.get(monomialText(pairs)) ?? 0n) + 1n);
  }
  return counts;
}

const derivative = [
  'b phi (d phi)^2',
  'b phi^2 (d phi)^2',
  'c ((d phi)^2)^2',
  'c phi^2 ((d phi)^2)^2',
  'b phi^2 d^2 phi',
  'b phi d_mu phi d^2 d^mu phi',
  'a phi d_mu d_nu phi d^mu phi d^nu phi',
  'a h d_mu h d^mu phi phi',
  'a h^2 (d phi)^2 phi^2',
  'a (d h)^2 (d phi)^2',
  'a (d_mu h d^mu phi)^2',
  'a d_mu d_nu phi d^mu d^nu phi phi',
];

describe('permutation sums', () => {
  it.each(derivative)('%s, against every assignment', (text) => {
    const kind = kindOf(`1/2 (d phi)^2 + 1/2 (d h)^2 + ${text}`);
    for (const term of kind.terms) {
      const { monomials, total } = assignments(term, kind.fields);
      const ours = new Map(monomials.map(({ monomial, count }) => [monomialText(monomial), count]));
      expect(ours).toEqual(writtenOut(term));
      expect(monomials.reduce((sum, { count }) => sum + count, 0n)).toBe(total);
    }
  });
  it('does not write out ten thousand products', () => {
    const [rule] = modelRules(readModel({ lagrangian: '1/2 (d phi)^2 - c/12! (d phi)^12' })).vertices;
    expect(rule!.factor).toMatch(/too long/);
    expect(rule!.latex).toContain('\\sum');
  });
});

describe('vertex factors are symmetric under exchange of identical fields', () => {
  it.each(derivative)('%s', (text) => {
    const kind = kindOf(`1/2 (d phi)^2 + 1/2 (d h)^2 + ${text}`);
    const { terms } = vertexFactor(kind, '+---');
    const written = (rename: (p: number) => number) =>
      terms
        .map(({ monomial, number }) => {
          const pairs = monomial
            .map(([i, j]) => [rename(i), rename(j)].sort((a, b) => a - b) as [number, number])
            .sort((a, b) => a[0] - b[0] || a[1] - b[1]);
          return `${monomialText(pairs)} ${number.parts.map(({ re, im }) => `${re.num}/${re.den} ${im.num}/${im.den}`)}`;
        })
        .sort();
    kind.fields.forEach((field, at) => {
      const next = kind.fields[at + 1];
      if (!next || next.field !== field.field || next.conjugate !== field.conjugate) return;
      const exchange = (p: number): number => (p === at + 1 ? at + 2 : p === at + 2 ? at + 1 : p);
      expect(written(exchange)).toEqual(written((p) => p));
    });
  });
});

/** Common practice: i × the derivative of L; minus that of L_E. */
describe('the three conventions', () => {
  const typed: Record<Signature, string> = {
    '+---': '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4',
    '-+++': '-1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4',
    euclidean: '1/2 (d phi)^2 + 1/2 m^2 phi^2 + lambda/4! phi^4',
  };
  it.each([
    ['+---', 'I/(p^2 - m^2 + i0)', '-I*lambda'],
    ['-+++', '-I/(p^2 + m^2 - i0)', '-I*lambda'],
    ['euclidean', '1/(p^2 + m^2)', '-lambda'],
  ] as const)('%s', (signature, propagator, vertex) => {
    const conventions = { signature, dimension: '4' };
    const rules = modelRules(readModel({ lagrangian: typed[signature], conventions }));
    expect(rules.propagators[0]!.factor).toBe(propagator);
    expect(rules.vertices[0]!.factor).toBe(vertex);
    expect(conventionRecord(conventions)).toMatchObject(conventions);
  });
  it.each([
    ['+---', '1/2 (d phi)^2 + b/2 phi (d phi)^2', '-I*b*p1.p2 - I*b*p1.p3 - I*b*p2.p3'],
    ['-+++', '-1/2 (d phi)^2 + b/2 phi (d phi)^2', '-I*b*p1.p2 - I*b*p1.p3 - I*b*p2.p3'],
    ['euclidean', '1/2 (d phi)^2 + b/2 phi (d phi)^2', 'b*p1.p2 + b*p1.p3 + b*p2.p3'],
  ] as const)('derivative vertex in %s: each pair gives −p·p', (signature, lagrangian, factor) => {
    const model = readModel({ lagrangian, conventions: { signature, dimension: '4' } });
    expect(modelRules(model).vertices[0]!.factor).toBe(factor);
  });
  /**
   * Common practice: the propagator inverts the kinetic operator. The quadratic part seen as a vertex, K = i(Z p² − M²) in momentum
   * space, times the propagator i/(Z p² − M²) is i·i = −1: both denominators are the same polynomial.
   */
  it.each([
    ['1/2 (d phi)^2 - 1/2 m^2 phi^2', 'p^2 - m^2'],
    ['1/2 Z (d phi)^2 - 1/2 m^2 phi^2', 'Z p^2 - m^2'],
    ['1/2 (d phi)^2', 'p^2'],
    ['(d phi^*)(d phi) - M^2 phi^* phi', 'p^2 - M^2'],
    ['1/2 (d phi)^2 - 1/2 (m^2 + lambda v^2/2) phi^2', null],
  ])('%s', (lagrangian, denominator) => {
    const [rule] = modelRules(readModel({ lagrangian })).propagators;
    if (denominator) expect(rule!.factor).toBe(`I/(${denominator} + i0)`);
    else expect(rule!.factor).toMatch(/^I\/\(p\^2 - \(.*m\^2.*\) \+ i0\)$/);
    expect(rule!.terms.length).toBeGreaterThan(0);
  });
  it('say where each rule came from', () => {
    const lagrangian = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
    const { vertices, propagators } = modelRules(readModel({ lagrangian }));
    const place = vertices[0]!.terms[0]!;
    expect(lagrangian.slice(place.start!, place.end!)).toContain('lambda/4! phi^4');
    expect(propagators[0]!.terms.map(({ text }) => text)).toEqual(['1/2 (d phi)^2', '-1/2 m^2 phi^2']);
  });
  it('a plain vertex has no permutation lines and k! in its factor', () => {
    const kind = kindOf('1/2 (d phi)^2 - g phi^6');
    expect(modelRules(readModel({ lagrangian: '1/2 (d phi)^2 - g phi^6' })).vertices[0]).toMatchObject({
      factor: `-${factorial(6)}*I*g`,
      permutations: [],
    });
    expect(kind.fields).toHaveLength(6);
  });
});

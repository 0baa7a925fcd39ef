import { describe, expect, it } from 'vitest';
import { couplingDimensions } from '#engine/lagrangian/massDimension.ts';
import { readModel } from '#engine/lagrangian/read.ts';
import { modelRules } from '#engine/rules/rules.ts';
import reference from '../../reference/feynman_rules.json' with { type: 'json' };

/** What tests/reference/feynman_rules.json lists (each entry names its source), typed as a whole Lagrangian. */
const kinetic = (...fields: string[]): string => fields.map((field) => `1/2 (d ${field})^2`).join(' + ');

function published(model: string, vertex: string): string {
  const entry = reference.models.find((one) => one.model === model)!;
  return (entry.vertices as unknown as Record<string, string>)[vertex]!;
}

const typed: [string, string, string, string][] = [
  ['phi^3', 'phi phi phi', `${kinetic('phi')} - g/3! phi^3`, 'phi phi phi'],
  ['phi^4', 'phi^4', `${kinetic('phi')} - lambda/4! phi^4`, 'phi phi phi phi'],
  ['phi^5, phi^6', 'phi^5', `${kinetic('phi')} - g/5! phi^5 - lambda/6! phi^6`, 'phi phi phi phi phi'],
  ['phi^5, phi^6', 'phi^6', `${kinetic('phi')} - g/5! phi^5 - lambda/6! phi^6`, 'phi phi phi phi phi phi'],
  ['O(N), 4! normalisation', '1111', `${kinetic('a', 'b')} - lambda/4! (a^2 + b^2)^2`, 'a a a a'],
  ['O(N), 4! normalisation', '1122', `${kinetic('a', 'b')} - lambda/4! (a^2 + b^2)^2`, 'a a b b'],
  ['broken O(N), phi=(pi, v+sigma)', 'sigma^3', `${kinetic('s', 'q')} - lambda/4 (q^2 + 2 v s + s^2)^2`, 's s s'],
  ['broken O(N), phi=(pi, v+sigma)', 'sigma^4', `${kinetic('s', 'q')} - lambda/4 (q^2 + 2 v s + s^2)^2`, 's s s s'],
  ['broken Z2', 'h^3', `${kinetic('h')} - lambda/4! (h^4 + 4 v h^3)`, 'h h h'],
  ['portal h-s', 'hhss', `${kinetic('h', 's')} - lambda/4 h^2 s^2 - kappa/2 h s^2`, 'h h s s'],
  ['portal h-s', 'hss', `${kinetic('h', 's')} - lambda/4 h^2 s^2 - kappa/2 h s^2`, 'h s s'],
  ['portal h-s', 'hhss for -(lambda/2)h^2 s^2', `${kinetic('h', 's')} - lambda/2 h^2 s^2`, 'h h s s'],
  ['portal h-s', 'hss for -kappa h s^2', `${kinetic('h', 's')} - kappa h s^2`, 'h s s'],
  ['chi^2 phi', 'chi chi phi', `${kinetic('chi', 'phi')} - g/2 chi^2 phi`, 'chi chi phi'],
  ['three distinct real fields', 'ABC', `${kinetic('A', 'B', 'C')} - g A B C`, 'A B C'],
  ['derivative cubic', 'phi^3', `${kinetic('phi')} + b/2 phi (d phi)^2`, 'phi phi phi'],
  ['(d phi)^4', 'phi^4', `${kinetic('phi')} + c/4 ((d phi)^2)^2`, 'phi phi phi phi'],
  [
    'O(N) non-linear sigma, quartic order',
    'component 1111',
    `${kinetic('a', 'b')} + 1/(2 f^2) (a d_mu a + b d_mu b)(a d^mu a + b d^mu b)`,
    'a a a a',
  ],
  [
    'O(N) non-linear sigma, quartic order',
    'component 1122',
    `${kinetic('a', 'b')} + 1/(2 f^2) (a d_mu a + b d_mu b)(a d^mu a + b d^mu b)`,
    'a a b b',
  ],
  ['two-field derivative', 'h(p1) h(p2) s(p3) s(p4)', `${kinetic('h', 's')} + a/2 h^2 (d s)^2`, 'h h s s'],
];

describe('published vertex factors', () => {
  it.each(typed)('%s, %s', (model, vertex, lagrangian, fields) => {
    const { vertices } = modelRules(readModel({ lagrangian }));
    const rule = vertices.find((one) => one.fields.join(' ') === fields)!;
    expect(rule.factor).toBe(published(model, vertex));
  });
  it('counterterms: i(p² δZ − δm) and −i δλ', () => {
    const lagrangian = `${kinetic('phi')} - 1/2 m^2 phi^2 + 1/2 dZ (d phi)^2 - 1/2 dm phi^2 - dl/4! phi^4`;
    const once = { loops: 1, vertex: true };
    const { vertices } = modelRules(readModel({ lagrangian, parameters: { dZ: once, dm: once, dl: { loops: 1 } } }));
    // With p2 = −p1 the first is i p² δZ.
    expect(vertices.map(({ coupling, factor }) => [coupling, factor])).toEqual([
      ['dZ', '-I*dZ*p1.p2'],
      ['dm', '-I*dm'],
      ['dl', '-I*dl'],
    ]);
  });
  it('a field redefinition gives the derivative and the mass part of the reference', () => {
    const { vertices } = modelRules(
      readModel({ lagrangian: `${kinetic('phi')} - 1/2 m2 phi^2 + 3 c phi^2 (d phi)^2 - c m2 phi^4` }),
    );
    const sum = reference.field_redefinition_check.vertex.replace('-24*I*c*m2 - ', '-');
    expect(vertices.map(({ factor }) => factor)).toEqual([sum, '-24*I*c*m2']);
  });
});

describe('mass dimensions', () => {
  const table = reference.mass_dimensions.table_no_derivatives as unknown as Record<string, Record<string, string>>;
  it.each(Object.entries(table).filter(([term]) => term !== 'phi^2'))('%s', (term, byDimension) => {
    for (const [d, expected] of Object.entries(byDimension)) {
      const dimension = d.replace('d=', '');
      const model = readModel({
        lagrangian: `${kinetic('phi')} - g ${term}`,
        conventions: { signature: '+---', dimension },
      });
      expect([d, couplingDimensions(model)[0]!.dimension]).toEqual([d, expected]);
    }
  });
  it.each([
    ['a/2 phi^2 (d phi)^2', '4', '-2'],
    ['a ((d phi)^2)^2', '4', '-4'],
    ['a phi (d phi)^2', '4', '-1'],
    ['a phi^2 (d phi)^2', '2', '0'],
  ])('%s in d = %s', (term, dimension, expected) => {
    const model = readModel({
      lagrangian: `${kinetic('phi')} + ${term}`,
      conventions: { signature: '+---', dimension },
    });
    expect(couplingDimensions(model)[0]!.dimension).toBe(expected);
  });
});

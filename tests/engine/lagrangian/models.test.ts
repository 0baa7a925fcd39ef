import { describe, expect, it } from 'vitest';
import { kindLines, modelOf, propagatorLines } from './plain.ts';

/** Text → propagators and kinds. Expected values are read off the text by hand. */
const TABLE: readonly (readonly [text: string, propagators: readonly string[], kinds: readonly string[]])[] = [
  ['1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4', ['phi: Z = 1, M^2 = 1 m:2'], ['lambda: phi phi phi phi: -1/24']],
  ['1/2 (d phi)^2', ['phi: Z = 1, M^2 = 0'], []],
  ['-1/2 phi (d^2 + m^2) phi', ['phi: Z = 1, M^2 = 1 m:2'], []],
  ['3/2 (d phi)^2 - 2 phi^2', ['phi: Z = 3, M^2 = 4'], []],
  ['1/2 Z (d phi)^2', ['phi: Z = 1 Z:1, M^2 = 0'], []],
  [
    '(d phi^*)(d phi) - m^2 phi^* phi - lambda/4 (phi^* phi)^2',
    ['phi: Z = 1, M^2 = 1 m:2'],
    ['lambda: phi phi phi^* phi^*: -1/4'],
  ],
  [
    '1/2 (d h)^2 - 1/2 M^2 h^2 - lambda v^2/2 h^2 - lambda v h^3 - lambda/4 h^4',
    ['h: Z = 1, M^2 = 1 M:2 + 1 lambda:1 v:2'],
    ['lambda*v: h h h: -1', 'lambda: h h h h: -1/4'],
  ],
  [
    '1/2 (d phi)^2 - c/2 phi^2 (d phi)^2 - b phi^2 d^2 phi',
    ['phi: Z = 1, M^2 = 0'],
    ['b: phi phi phi: -1[3,3]', 'c: phi phi phi phi: -1/2[3,4]'],
  ],
  ['1/2 (d phi)^2 - b phi d^2 phi', ['phi: Z = 1 + 2 b:1, M^2 = 0'], []],
  ['1/2 (d phi)^2 - g/2 d_mu phi d_nu phi d^mu d^nu phi', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -1/2[1,3][2,3]']],
  ['1/2 (d phi)^2 - phi^4/f^2', ['phi: Z = 1, M^2 = 0'], ['f^-2: phi phi phi phi: -1']],
  ['1/2 (d phi)^2 - sqrt(2 lambda) m phi^3', ['phi: Z = 1, M^2 = 0'], ['lambda^(1/2)*m: phi phi phi: -sqrt(2)']],
  ['1/2 (d phi)^2 - lambda/(16 pi^2) phi^4', ['phi: Z = 1, M^2 = 0'], ['lambda: phi phi phi phi: -1/16*pi^-2']],
  ['1/2 (d phi)^2 - 0.125 g phi^4', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi phi: -1/8']],
  ['1/2 (d phi)^2 - 1.5e-2 g phi^3', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -3/200']],
  ['(d phi^*)(d phi) - i g phi^3 + h.c.', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -I', 'g: phi^* phi^* phi^*: I']],
  [
    '(d phi^*)(d phi) - y phi^3 - conj(y) conj(phi)^3',
    ['phi: Z = 1, M^2 = 0'],
    ['y: phi phi phi: -1', 'conj(y): phi^* phi^* phi^*: -1'],
  ],
  [
    '1/2 (d h)^2 + 1/2 (d s)^2 - mu h s - a (h^2 + s^2)^2',
    ['h: Z = 1, M^2 = 0', 's: Z = 1, M^2 = 0'],
    ['mu: h s: -1', 'a: h h h h: -1', 'a: h h s s: -2', 'a: s s s s: -1'],
  ],
  ['1/2 (d phi)^2 - J phi', ['phi: Z = 1, M^2 = 0'], ['J: phi: -1']],
  ['1/2 (d phi)^2 - (a + b) phi^3', ['phi: Z = 1, M^2 = 0'], ['a: phi phi phi: -1', 'b: phi phi phi: -1']],
  ['1/2 (d phi)^2 - g phi^3 + 1/3 g phi^3', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -2/3']],
  ['1/2 (d phi)^2 - 5!!/3! g phi^3', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -5/2']],
  ['1/2 (d phi)^2 - 2^3^2 g phi^3', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: -512']],
  ['1/2 (d phi)^2 - g/(1+sqrt(2)) phi^3', ['phi: Z = 1, M^2 = 0'], ['g: phi phi phi: 1 - sqrt(2)']],
];

describe('a Lagrangian in normal form', () => {
  it.each(TABLE)('%s', (text, propagators, kinds) => {
    const model = modelOf(text);
    expect(propagatorLines(model)).toEqual(propagators);
    expect(kindLines(model)).toEqual(kinds);
  });
});

describe('what the order of terms and factors does not change', () => {
  it.each([
    ['1/2 (d h)^2 + 1/2 (d s)^2 - g h s^2 - k h^4', '-k h^4 - s g s h + 1/2 (d s)^2 + 1/2 (d h)^2'],
    ['1/2 (d h)^2 - c h (d h)^2 d^2 h', '-c d^2 h (d h)(d h) h + 1/2 (d h)^2'],
    ['1/2 (d h)^2 - c d_mu h d_nu h d^mu d^nu h', '-c d_nu d_rho h d^rho h d^nu h + 1/2 d_mu h d^mu h'],
  ])('%s', (one, other) => {
    expect(kindLines(modelOf(other))).toEqual(kindLines(modelOf(one)));
  });
});

describe('tables overrule what was inferred', () => {
  const text = '1/2 (d phi)^2 - 1/2 m^2 phi^2 + 1/2 dZ (d phi)^2 - 1/2 dm phi^2 - lambda/4! phi^4';

  it('a quadratic term with a loop order is a two-point vertex', () => {
    const model = modelOf(text, { parameters: { dZ: { loops: 1 }, dm: { loops: 1, weight: 2 } } });
    expect(propagatorLines(model)).toEqual(['phi: Z = 1, M^2 = 1 m:2']);
    expect(kindLines(model)).toEqual(['dZ: phi phi: 1/2[1,2]', 'dm: phi phi: -1/2', 'lambda: phi phi phi phi: -1/24']);
    expect(model.kinds.map(({ loops }) => loops)).toEqual([1, 1, 0]);
  });

  it('and so is one marked as a vertex', () => {
    const model = modelOf('1/2 (d phi)^2 - 1/2 dm phi^2', { parameters: { dm: { vertex: true } } });
    expect(kindLines(model)).toEqual(['dm: phi phi: -1/2']);
  });

  it('without either it belongs to the propagator', () => {
    expect(propagatorLines(modelOf(text))).toEqual(['phi: Z = 1 + 1 dZ:1, M^2 = 1 m:2 + 1 dm:1']);
  });

  it('a field declared complex keeps its kinetic term only as a product with its conjugate', () => {
    const model = modelOf('(d phi^*)(d phi) - g (phi + phi^*)^3', { fields: { φ: { kind: 'complex' } } });
    expect(model.fields).toEqual([{ name: 'phi', latex: '\\phi', kind: 'complex' }]);
    expect(model.kinds).toHaveLength(4);
  });

  it('a parameter declared complex needs the conjugate term', () => {
    expect(() => modelOf('1/2 (d phi)^2 - g phi^3', { parameters: { g: { kind: 'complex' } } })).toThrow(/hermitian/);
  });

  it('roles of parameters: coupling, propagator, both', () => {
    const model = modelOf('1/2 (d h)^2 - 1/2 m^2 h^2 - lambda v^2/2 h^2 - lambda v h^3 - g h^4');
    expect(model.parameters.map(({ name, role }) => `${name} ${role}`)).toEqual([
      'g coupling',
      'lambda both',
      'm propagator',
      'v both',
    ]);
  });
});

describe('other conventions', () => {
  it.each([
    ['-+++' as const, '-1/2 (d phi)^2 - 1/2 m^2 phi^2 - g phi^3'],
    ['euclidean' as const, '1/2 (d phi)^2 + 1/2 m^2 phi^2 + g phi^3'],
  ])('%s: the healthy signs give Z = 1 and M² = m²', (signature, text) => {
    const model = modelOf(text, { conventions: { signature, dimension: '4' } });
    expect(propagatorLines(model)).toEqual(['phi: Z = 1, M^2 = 1 m:2']);
  });
});

describe('notes on how a text was read', () => {
  it.each([
    ['1/2 (d phi)^2 - 1/2f^2 phi^4', 'division'],
    ['1/2 (d phi)^2 - lambdaphi phi^4', 'one-name'],
    ['1/2 (d phi)^2 - g1 phi^3 - g_1 phi^4', 'similar-names'],
    ['1/2 (d phi_a)^2 - g phi_a^4', 'index-like'],
    ['1/2 (d h)^2 + 1/2 (d s)^2 - mu h s', 'mixing'],
    ['1/2 (d phi)^2 - V_0', 'constant'],
    ['1/2 (d phi)^2 - g phi^3 + g phi^3', 'cancelled'],
    ['1/2 (d phi)^2 + k d^2 phi', 'total-derivative'],
    ['(d phi^*)(d phi) - y phi^3 - conj(y) conj(phi)^3', 'complex-parameter'],
    ['1/2 (d phi)^2 - m^2 phi*phi', 'star'],
    ['1/2 (d phi)^2 - V(phi)', 'call'],
    ['1/2 (d phi(x))^2 - g phi^3', 'call'],
    ['1/2 (d phi)^2 - g phi(x)^3', 'call'],
    ['1/2 (d phi)^2 - 1/2 \\delta m^2 phi^2', 'delta'],
    ['1/2 (d phi)^2 - lamda/4! phi^4', 'spelling'],
    ['1/2 (d phi)^2 + 1/2 (d h)^2 - m^2 phi* h', 'star'],
  ])('%s: %s', (text, code) => {
    expect(modelOf(text).notes.map((note) => note.code)).toContain(code);
  });

  it('a plain text has none', () => {
    expect(modelOf('1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4').notes).toEqual([]);
  });

  it('the span of a note is where it stands', () => {
    const text = '1/2 (d phi)^2 - 1/2f^2 phi^4';
    const [note] = modelOf(text).notes;
    expect(text.slice(note!.span!.start, note!.span!.end)).toBe('1/2f^2');
  });
});

import { describe, expect, it } from 'vitest';
import { InputError } from '#engine/errors.ts';
import type { ModelSource } from '#engine/lagrangian/input.ts';
import { previewModel, readModel } from '#engine/lagrangian/read.ts';
import { modelOf, refusal } from './plain.ts';

const K = '1/2 (d phi)^2 ';
const C = '(d phi^*)(d phi) ';

/** Text, code, the piece of the text that is marked, and what the sentence must say. */
const TABLE: readonly (readonly [text: string, code: string, marked: string, sentence: RegExp])[] = [
  ['', 'syntax', '', /empty/],
  [`${K}- g phi^4)`, 'syntax', ')', /no partner/],
  [`${K}- (g phi^4`, 'syntax', '(', /not closed: \) is missing/],
  [`${K}- {g phi^4`, 'syntax', '{', /not closed: } is missing/],
  [`${K}- g [phi)^4`, 'syntax', ')', /Expected ] or the next term, found "\)"/],
  [`${K}- |phi`, 'syntax', '|', /bar is not closed/],
  [`${K}- g () phi`, 'syntax', '()', /empty/],
  [`${K}- g phi^`, 'syntax', '', /number as the power/],
  [`${K}- g phi^{}`, 'syntax', '}', /Expected/],
  [`${K}- 2 3 phi^4`, 'syntax', '2 3', /write \* between/],
  [`${K}- 0,5 phi^4`, 'syntax', ',', /decimals are written with a point/],
  [`${K}- g/ phi^4 +`, 'syntax', '', /Expected a field, a parameter or a number, found the end/],
  [`${K}- g**`, 'syntax', '', /power/],
  [`${K}- g phi^*2 phi`, 'syntax', 'phi^*2', /\(phi\^\*\)\^2/],
  [`${K}- 3!!! phi^4`, 'syntax', '!!!', /Only n! and n!!/],
  [`${K}- (1/2)! phi^4`, 'syntax', '(1/2)!', /whole numbers from 0/],
  [`${K}- g/0 phi^4`, 'syntax', '0', /Division by zero/],
  [`${K}- 0^-1 phi^4`, 'syntax', '0^-1', /negative power of zero/],
  [`${K}- g = phi`, 'syntax', '=', /equals sign/],
  [`phi = ${K}`, 'syntax', 'phi =', /write "L = …"/],
  [`${K}- g phi^3 d`, 'syntax', 'd', /no field follows/],
  [`${K}- (a+b+c+d) phi^3`, 'syntax', 'd', /needs another name/],
  [`${K}- g phi^3 d phi`, 'syntax', '- g phi^3 d phi', /without a partner/],
  [`${K}- g phi^3 d_mu phi`, 'syntax', '- g phi^3 d_mu phi', /index mu stands only once/],
  [`${K}- d_mu phi d^mu phi d_mu phi`, 'syntax', 'd_mu phi d^mu phi d_mu phi', /more than twice/],
  [`${K}- g d phi^2 d phi`, 'syntax', 'd phi^', /not clear whether the power/],
  [`${K}- g phi^3 d^2`, 'syntax', '- g phi^3 d^2', /no field on its right/],
  ['1/2 (d pi)^2', 'syntax', 'pi', /number π/],
  ['½(∇φ)²', 'syntax', '∇', /∇ is not read/],
  [`${K}- \\dot\\phi^2`, 'unsupported', '\\dot', /write a derivative as/],
  [`${K}- g' phi^4`, 'syntax', "'", /prime/],
  [`${K}- g ± phi^4`, 'syntax', '±', /must be \+ or −/],
  [`${K}- g\u0000 phi^4`, 'syntax', '\u0000', /U\+0000/],
  [`${K}- \\lamda phi^4`, 'syntax', '\\lamda', /\\lambda is/],
  [`${K}- \\foo phi^4`, 'syntax', '\\foo', /\\foo is not known/],
  [`${K}- \\frac{1}{} phi^4`, 'syntax', '{}', /empty/],
  [`${K}- \\frac{1}`, 'syntax', '', /the denominator/],
  [`${C}- g phi^3 - h.c.`, 'syntax', '- h.c.', /write "\+ h.c."/],
  [`${K}- g phi^4 + h.c.`, 'syntax', '+ h.c.', /hermitian already/],
  [`${K}- g \\sin(phi)`, 'unsupported', '\\sin', /not polynomial/],
  [`${K}- g cos(phi)`, 'unsupported', 'cos', /not polynomial/],
  [`${K}- g phi^-2`, 'unsupported', 'phi^-2', /polynomial in the fields/],
  [`${K}- g phi^(3/2)`, 'unsupported', 'phi^(3/2)', /A root of a field/],
  [`${K}- g/phi`, 'unsupported', 'phi', /inverse of a field/],
  [`${K}- g/(1+h) phi^4`, 'unsupported', '(1+h)', /of a sum/],
  [`${K}- 2^(1/3) phi^4`, 'unsupported', '2^(1/3)', /no exact form/],
  [`${C}- g |phi|^3`, 'unsupported', '|phi|^3', /even powers of a modulus/],
  [`${K}- e A_mu d^mu phi phi`, 'unsupported', 'A_mu', /gauge fields/],
  [`${K}- a (d^2 phi)^2`, 'unsupported', '- a (d^2 phi)^2', /more than two derivatives/],
  [`${K}- total phi^4`, 'unsupported', 'total', /cannot name a parameter/],
  [`${K}- \\vec{S}^2`, 'unsupported', '\\vec', /multiplet/],
  [`${K}- phi^a phi^a`, 'unsupported', 'phi^a', /components of a multiplet/],
  [`${K}- i g phi^3`, 'not-hermitian', '- i g phi^3', /without its conjugate/],
  [`${C}- g phi^3`, 'not-hermitian', '- g phi^3', /"\+ h\.c\."/],
  ['-1/2 (d phi)^2 - g phi^4', 'wrong-sign', '-1/2 (d phi)^2', /fits the \(−,\+,\+,\+\) convention/],
  ['1/2 m^2 phi^2 + lambda phi^4', 'no-kinetic-term', 'phi', /add "1\/2 \(d phi\)\^2"/],
  ['1/2 (dphi)^2 - 1/2 phi^2', 'no-kinetic-term', 'dphi', /written "d phi"/],
];

describe('errors: code, marked span and sentence', () => {
  it.each(TABLE)('%j', (text, code, marked, sentence) => {
    const error = refusal(() => modelOf(text)) as InputError;
    expect(error).toBeInstanceOf(InputError);
    expect(error.code).toBe(code);
    expect(error.message).toMatch(sentence);
    const { line, column, length } = error.place!;
    expect(line).toBe(1);
    if (marked === '') expect(column).toBe(text.length + 1);
    else expect(text.slice(column - 1, column - 1 + length)).toBe(marked);
  });
});

describe('lines and columns', () => {
  it.each([
    ['1/2 (d phi)^2\n  - g phi^4)', 2, 12],
    ['1/2 (d phi)^2\n\n% a comment (\n- g phi^^4', 4, 9],
    ['½(∂φ)²\r\n − λφ⁴ @', 2, 8],
    ['\\begin{align}\n&\\frac12(\\partial\\phi)^2\\\\\n&- \\foo\\phi^4\n\\end{align}', 3, 4],
  ])('%j', (text, line, column) => {
    const error = refusal(() => modelOf(text)) as InputError;
    expect(error.place).toMatchObject({ line, column });
  });
});

describe('what was probably meant', () => {
  it.each([
    [`${K}- \\lamda phi^4`, '\\lambda'],
    [`${K}- \\fraq{1}{2} phi^4`, '\\frac'],
    [`${K}- \\parital phi`, '\\partial'],
    [`${C}- g phi^3 h.c.`, '+ h.c.'],
    ['1/2 (dphi)^2 - 1/2 phi^2', 'd phi'],
    [`${C}- phi *`, '^*'],
  ])('%j', (text, meant) => {
    expect((refusal(() => modelOf(text)) as InputError).suggestion).toBe(meant);
  });
});

describe('tables, conventions and structured models', () => {
  const kinetic = { coefficient: '1/2', fields: ['phi', 'phi'], derivatives: [[1, 2]] as const };
  const cases: readonly (readonly [string, ModelSource, string, RegExp])[] = [
    ['unknown field', { lagrangian: K, fields: { chi: {} } }, 'unknown-name', /"chi", which does not stand/],
    ['unknown parameter', { lagrangian: K, parameters: { g: {} } }, 'unknown-name', /"g", which does not stand/],
    ['no name', { lagrangian: K, parameters: { 'g+h': {} } }, 'unknown-name', /which is not a name/],
    ['both tables', { lagrangian: K, parameters: { phi: {} }, fields: { phi: {} } }, 'bad-request', /both tables/],
    ['multiplet', { lagrangian: K, fields: { phi: { multiplet: 'N' } } }, 'unsupported', /multiplet/],
    ['weight', { lagrangian: `${K}- g phi^3`, parameters: { g: { weight: '0.5' } } }, 'bad-request', /exact number/],
    ['loops', { lagrangian: `${K}- g phi^3`, parameters: { g: { loops: 21 } } }, 'bad-request', /0 to 20/],
    ['dimension', { lagrangian: K, conventions: { signature: '+---', dimension: 'x' } }, 'bad-request', /"4-2eps"/],
    ['no terms', { model: { terms: [] } }, 'syntax', /no terms/],
    ['position', { model: { terms: [{ ...kinetic, derivatives: [[1, 3]] }] } }, 'bad-request', /positions from 1 to 2/],
    [
      'coefficient',
      { model: { terms: [kinetic, { coefficient: '(g', fields: ['phi'] }] } },
      'syntax',
      /In the coefficient of term 2: This bracket is not closed/,
    ],
    [
      'field in a coefficient',
      { model: { terms: [kinetic, { coefficient: 'phi', fields: ['phi'] }] } },
      'bad-request',
      /list it in "fields"/,
    ],
  ];
  it.each(cases)('%s', (_, source, code, sentence) => {
    const error = refusal(() => readModel(source)) as InputError;
    expect(error.code).toBe(code);
    expect(error.message).toMatch(sentence);
  });
});

describe('preview of a broken text', () => {
  it('typesets the good part', () => {
    const { good, error, model } = previewModel({ lagrangian: `${K}- lambda/4! phi^4 + (` });
    expect(good).toBe(String.raw`\frac{1}{2}\,\left(\partial\phi\right)^{2} - \frac{\lambda}{4!}\,\phi^{4}`);
    expect(error?.code).toBe('syntax');
    expect(model).toBeNull();
  });
});

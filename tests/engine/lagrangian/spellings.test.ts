import { describe, expect, it } from 'vitest';
import { readOperator } from '#engine/lagrangian/readOperator.ts';
import { modelOf, plainModel } from './plain.ts';

const REAL = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
const COMPLEX = '(d phi^*)(d phi) - m^2 phi^* phi - lambda/4 (phi^* phi)^2';
const DERIVATIVE = '1/2 (d phi)^2 - c/2 phi^2 (d phi)^2 - b phi^2 d^2 phi';
const TWO = '1/2 (d phi_1)^2 + 1/2 (d phi_2)^2 - lambda/4 (phi_1^2 + phi_2^2)^2';
const ROOT = '1/2 (d phi)^2 - sqrt(2)/3 g phi^3 - pi^2 k phi^4';

const SAME: readonly (readonly [string, readonly string[]])[] = [
  [
    REAL,
    [
      String.raw`\frac{1}{2}\partial_\mu\phi\,\partial^\mu\phi - \frac{m^2}{2}\phi^2 - \frac{\lambda}{4!}\phi^4`,
      String.raw`\frac12(\partial\phi)^2-\frac12 m^2\phi^2-\frac\lambda{4!}\phi^4`,
      String.raw`\tfrac{1}{2}\left(\partial_{\mu}\phi\right)\left(\partial^{\mu}\phi\right) - \dfrac{1}{2} m^{2} \phi^{2} - {\lambda \over 4!} \phi^{4}`,
      String.raw`$$\mathcal{L} = \frac12 \partial_\mu \varphi \partial^\mu \varphi - \frac12 m^2 \varphi^2 - \frac{\lambda}{24} \varphi^4.$$`,
      '\\begin{align}\n\\mathcal{L}_{\\rm full} &= \\frac{1}{2}(\\partial_\\mu\\phi)^2 - \\frac{1}{2}m^2\\phi^2 \\\\\n &\\quad - \\frac{\\lambda}{4!}\\phi^4 \\,. % the interaction\n\\end{align}',
      String.raw`\begin{equation}\label{eq:L} L = \frac{1}{2}(\partial\phi)^2 - \frac{1}{2} m^2\phi^2 - \frac{\lambda}{4!}\phi^4 \end{equation}`,
      '½(∂φ)² − ½m²φ² − λ/4! φ⁴',
      '½ ∂_μφ ∂^μφ − ½ m²φ² − (λ/4!)φ⁴',
      '½·∂φ·∂φ − m²·φ²÷2 − λ·φ⁴/4!',
      '𝟏/2 (∂𝜙)^2 - 1/2 𝑚^2 𝜙^2 - 𝜆/4! 𝜙^4',
      '𝟎.𝟓 (∂𝜙)^2 - 𝟎.𝟓 𝑚^𝟐 𝜙^2 - 𝜆/𝟐𝟒 𝜙^4',
      String.raw`\mathcal{L}(\phi,\partial\phi) = \nicefrac{1}{2}(\partial\phi)^2 \\[4pt] - \frac12 m^2\phi^2 - \frac{\lambda}{4!}\phi^4`,
      String.raw`\mathcal{L}_\text{full} := -\frac12\phi(\partial_\mu\partial^\mu + m^2)\phi - \frac{\lambda}{4!}\phi^4`,
      '0.5*(d phi)**2 - 0.5*m**2*phi**2 - lambda*phi**4/24',
      '1/2 d_mu phi d^mu phi - 1/2 m^2 phi^2 - lambda phi^4/4!',
      '1/2 (partial phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4',
      '-1/2 phi (d^2 + m^2) phi - lambda/4! phi^4',
      '−½ φ(□ + m²)φ − λ/4! φ⁴',
      String.raw`-\frac{1}{2}\phi(\Box + m^2)\phi - \frac{\lambda}{4!}\phi^4`,
      'L = 1/2 (d phi)^2 % kinetic\n  - 1/2 m^2 phi^2 % mass\n  - lambda/4! phi^4',
      '1/2 [ (d phi)^2 - { m^2 phi^2 } ] - lambda/(4*3*2*1) phi^4',
      '+ 1/2 (d phi)^2 + - 1/2 m^2 phi^2 - lambda/4! phi phi phi phi',
      '1/2 (d phi)^2 - 1/2 m^2 phi^2 - 1/4! lambda phi^{4}',
      '2^-1 (d phi)^2 - 2^{-1} m^2 phi^2 - λ (4!)⁻¹ φ⁴',
      '1/2 (d\u200b phi)^2 \u2212 1/2 m^2 phi^2 \u2013 lambda/4! phi^4',
    ],
  ],
  [
    COMPLEX,
    [
      '|d phi|^2 - m^2 |phi|^2 - lambda/4 |phi|^4',
      '|∂φ|² − m²|φ|² − λ/4 |φ|⁴',
      '∂_μφ^†∂^μφ - m^2 φ^†φ - λ/4 (φ^†φ)²',
      '∂φ† ∂φ - m² φ†φ - λ/4 (φ†φ)²',
      String.raw`(\partial_\mu\phi^\dagger)(\partial^\mu\phi) - m^2\phi^\dagger\phi - \frac\lambda4(\phi^\dagger\phi)^2`,
      String.raw`\partial_\mu\phi^*\partial^\mu\phi - m^2\phi^*\phi - \frac{\lambda}{4}(\phi^{*}\phi)^2`,
      String.raw`\left(\partial_\mu\phi\right)^*\left(\partial^\mu\phi\right) - m^2\left|\phi\right|^2 - \frac{\lambda}{4}\left|\phi\right|^4`,
      'd_mu conj(phi) d^mu phi - m^2 conj(phi) phi - lambda/4 (conj(phi) phi)^2',
      String.raw`\partial_\mu\bar\phi\,\partial^\mu\phi - m^2\bar\phi\phi - \frac{\lambda}{4}(\bar{\phi}\phi)^2`,
      '(d phi)^dagger (d phi) - m^2 phi^dagger phi - lambda/4 (phi^dag phi)^2',
      '(d phi^*)(d phi) - m^2 phi phi^* - lambda/4 phi^{*2} phi^2',
    ],
  ],
  [
    DERIVATIVE,
    [
      '½(∂φ)² − c/2 φ²(∂φ)² − b φ² □φ',
      '1/2 (d phi)^2 - c/2 phi^2 d_a phi d^a phi - b phi^2 d_mu d^mu phi',
      String.raw`\frac12\partial_\mu\phi\partial^\mu\phi - \frac c2 \phi^2\partial_\nu\phi\partial^\nu\phi - b\,\phi^2\partial^2\phi`,
      '1/2 (d phi)^2 - c/8 (d (phi^2))^2 - b phi^2 d_mu (d^mu phi)',
    ],
  ],
  [
    TWO,
    [
      '½(∂φ₁)² + ½(∂φ₂)² − λ/4 (φ₁² + φ₂²)²',
      String.raw`\frac12(\partial\phi_1)^2 + \frac12(\partial\phi_{2})^2 - \frac{\lambda}{4}(\phi_1^2+\phi_2^2)^2`,
      String.raw`\frac12(\partial\phi_1)^2 + \frac12(\partial\phi_2)^2 - \frac{\lambda}{4}(\phi^2_1+\phi^{2}_2)^2`,
      '1/2 (d φ_1)^2 + 1/2 (d φ_2)^2 - λ/4 φ_1^4 - λ/2 φ_1^2 φ_2^2 - λ/4 φ_2^4',
    ],
  ],
  [
    ROOT,
    [
      '½(∂φ)² − √2/3 g φ³ − π² k φ⁴',
      String.raw`\frac12(\partial\phi)^2 - \frac{\sqrt{2}}{3} g\phi^3 - \pi^2 k\phi^4`,
      '1/2 (d phi)^2 - 2^(1/2)/3 g phi^3 - pi^2 k phi^4',
      '1/2 (d phi)^2 - 2/(3 sqrt 2) g phi^3 - pi pi k phi^4',
    ],
  ],
];

describe('spellings of one Lagrangian are one model', () => {
  for (const [plain, others] of SAME)
    describe(plain, () => {
      it.each(others)('%s', (text) => {
        expect(plainModel(modelOf(text))).toEqual(plainModel(modelOf(plain)));
      });
    });
});

describe('names that are words of a programming language are plain names', () => {
  it.each([
    'constructor',
    'toString',
    'hasOwnProperty',
    'valueOf',
    'prototype',
    'isPrototypeOf',
    'then',
    'length',
    'NaN',
    'null',
  ])('%s as a coupling and as a field', (name) => {
    const coupling = modelOf(`1/2 (d phi)^2 - ${name}/3! phi^3`, { parameters: { [name]: { loops: 1 } } });
    expect(coupling.kinds.map((kind) => kind.coupling)).toEqual([name]);
    expect(coupling.kinds[0]!.loops).toBe(1);
    const field = modelOf(`1/2 (d ${name})^2 - g ${name}^3`, { fields: { [name]: { kind: 'real' } } });
    expect(field.fields.map((f) => f.name)).toEqual([name]);
  });
});

describe('one field operator', () => {
  it.each([
    ['phi', 'phi', false],
    ['  φ ', 'phi', false],
    [String.raw`\varphi`, 'phi', false],
    ['phi^*', 'phi', true],
    ['φ†', 'phi', true],
    ['φ^†', 'phi', true],
    [String.raw`\phi^\dagger`, 'phi', true],
    [String.raw`\phi^{*}`, 'phi', true],
    ['conj(phi)', 'phi', true],
    ['conj(conj(phi))', 'phi', false],
    ['h_1', 'h_1', false],
    ['h₁', 'h_1', false],
    [String.raw`\mathit{h}_{1}^{*}`, 'h_1', true],
  ])('%s', (text, field, conjugate) => {
    expect(readOperator(text)).toEqual({ field, conjugate });
  });

  it.each([
    '',
    ' ',
    '2',
    'phi^2',
    'phi chi',
    '-phi',
    'd phi',
    'phi^',
    '(',
    '__proto__',
    'phi + h.c.',
    'a'.repeat(201),
    '\u0000',
  ])('%j is none', (text) => {
    expect(readOperator(text)).toBeNull();
  });
});

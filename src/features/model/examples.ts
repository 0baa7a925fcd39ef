import type { ModelInput } from '#contract/request.ts';

/** A worked example: one click puts it into the editor. The models are those of the Saltmarsh scenario and textbook cases. */
export interface Example {
  readonly id: string;
  readonly title: string;
  /** What it shows. */
  readonly note: string;
  readonly input: ModelInput;
}

type Extra = Partial<Omit<ModelInput, 'lagrangian' | 'model'>>;

const model = (lagrangian: string, extra: Extra = {}): ModelInput => ({
  lagrangian,
  fields: {},
  parameters: {},
  mixing: 'vertex',
  conventions: { signature: '+---', dimension: '4' },
  ...extra,
});

export const examples: readonly Example[] = [
  {
    id: 'portal',
    title: 'Saltmarsh portal',
    note: 'Two real fields that meet in one quartic coupling.',
    input: model(
      '1/2 (d h)^2 - 1/2 m^2 h^2 + 1/2 (d s)^2 - 1/2 M^2 s^2\n  - lambda/4! h^4 - rho/4 h^2 s^2 - sigma/4! s^4',
      { conventions: { signature: '+---', dimension: '4-2eps' } },
    ),
  },
  {
    id: 'phi4',
    title: 'φ⁴',
    note: 'One real field, in Unicode.',
    input: model('½(∂φ)² − ½m²φ² − λ/4! φ⁴'),
  },
  {
    id: 'phi3',
    title: 'φ³ in six dimensions',
    note: 'The coupling has dimension zero at d = 6; written in LaTeX.',
    input: model(
      '\\frac{1}{2}\\partial_\\mu\\phi\\,\\partial^\\mu\\phi - \\frac{1}{2}m^2\\phi^2 - \\frac{g}{3!}\\phi^3',
      { conventions: { signature: '+---', dimension: '6-2eps' } },
    ),
  },
  {
    id: 'charged',
    title: 'Charged scalar and mediator',
    note: 'A complex field that couples to a real one; lines of φ carry an arrow.',
    input: model(
      '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - 1/2 M^2 chi^2\n  - g phi^* phi chi - lambda/4 (phi^* phi)^2',
    ),
  },
  {
    id: 'derivative',
    title: 'Derivative couplings',
    note: 'The vertices depend on momenta; each assignment of identical fields is listed.',
    input: model('1/2 (d phi)^2 - 1/2 m^2 phi^2 - c/2 phi^2 (d phi)^2 - b phi d^2 phi d^2 phi'),
  },
  {
    id: 'sextic',
    title: 'Sextic in three dimensions',
    note: 'Euclidean, typed with the potential positive.',
    input: model('1/2 (d phi)^2 + 1/2 m^2 phi^2 + lambda/4! phi^4 + kappa/6! phi^6', {
      conventions: { signature: 'euclidean', dimension: '3-2eps' },
    }),
  },
  {
    id: 'shifted',
    title: 'Shifted about a vacuum',
    note: 'φ⁴ about v: a cubic coupling λv; v is a constant of weight 0.',
    input: model('1/2 (d h)^2 - 1/2 (lambda v^2/3) h^2 - lambda v/6 h^3 - lambda/4! h^4', {
      parameters: { v: { weight: 0 } },
    }),
  },
  {
    id: 'counterterms',
    title: 'φ⁴ with counterterms',
    note: 'Two-line vertices of loop order one, and one for the coupling.',
    input: model('1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4\n  + 1/2 dZ (d phi)^2 - 1/2 dm phi^2 - dl/4! phi^4', {
      parameters: { dZ: { loops: 1 }, dm: { loops: 1 }, dl: { loops: 1 } },
    }),
  },
  {
    id: 'source',
    title: 'A linear term',
    note: 'A vertex with one line: tadpoles appear in every order.',
    input: model('1/2 (d phi)^2 - 1/2 m^2 phi^2 - j phi - g/3! phi^3'),
  },
  {
    id: 'plus-metric',
    title: 'The other metric',
    note: 'φ³ and φ⁴ together in (−,+,+,+): the kinetic term is typed with a minus.',
    input: model('-1/2 (d phi)^2 - 1/2 m^2 phi^2 - g/3! phi^3 - lambda/4! phi^4', {
      conventions: { signature: '-+++', dimension: '4' },
    }),
  },
];

export const exampleById = (id: string | null): Example | undefined => examples.find((example) => example.id === id);

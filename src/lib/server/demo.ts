import type { ExpansionRequest, ModelInput } from '#contract/request.ts';

/** The scenario of the demo: an invented group that compares models of its own. The program computes all its numbers. */
interface DemoExpansion {
  title: string;
  ask: Pick<ExpansionRequest, 'legs' | 'order'> & Partial<Pick<ExpansionRequest, 'keep' | 'through' | 'drop'>>;
}

export interface DemoModel {
  title: string;
  description: string;
  input: ModelInput;
  expansions: DemoExpansion[];
}

const input = (lagrangian: string): ModelInput => ({
  lagrangian,
  fields: {},
  parameters: {},
  mixing: 'vertex',
  conventions: { signature: '+---', dimension: '4' },
});

export const DEMO_MODELS: DemoModel[] = [
  {
    title: 'Saltmarsh portal',
    description: 'Two real fields, h and s, that meet through h²s². The group’s standard case for mixed vertices.',
    input: input(
      '1/2 (d h)^2 - 1/2 m_h^2 h^2 + 1/2 (d s)^2 - 1/2 m_s^2 s^2 - lambda/4! h^4 - rho/4! s^4 - kappa/4 h^2 s^2',
    ),
    expansions: [
      { title: 'h h → s s at one loop', ask: { legs: ['h', 'h', 's', 's'], order: { loops: 1 }, keep: '1PI' } },
      {
        title: 'Self-energy of h through two loops',
        ask: { legs: ['h', 'h'], order: { loops: 2 }, keep: '1PI', through: true },
      },
    ],
  },
  {
    title: 'Charged scalar with a real mediator',
    description: 'A charged field φ that exchanges a real field χ. Lines carry an arrow from φ* to φ.',
    input: input(
      '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - 1/2 M^2 chi^2 - g chi phi^* phi - lambda/4 (phi^* phi)^2',
    ),
    expansions: [
      { title: 'Propagator of φ at two loops', ask: { legs: ['phi', 'phi^*'], order: { loops: 2 }, keep: '1PI' } },
      {
        title: 'Mediator exchange at tree level',
        ask: { legs: ['phi', 'phi', 'phi^*', 'phi^*'], order: { loops: 0 }, keep: 'connected' },
      },
    ],
  },
  {
    title: 'Single quartic field',
    description: 'The reference model: one real field with λφ⁴/4!.',
    input: input('1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4'),
    expansions: [
      {
        title: 'Four-point function at two loops',
        ask: { legs: ['phi', 'phi', 'phi', 'phi'], order: { loops: 2 }, keep: '1PI' },
      },
      {
        title: 'Vacuum diagrams through λ⁴',
        ask: { legs: [], order: { lambda: 4 }, keep: 'connected', through: true },
      },
      { title: 'Self-energy at three loops', ask: { legs: ['phi', 'phi'], order: { loops: 3 }, keep: '1PI' } },
    ],
  },
];

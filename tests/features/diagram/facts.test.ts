import { describe, expect, it } from 'vitest';
import type { DiagramPageData } from '#contract/api.ts';
import { definition } from '#features/conventions/glossary.ts';
import { couplingWords, factsOf } from '#features/diagram/facts.ts';

const sunset = {
  symmetryFactor: '6',
  weight: '1/6',
  pairings: '96',
  order: { lambda: '2' },
  loops: 2,
  connected: true,
  onePI: true,
  hasSelfContraction: false,
  hasTadpole: false,
} as unknown as DiagramPageData;

describe('facts of a diagram', () => {
  it('writes couplings as physicists do', () => {
    expect(couplingWords({ lambda: '2', rho: '1' })).toBe('λ² ρ');
    expect(couplingWords({ g: '1/2' })).toBe('g¹⸍²');
    expect(couplingWords({})).toBe('1');
  });

  it('tells the sunset of a quartic field (1/S = 1/6, common practice), each fact with a definition that exists', () => {
    const facts = factsOf(sunset);
    expect(Object.fromEntries(facts.map(([name, text]) => [name, text]))).toMatchObject({
      S: '6',
      Weight: '1/6',
      Couplings: 'λ²',
      Loops: '2',
      '1PI': 'yes',
      Tadpole: 'no',
    });
    for (const [, , id] of facts) expect(definition(id).id).toBe(id);
  });
});

import { describe, expect, it } from 'vitest';
import type { DiagramAnswer, ExpansionResult } from '#contract/result.ts';
import { answer, run } from './run.ts';

const portal = {
  lagrangian: '1/2 (d h)^2 + 1/2 (d s)^2 - 1/2 m^2 h^2 - 1/2 M^2 s^2 - lambda/4! h^4 - kappa/4 h^2 s^2 - eta/4! s^4',
  legs: ['h', 'h', 's', 's'],
  order: { loops: 1 },
  keep: '1PI',
};

describe('npm run expand', () => {
  it('prints the whole result', () => {
    const result = answer<ExpansionResult>('expand', portal);
    expect(result.summary).toEqual({ state: 'complete', classes: 4, weight: '3', pairings: '160', excluded: [] });
    expect(result.ledger.state).toBe('balanced');
    expect(result.diagrams).toHaveLength(4);
    expect(result.rules.vertices.map(({ coupling, factor }) => [coupling, factor])).toEqual([
      ['lambda', '-I*lambda'],
      ['kappa', '-I*kappa'],
      ['eta', '-I*eta'],
    ]);
    expect(result.conventions.signature).toBe('+---');
    expect(result.engine.name).toBe('Wickwork');
  });
  it('--summary leaves the diagrams out', () => {
    const { diagrams, ...head } = answer<ExpansionResult>('expand', portal);
    expect(diagrams).toHaveLength(4);
    expect(answer('expand', portal, '--summary')).toEqual(head);
  });
  it('lists the vertices that the order excludes', () => {
    const { summary } = answer<ExpansionResult>('expand', { ...portal, order: { kappa: 2 } }, '--summary');
    expect(summary).toMatchObject({ state: 'complete', classes: 2, excluded: ['eta', 'lambda'] });
  });
  it('says none where no diagram exists', () => {
    const { summary } = answer<ExpansionResult>('expand', { ...portal, legs: ['h', 's'] }, '--summary');
    expect(summary).toEqual({ state: 'none', classes: 0, weight: '0', pairings: '0', excluded: [] });
  });
  it('holds the one empty diagram at order zero without legs', () => {
    const { summary } = answer<ExpansionResult>('expand', { ...portal, legs: [], order: { total: 0 }, keep: 'all' });
    expect(summary).toMatchObject({ state: 'complete', classes: 1, weight: '1', pairings: '1' });
  });
});

describe('what is wrong, as JSON on standard error', () => {
  const wrong: [string, string, number, Record<string, unknown>][] = [
    ['no JSON', '{"lagrangian": ', 2, { code: 'malformed' }],
    ['an unknown key', JSON.stringify({ ...portal, colour: 'red' }), 2, { code: 'bad-request' }],
    [
      'a broken Lagrangian',
      JSON.stringify({ ...portal, lagrangian: '1/2 (d h)^2 - \n lambda/4! h^^4' }),
      2,
      { code: 'syntax', line: 2 },
    ],
    ['an unknown leg', JSON.stringify({ ...portal, legs: ['q'] }), 2, { code: 'wrong-legs' }],
    [
      'a mass insertion by loops',
      JSON.stringify({ ...portal, lagrangian: `${portal.lagrangian} - mu h s` }),
      2,
      { code: 'infinite-order' },
    ],
    [
      'more than a bound',
      JSON.stringify({ ...portal, lagrangian: `${portal.lagrangian} - g h^(10^9)` }),
      3,
      { code: 'limit' },
    ],
  ];
  it.each(wrong)('%s', (_, input, exit, error) => {
    const ran = run('expand', input);
    expect([ran.exit, ran.out]).toEqual([exit, '']);
    expect(JSON.parse(ran.err).error).toMatchObject(error);
  });
});

describe('npm run diagram', () => {
  it('answers the sunset with its working', () => {
    const sunset = answer<DiagramAnswer>('diagram', {
      lines: [
        [1, 2],
        [1, 2],
        [1, 2],
      ],
      legs: [1, 2],
    });
    expect(sunset).toMatchObject({ symmetryFactor: '6', weight: '1/6', pairings: '192', loops: 2, onePI: true });
    expect(sunset.working.agree).toBe(true);
    expect(sunset.working.automorphisms.order).toBe('6');
    expect(sunset.working.contractions).toMatchObject({ total: '192', divisor: '1152', weight: '1/6' });
  });
  it('gives the same id as the expansion that holds it, whatever the order of vertices', () => {
    const model = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
    const list = answer<ExpansionResult>('expand', { lagrangian: model, legs: ['phi', 'phi'], order: { lambda: 2 } });
    const double = answer<DiagramAnswer>('diagram', {
      lines: [
        [2, 1],
        [1, 2],
        [1, 1],
      ],
      legs: [2, 2],
      model,
    });
    const found = list.diagrams.filter(({ id }) => id === double.id);
    expect(found).toHaveLength(1);
    expect(found[0]!.symmetryFactor).toBe(double.symmetryFactor);
    expect(double.working.coefficient).toMatchObject({ coupling: 'lambda^2', weight: '1/4', whole: '1/4*I*lambda^2' });
  });
  it('reads charge flow, kinds and a model', () => {
    const model = '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - 1/2 M^2 chi^2 - g chi phi^* phi';
    const triangle = answer<DiagramAnswer>('diagram', {
      lines: [
        [1, 2],
        [2, 3],
        [3, 1],
      ],
      legs: [1, 2, 3],
      fields: { lines: ['phi', 'phi', 'phi'], legs: ['chi', 'chi', 'chi'] },
      model,
    });
    expect(triangle).toMatchObject({ symmetryFactor: '1', order: { g: '3' }, loops: 1, onePI: true });
    const wrong = run(
      'diagram',
      JSON.stringify({
        lines: [
          [1, 2],
          [1, 2],
        ],
        legs: [],
        fields: { lines: ['phi', 'phi'], legs: [] },
        model,
      }),
    );
    expect(wrong.exit).toBe(2);
    expect(JSON.parse(wrong.err).error.message).toMatch(/Vertex 1 joins .* no such vertex/);
  });
  it.each([
    ['a gap in the numbers', { lines: [[1, 3]], legs: [] }],
    ['too few fields', { lines: [[1, 2]], legs: [1, 2], fields: { lines: [], legs: ['phi', 'phi'] } }],
    ['an unknown field', { lines: [[1, 1]], legs: [1], fields: { lines: ['x y'], legs: ['phi'] } }],
  ])('refuses %s', (_, request) => {
    expect(run('diagram', JSON.stringify(request)).exit).toBe(2);
  });
});

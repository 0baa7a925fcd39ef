import { describe, expect, it } from 'vitest';
import { factorial } from '#engine/exact/combinatorics.ts';
import { add, format, rational, ZERO } from '#engine/exact/rational.ts';
import type { Theory } from '#engine/graph/theory.ts';
import { expansionHead, prepare, renderDiagram, runExpansion } from '#engine/index.ts';
import { allPairings, isDropped, isKept } from '../ledger/contractions.ts';
import { drops, keeps } from '../ledger/smallCases.ts';

/** A model as typed, and the same reduced to integers by hand: what the reader, the orders and the enumerator must come to. */
interface Case {
  readonly name: string;
  readonly lagrangian: string;
  readonly legs: string[];
  readonly order: Record<string, number | string>;
  readonly theory: Theory;
  readonly types: number[];
  readonly contents: number[][];
  readonly orders: Record<string, string>[];
}

const cases: Case[] = [
  {
    name: 'portal with a cubic, exact powers',
    lagrangian: '1/2 (d h)^2 + 1/2 (d s)^2 - 1/2 m^2 h^2 - 1/2 M^2 s^2 - mu/2 h s^2 - kappa/4 h^2 s^2 - lambda/4! h^4',
    legs: ['h', 'h'],
    order: { kappa: 1, mu: 2 },
    theory: {
      partner: [0, 1],
      kinds: [
        [1, 2],
        [2, 2],
        [4, 0],
      ],
    },
    types: [0, 0],
    contents: [[2, 1, 0]],
    orders: [{ kappa: '1', mu: '2' }],
  },
  {
    name: 'mixed cubic, quartic and sextic, total order 2',
    lagrangian: String.raw`\frac12 (\partial\phi)^2 - \frac12 m^2\phi^2 - \frac{g}{3!}\phi^3 - \frac{\lambda}{4!}\phi^4 - \frac{c}{6!}\phi^6`,
    legs: ['phi', 'phi'],
    order: { total: 2 },
    theory: { partner: [0], kinds: [[3], [4], [6]] },
    types: [0, 0],
    contents: [
      [2, 0, 0],
      [0, 2, 0],
      [0, 1, 1],
      [0, 0, 2],
    ],
    orders: [{ g: '2' }, { lambda: '2' }, { c: '1', lambda: '1' }, { c: '2' }],
  },
  {
    name: 'charged scalar with a mediator',
    lagrangian: '∂φ^*∂φ − m²φ^*φ + ½(∂χ)² − ½M²χ² − g χ φ^*φ − λ/4 (φ^*φ)²',
    legs: ['φ', 'φ^*'],
    order: { g: 2, lambda: 1 },
    theory: {
      partner: [0, 2, 1],
      kinds: [
        [1, 1, 1],
        [0, 2, 2],
      ],
    },
    types: [1, 2],
    contents: [[2, 1]],
    orders: [{ g: '2', lambda: '1' }],
  },
];

const divisor = (theory: Theory, content: readonly number[]): bigint =>
  content.reduce(
    (product, n, kind) =>
      product * factorial(n) * theory.kinds[kind]!.reduce((part, count) => part * factorial(count), 1n) ** BigInt(n),
    1n,
  );

function expandAll(request: Parameters<typeof prepare>[0]) {
  const prepared = prepare(request);
  const run = runExpansion(prepared);
  const diagrams = [];
  let step = run.next();
  for (; !step.done; step = run.next()) diagrams.push(renderDiagram(prepared, step.value));
  return { ...expansionHead(prepared, step.value), diagrams };
}

describe('from the text to the summary, against every contraction', () => {
  it.each(cases)('$name', ({ lagrangian, legs, order, theory, types, contents, orders }) => {
    const lists = contents.map((content) => allPairings(theory, types, content));
    for (const keep of keeps)
      for (const drop of drops) {
        let weight = ZERO;
        let pairings = 0n;
        lists.forEach((list, at) => {
          const kept = list.filter((p) => isKept(p, keep) && !isDropped(p, drop));
          const count = kept.reduce((sum, p) => sum + p.count, 0n);
          pairings += count;
          weight = add(weight, rational(count, divisor(theory, contents[at]!)));
        });
        const result = expandAll({ lagrangian, legs, order, through: false, keep, drop, with: [] });
        expect([keep, drop, result.summary.weight, result.summary.pairings]).toEqual([
          keep,
          drop,
          format(weight),
          `${pairings}`,
        ]);
        expect(['balanced', 'rests']).toContain(result.ledger.state);
        expect(result.summary.state).toBe(pairings === 0n ? 'none' : 'complete');
        expect(result.diagrams).toHaveLength(result.summary.classes);
        for (const diagram of result.diagrams) expect(orders).toContainEqual(diagram.order);
        expect(new Set(result.diagrams.map(({ id }) => id)).size).toBe(result.summary.classes);
      }
  });
});

describe('ids and the canonical list', () => {
  const texts = [
    '1/2 (d h)^2 + 1/2 (d s)^2 - 1/2 m^2 h^2 - 1/2 M^2 s^2 - mu/2 h s^2 - kappa/4 h^2 s^2 - lambda/4! h^4',
    '- lambda/4! h^4 - s^2 h^2 kappa/4 + 1/2 (d s)^2 - mu/2 s h s - 1/2 m^2 h^2 + 1/2 (d h)^2 - 1/2 M^2 s^2',
  ];
  const renamed = '1/2 (d a)^2 + 1/2 (d b)^2 - 1/2 m^2 a^2 - 1/2 M^2 b^2 - x/2 a b^2 - y/4 a^2 b^2 - z/4! a^4';
  const request = (lagrangian: string, legs: string[]) =>
    ({ lagrangian, legs, order: { loops: 1 }, through: true, keep: 'connected', drop: [], with: [] }) as const;

  it('do not depend on the order of terms and factors', () => {
    const [one, other] = texts.map((text) => expandAll(request(text, ['h', 's', 's'])));
    expect(other!.diagrams).toEqual(one!.diagrams);
    expect(prepare(request(texts[1]!, ['h', 's', 's'])).canonicalKey).toBe(
      prepare(request(texts[0]!, ['h', 's', 's'])).canonicalKey,
    );
  });
  it('share one stored body with a renamed model, under names of its own', () => {
    expect(prepare(request(renamed, ['a', 'b', 'b'])).canonicalKey).toBe(
      prepare(request(texts[0]!, ['h', 's', 's'])).canonicalKey,
    );
    const one = expandAll(request(texts[0]!, ['h', 's', 's'])).diagrams;
    const other = expandAll(request(renamed, ['a', 'b', 'b'])).diagrams;
    expect(other.map(({ bare }) => bare)).toEqual(one.map(({ bare }) => bare));
    const ids = new Set(one.map(({ id }) => id));
    expect(other.some(({ id }) => ids.has(id))).toBe(false);
  });
  it('are the same in another expansion that holds the diagram', () => {
    const all = expandAll(request(texts[0]!, ['h', 's', 's'])).diagrams;
    const some = expandAll({ ...request(texts[0]!, ['h', 's', 's']), keep: '1PI', through: false }).diagrams;
    expect(some.length).toBeGreaterThan(0);
    for (const diagram of some) {
      const { shape: _one, ...rest } = diagram;
      const { shape: _other, ...same } = all.find(({ id }) => id === diagram.id)!;
      expect(same).toMatchObject({ id: rest.id, bare: rest.bare, symmetryFactor: rest.symmetryFactor });
    }
  });
});

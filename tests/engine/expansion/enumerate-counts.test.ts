import { describe, expect, it } from 'vitest';
import { format, rational, sum } from '#engine/exact/rational.ts';
import { enumerateContent } from '#engine/expansion/enumerate.ts';
import { canonicalLabel } from '#engine/graph/canonical.ts';
import type { CountedDiagram } from '#engine/graph/diagram.ts';
import { independentSums } from '#engine/ledger/independent.ts';
import counts from '../../reference/counts.json' with { type: 'json' };
import oeis from '../../reference/oeis.json' with { type: 'json' };
import { exactly, real } from '../ledger/requests.ts';

type Components = 'any' | 'noVacuum' | 'connected';

const legsOf = (n: number): number[] => new Array<number>(n).fill(0);
const loopless = ({ lines }: CountedDiagram): boolean => lines.every(({ from, to }) => from !== to);

function count(valence: number, n: number, legs: number, components: Components, keep = (_: CountedDiagram) => true) {
  let found = 0;
  for (const diagram of enumerateContent(real(valence), legsOf(legs), [n], { components })) if (keep(diagram)) found++;
  return found;
}

/** Numbers of classes: OEIS, in tests/reference/oeis.json. The last column is how far a test of a second or two reaches. */
describe('published numbers of classes', () => {
  it.each([
    ['A085549', 4, 1, 0, 'connected', false, 11],
    ['A129429', 4, 1, 0, 'any', false, 9],
    ['A129417', 4, 1, 0, 'connected', true, 10],
    ['A005967', 3, 2, 0, 'connected', false, 6],
    ['A129427', 3, 2, 0, 'any', false, 6],
    ['A000421', 3, 2, 0, 'connected', true, 6],
    ['A129430', 5, 2, 0, 'connected', false, 4],
    ['A129432', 6, 1, 0, 'connected', false, 7],
    ['A129433', 6, 1, 0, 'any', false, 7],
    ['A129421', 6, 1, 0, 'connected', true, 7],
    ['A352174', 4, 1, 2, 'connected', false, 8],
    ['A352173', 4, 1, 2, 'any', false, 7],
    ['A361448', 3, 2, 2, 'connected', false, 5],
    ['A352175', 3, 2, 2, 'any', false, 5],
  ] as const)('%s', (id, valence, step, legs, components, noSelf, last) => {
    const { offset, values } = oeis.entries.find((entry) => entry.id === id)!;
    // The empty diagram counts as connected in OEIS, not here.
    const first = legs === 0 ? 1 : 0;
    const indices = Array.from({ length: last - first + 1 }, (_, i) => first + i);
    const ours = indices.map((n) => count(valence, n * step, legs, components, noSelf ? loopless : undefined));
    expect(ours).toEqual(indices.map((n) => Number(values[n - offset])));
  });

  /** Trees: (2n − 5)!! for φ³ with n labelled points, (3k)!/(k! 3!^k) for φ⁴ with 2k + 2. */
  it('trees with labelled points', () => {
    const tree = counts.tree_level_labelled;
    tree['phi3 n-pt, n=3..8'].forEach((number, i) => {
      expect(count(3, i + 1, i + 3, 'connected')).toBe(number);
    });
    tree['phi4 n-pt, n=4,6,8,10'].forEach((number, i) => {
      expect(count(4, i + 1, 2 * i + 4, 'connected')).toBe(number);
    });
  });
});

/** Numbers of classes and sums of 1/S of tests/reference/counts.json (recomputed there by a separate enumeration). */
describe('explicit lists', () => {
  const lists = Object.entries(counts.own_enumeration).flatMap(([name, rows]) => {
    const single = /^phi(\d)_(vacuum|(\d)pt_labelled_legs)$/.exec(name);
    const mixed = /^phi3\+phi4_vacuum\(n3=(\d),n4=(\d)\)$/.exec(name);
    if (!single && !mixed) return [];
    return (rows as unknown as Record<string, unknown>[]).map((row) => ({
      name: `${name}, ${row.internal_vertices} vertices`,
      theory: single ? real(Number(single[1])) : real(3, 4),
      content: single ? [Number(row.internal_vertices)] : [Number(mixed![1]), Number(mixed![2])],
      legs: legsOf(Number(single?.[3] ?? 0)),
      expected: [row.connected, row.connected_no_selfloop],
    }));
  });
  it('reads them', () => expect(lists.length).toBeGreaterThan(40));
  it.each(lists)('$name', ({ theory, content, legs, expected }) => {
    const all = [...enumerateContent(theory, legs, content, { components: 'connected' })];
    const pair = (list: CountedDiagram[]): [number, string] => [
      list.length,
      format(sum(list.map(({ symmetryFactor }) => rational(1n, symmetryFactor)))),
    ];
    expect([pair(all), pair(all.filter(loopless))]).toEqual(expected);
  });
});

/** Σ 1/S of a list, per denominator first: the common denominator of many large factors is reached only once. */
function weightOf(list: Iterable<CountedDiagram>): { weight: string; classes: number } {
  const bySize = new Map<bigint, number>();
  let classes = 0;
  for (const { symmetryFactor } of list) {
    bySize.set(symmetryFactor, (bySize.get(symmetryFactor) ?? 0) + 1);
    classes++;
  }
  return { weight: format(sum([...bySize].map(([size, times]) => rational(times, size)))), classes };
}

describe('sums of 1/S against the ledger, beyond what contractions can reach', () => {
  const portal = {
    partner: [0, 1],
    kinds: [
      [4, 0],
      [0, 4],
      [2, 2],
    ],
  };
  const charged = {
    partner: [1, 0, 2],
    kinds: [
      [2, 2, 0],
      [1, 1, 1],
      [0, 0, 3],
    ],
  };
  const fourFields = {
    partner: [0, 1, 2, 3],
    kinds: [
      [1, 1, 1, 1],
      [2, 2, 0, 0],
      [0, 0, 2, 2],
    ],
  };
  /** Field i meets field i + 1 at a vertex φᵢ²φᵢ₊₁²: more half-line types than one packed word holds. */
  const ring = {
    partner: [0, 1, 2, 3, 4, 5, 6, 7],
    kinds: Array.from({ length: 8 }, (_, i) =>
      Array.from({ length: 8 }, (_, h) => (h === i || h === (i + 1) % 8 ? 2 : 0)),
    ),
  };
  const keeps = { any: 'all', noVacuum: 'normalised', connected: 'connected' } as const;
  it.each([
    ['φ⁴ vacuum', real(4), [], [10], 'connected'],
    ['φ⁴ vacuum', real(4), [], [11], 'connected'],
    ['φ⁴ vacuum with all components', real(4), [], [9], 'any'],
    ['φ³ vacuum', real(3), [], [12], 'connected'],
    ['φ⁶ vacuum', real(6), [], [7], 'connected'],
    ['φ⁴ four-point', real(4), [0, 0, 0, 0], [5], 'connected'],
    ['φ⁴ four-point without vacuum parts', real(4), [0, 0, 0, 0], [5], 'noVacuum'],
    ['φ³ + φ⁴ two-point', real(3, 4), [0, 0], [4, 3], 'connected'],
    ['φ + φ³ + φ⁴', real(1, 3, 4), [0], [3, 4, 2], 'connected'],
    ['many one-point vertices', real(1, 6), [], [10, 4], 'any'],
    ['many components', real(1, 2, 4), [], [4, 5, 3], 'any'],
    ['portal vacuum', portal, [], [2, 1, 3], 'connected'],
    ['portal two-point', portal, [0, 0], [1, 1, 3], 'noVacuum'],
    ['charged with legs', charged, [0, 1, 2], [2, 3, 2], 'connected'],
    ['charged vacuum', charged, [], [4, 2, 0], 'any'],
    ['four fields', fourFields, [0, 1, 2, 3], [1, 2, 2], 'connected'],
    ['eight fields in a ring', ring, [0, 0, 1, 1, 4, 4, 5, 5], ring.kinds.map(() => 1), 'connected'],
  ] as const)('%s %#', (_, theory, legs, content, components) => {
    const request = { theory, legs, order: exactly(content), keep: keeps[components], drop: [] };
    const sums = independentSums(request);
    if (sums.state !== 'proved') throw new Error('the independent sum was not proved');
    const { weight, classes } = weightOf(enumerateContent(theory, legs, content, { components }));
    expect(classes).toBeGreaterThan(100);
    expect(weight).toBe(format(sums.weight));
  });
});

describe('the list', () => {
  it.each([
    ['φ⁴ vacuum', real(4), [], [8]],
    ['φ³ vacuum', real(3), [], [10]],
    ['φ³ + φ⁴ two-point', real(3, 4), [0, 0], [4, 2]],
    ['φ⁶ three vertices, four points', real(6), [0, 0, 0, 0], [3]],
  ] as const)('has no two diagrams of one label: %s', (_, theory, legs, content) => {
    const labels = new Set<string>();
    let classes = 0;
    for (const diagram of enumerateContent(theory, legs, content, { components: 'connected' })) {
      labels.add(canonicalLabel(diagram, theory, legs).bare);
      classes++;
    }
    expect(classes).toBeGreaterThan(100);
    expect(labels.size).toBe(classes);
  });

  it('comes in the same order every time, and its arrays are its own', () => {
    const once = [...enumerateContent(real(4), [0, 0], [4], { components: 'any' })];
    const seen: string[] = [];
    const text = ({ legs, lines, symmetryFactor }: CountedDiagram): string =>
      `${legs}|${lines.map(({ from, to }) => `${from}-${to}`)}|${symmetryFactor}`;
    for (const diagram of enumerateContent(real(4), [0, 0], [4], { components: 'any' })) seen.push(text(diagram));
    expect(once.map(text)).toEqual(seen);
    expect(new Set(once.map(({ lines }) => lines)).size).toBe(once.length);
  });

  it('ends when asked to stop, also where nothing is found', () => {
    let asked = 0;
    const stop = (): boolean => ++asked > 3;
    const list = [...enumerateContent(real(4), [], [14], { components: 'connected', stop })];
    expect(list.length).toBeLessThan(20_000);
    expect(asked).toBe(4);
  });
});

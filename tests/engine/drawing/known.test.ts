import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { crossings, sampled } from '#engine/drawing/geometry.ts';
import { layout } from '#engine/drawing/layout.ts';
import { toDrawing } from '#engine/drawing/toDrawing.ts';
import type { Point } from '#engine/drawing/types.ts';
import { expandRequest } from '#engine/expansion/expand.ts';
import type { Diagram } from '#engine/graph/diagram.ts';
import { byLoops, real } from '../ledger/requests.ts';

/** A diagram of a real field by the ends of its legs and its lines. */
const diagramOf = (vertices: number, legs: number[], ...ends: [number, number][]): Diagram => ({
  kinds: new Array<number>(vertices).fill(0),
  legs,
  lines: ends.map(([from, to]) => ({ from, to, type: 0 })),
});

/** Planar with two legs in and two out (or fewer), so a drawing without crossing exists; drawn so in common practice. */
const planar: [string, Diagram][] = [
  ['figure-eight', diagramOf(1, [], [0, 0], [0, 0])],
  ['basketball', diagramOf(2, [], [0, 1], [0, 1], [0, 1], [0, 1])],
  ['theta graph', diagramOf(2, [], [0, 1], [0, 1], [0, 1])],
  ['tetrahedron', diagramOf(4, [], [0, 1], [0, 2], [0, 3], [1, 2], [1, 3], [2, 3])],
  ['tadpole', diagramOf(1, [0, 0], [0, 0])],
  ['double tadpole', diagramOf(2, [0, 0], [0, 1], [0, 1], [1, 1])],
  ['sunset', diagramOf(2, [0, 1], [0, 1], [0, 1], [0, 1])],
  ['s-channel exchange', diagramOf(2, [0, 0, 1, 1], [0, 1])],
  ['t-channel exchange', diagramOf(2, [0, 1, 0, 1], [0, 1])],
  ['s-channel bubble', diagramOf(2, [0, 0, 1, 1], [0, 1], [0, 1])],
  ['t-channel bubble', diagramOf(2, [0, 1, 0, 1], [0, 1], [0, 1])],
  ['chain of two bubbles', diagramOf(3, [0, 0, 2, 2], [0, 1], [0, 1], [1, 2], [1, 2])],
  ['box', diagramOf(4, [0, 1, 2, 3], [0, 1], [1, 3], [2, 3], [0, 2])],
];

/** Lines and legs as points: an odd number of pieces, so that two middles crossing each other meet inside a piece. */
const strokesOf = (diagram: Diagram): Point[][] => {
  const { curves, legs } = layout(diagram);
  return [...curves.map((curve) => sampled(curve, 23)), ...legs.map(({ from, end }) => [from, end])];
};

/** Crossings of lines and legs away from their ends. */
const crossingsOf = (diagram: Diagram): number => {
  const strokes = strokesOf(diagram);
  return strokes
    .flatMap((one, i) => strokes.slice(i + 1).map((other) => crossings(one, other)))
    .reduce((sum, count) => sum + count, 0);
};

describe('crossings', () => {
  it.each(planar)('%s has none', (_, diagram) => expect(crossingsOf(diagram)).toBe(0));
  it('are found where they cannot be avoided: the utility graph is not planar (Kuratowski 1930)', () => {
    const pairs = [0, 1, 2].flatMap((a) => [3, 4, 5].map((b): [number, number] => [a, b]));
    expect(crossingsOf(diagramOf(6, [], ...pairs))).toBeGreaterThan(0);
  });
});

describe('labels', () => {
  const four = real(4);
  const request = {
    theory: four,
    legs: [0, 0, 0, 0],
    order: byLoops(four, 2, true),
    keep: 'connected',
    drop: [],
  } as const;
  it('lie on no line and inside the drawing', () => {
    const manner = { legTypes: [0, 0, 0, 0], legLabels: ['φ₁', 'φ₂', 'φ₃', 'φ₄'], styleOf: () => 'solid' as const };
    const all = [...expandRequest(request)];
    expect(all.length).toBeGreaterThan(10);
    for (const diagram of all) {
      const { labels, width, height } = toDrawing(diagram, four, manner);
      const points = strokesOf(diagram).flat();
      for (const { x, y, anchor } of labels) {
        // Two letters of size 12, from the baseline y upwards.
        const [left, right] = anchor === 'end' ? [x - 13, x] : [x, x + 13];
        expect(left >= 0 && right <= width && y - 9 >= 0 && y <= height).toBe(true);
        expect(points.filter((p) => p.x > left && p.x < right && p.y > y - 9 && p.y < y + 2)).toEqual([]);
      }
    }
  });
});

describe('output', () => {
  const hashOf = (diagram: Diagram): string => {
    const manner = {
      legTypes: diagram.legs.map(() => 0),
      legLabels: diagram.legs.map((_, at) => `φ${at}`),
      styleOf: () => 'solid' as const,
    };
    const drawing = toDrawing(diagram, real(4), manner);
    return createHash('sha256').update(JSON.stringify(drawing)).digest('hex').slice(0, 12);
  };
  it('keeps the text of known drawings', () => {
    expect(planar.map(([name, diagram]) => `${name} ${hashOf(diagram)}`)).toMatchInlineSnapshot(`
      [
        "figure-eight 405eedf94322",
        "basketball 6b002df580ba",
        "theta graph 99d46d05480e",
        "tetrahedron 26d5cb4f064d",
        "tadpole 9f24d5a03e58",
        "double tadpole 07c8de362b94",
        "sunset 7769bedeff11",
        "s-channel exchange e8eee9c66224",
        "t-channel exchange 37552b56b68c",
        "s-channel bubble b45996ef3937",
        "t-channel bubble c7fac204f211",
        "chain of two bubbles a2f996c488f2",
        "box e9dc3483fe7e",
      ]
    `);
  });
});

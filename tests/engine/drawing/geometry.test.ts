import { describe, expect, it } from 'vitest';
import { distanceToCurve, sampled } from '#engine/drawing/geometry.ts';
import { type Layout, layout, usualSides } from '#engine/drawing/layout.ts';
import { packLayout, unpackLayout } from '#engine/drawing/packed.ts';
import { toDrawing } from '#engine/drawing/toDrawing.ts';
import type { Point } from '#engine/drawing/types.ts';
import { expandRequest } from '#engine/expansion/expand.ts';
import type { CountedDiagram, Diagram } from '#engine/graph/diagram.ts';
import type { CountingRequest, Keep, Theory } from '#engine/graph/theory.ts';
import { byLoops, real } from '../ledger/requests.ts';

const through = (theory: Theory, legs: number[], loops: number, keep: Keep): CountingRequest => ({
  theory,
  legs,
  order: byLoops(theory, loops, true),
  keep,
  drop: [],
});
const charged: Theory = {
  partner: [1, 0, 2],
  kinds: [
    [1, 1, 1],
    [2, 2, 0],
  ],
};

/** All φ⁴ diagrams to four loops with up to two legs and three with four, φ³ to three loops, and a charged field. */
const lists: [string, CountingRequest][] = [
  ['φ⁴ vacuum', through(real(4), [], 4, 'connected')],
  ['φ⁴ two legs', through(real(4), [0, 0], 4, '1PI')],
  ['φ⁴ two legs, connected', through(real(4), [0, 0], 3, 'connected')],
  ['φ⁴ four legs', through(real(4), [0, 0, 0, 0], 3, '1PI')],
  ['φ³ vacuum', through(real(3), [], 3, 'connected')],
  ['φ³ one leg', through(real(3), [0], 3, 'connected')],
  ['φ³ two legs', through(real(3), [0, 0], 2, 'connected')],
  ['φ³ four legs', through(real(3), [0, 0, 0, 0], 1, 'connected')],
  ['φ⁴ all, disconnected pieces', through(real(4), [0, 0], 2, 'all')],
  ['charged', through(charged, [0, 1], 2, 'connected')],
];

const drawn = (request: CountingRequest): { diagram: CountedDiagram; placed: Layout }[] =>
  [...expandRequest(request)].map((diagram) => ({ diagram, placed: layout(diagram) }));

const away = (a: Point, b: Point): number => Math.hypot(a.x - b.x, a.y - b.y);

/** Lines and legs as points, with the vertices they belong to. */
function strokesOf(diagram: Diagram, { curves, legs }: Layout): { own: number[]; points: Point[] }[] {
  return [
    ...curves.map((curve, line) => {
      const { from, to } = diagram.lines[line]!;
      return { own: [from, to], points: sampled(curve, 24) };
    }),
    ...legs.map(({ from, end }, leg) => ({ own: [diagram.legs[leg]!], points: [from, end] })),
  ];
}

describe.each(lists)('%s', (_, request) => {
  const all = drawn(request);

  it('draws every line from its first to its second vertex, every leg from its vertex', () => {
    expect(all.length).toBeGreaterThan(2);
    for (const { diagram, placed } of all) {
      expect(placed.vertices).toHaveLength(diagram.kinds.length);
      expect(placed.curves).toHaveLength(diagram.lines.length);
      diagram.lines.forEach(({ from, to }, line) => {
        const curve = placed.curves[line]!;
        expect(away(curve.from, placed.vertices[from]!)).toBeLessThan(0.01);
        expect(away(curve.to, placed.vertices[to]!)).toBeLessThan(0.01);
        expect(curve.loop !== null).toBe(from === to);
        const points = sampled(curve, 8);
        expect(away(points[0]!, curve.from) + away(points[8]!, curve.to)).toBeLessThan(0.01);
      });
      diagram.legs.forEach((at, leg) => {
        if (at >= 0) expect(away(placed.legs[leg]!.from, placed.vertices[at]!)).toBeLessThan(0.01);
      });
    }
  });

  it('keeps vertices apart and off lines that are not theirs', () => {
    for (const { diagram, placed } of all) {
      placed.vertices.forEach((p, v) => {
        placed.vertices.forEach((q, w) => {
          if (v < w) expect([diagram.lines, v, w, away(p, q) > 18]).toEqual([diagram.lines, v, w, true]);
        });
        for (const { own, points } of strokesOf(diagram, placed))
          if (!own.includes(v))
            expect([diagram.lines, diagram.legs, v, distanceToCurve(p, points) > 5]).toEqual([
              diagram.lines,
              diagram.legs,
              v,
              true,
            ]);
      });
    }
  });

  it('lays no two lines on each other', () => {
    for (const { diagram, placed } of all) {
      const middles = placed.curves.map((curve) => sampled(curve, 24).slice(6, 19));
      middles.forEach((points, i) => {
        placed.curves.slice(i + 1).forEach((other, j) => {
          const along = sampled(other, 48);
          const furthest = Math.max(...points.map((p) => distanceToCurve(p, along)));
          expect([diagram.lines, i, i + 1 + j, furthest > 4]).toEqual([diagram.lines, i, i + 1 + j, true]);
        });
      });
    }
  });

  it('stays inside its box, incoming legs left, outgoing right, ends in columns', () => {
    for (const { diagram, placed } of all) {
      for (const { points } of strokesOf(diagram, placed))
        for (const { x, y } of points) {
          expect(x).toBeGreaterThanOrEqual(0);
          expect(x).toBeLessThanOrEqual(placed.width);
          expect(y).toBeGreaterThanOrEqual(0);
          expect(y).toBeLessThanOrEqual(placed.height);
        }
      placed.legs.forEach(({ end, side }) => {
        for (const p of placed.vertices)
          if (diagram.legs.every((at) => at >= 0)) expect(side === 'in' ? end.x < p.x : end.x > p.x).toBe(true);
      });
    }
  });

  it('is the same every time, and from its packed text', () => {
    for (const { diagram, placed } of all) {
      expect(layout(diagram)).toEqual(placed);
      const manner = { legTypes: request.legs, legLabels: request.legs.map(String), styleOf: () => 'solid' as const };
      const drawing = toDrawing(diagram, request.theory, manner);
      const again = unpackLayout(packLayout(placed), diagram, usualSides(diagram.legs.length));
      expect(packLayout(again)).toBe(packLayout(placed));
      expect(drawing.width).toBeGreaterThanOrEqual(placed.width);
      expect(drawing.paths.every(({ d }) => !/NaN|Infinity/.test(d))).toBe(true);
      expect(drawing.labels).toHaveLength(request.legs.length);
    }
  });
});

describe('well-known drawings', () => {
  const line = (from: number, to: number) => ({ from, to, type: 0 });
  const crossingFree: [string, Diagram][] = [
    ['sunset', { kinds: [0, 0], legs: [0, 1], lines: [line(0, 1), line(0, 1), line(0, 1)] }],
    [
      'chain of two bubbles',
      { kinds: [0, 0, 0], legs: [0, 0, 2, 2], lines: [line(0, 1), line(0, 1), line(1, 2), line(1, 2)] },
    ],
    ['box', { kinds: [0, 0, 0, 0], legs: [0, 1, 2, 3], lines: [line(0, 1), line(1, 3), line(3, 2), line(0, 2)] }],
  ];
  it.each(crossingFree)('%s stands straight', (_, diagram) => {
    const { vertices, legs } = layout(diagram);
    const [left, right] = [legs.filter(({ side }) => side === 'in'), legs.filter(({ side }) => side === 'out')];
    // What comes in and what goes out are mirror images: equal heights on both sides.
    expect(left.map(({ end }) => Math.round(end.y)).sort()).toEqual(right.map(({ end }) => Math.round(end.y)).sort());
    const middle = (Math.min(...vertices.map(({ y }) => y)) + Math.max(...vertices.map(({ y }) => y))) / 2;
    if (vertices.length === 2 || vertices.length === 3)
      for (const { y } of vertices) expect(Math.abs(y - middle)).toBeLessThan(0.1);
  });
  it('the tetrahedron has a vertex in the middle and no crossing', () => {
    const { vertices } = layout({
      kinds: [0, 0, 0, 0],
      legs: [],
      lines: [line(0, 1), line(0, 2), line(0, 3), line(1, 2), line(1, 3), line(2, 3)],
    });
    const centre = {
      x: vertices.reduce((sum, { x }) => sum + x, 0) / 4,
      y: vertices.reduce((sum, { y }) => sum + y, 0) / 4,
    };
    expect(Math.min(...vertices.map((p) => away(p, centre)))).toBeLessThan(0.5);
  });
});

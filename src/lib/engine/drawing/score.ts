import { crossings, distanceToCurve } from './geometry.ts';
import { type Bounds, type Leg, legEnds } from './legs.ts';
import type { Shape } from './place.ts';
import type { Point } from './types.ts';

/** A shape turned into place with the ends of its legs. */
export interface Candidate {
  readonly shape: Shape;
  readonly ends: ReadonlyMap<number, Point>;
  readonly bounds: Bounds;
}

const CROSSING = 60;
const LEG_CROSSING = 160;
const TOUCH = 80;
/** A line keeps at least this far from vertices that are not its own. */
export const CLEAR = 7;
const DISORDER = 6;
const HANGING = 0.25;
const TILT = 0.6;
const LONG = 0.3;
const STEEP = 0.15;
const HEIGHT = 0.15;
const CROOKED = 0.8;

export function boundsOf(points: Iterable<Point>): Bounds {
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const { x, y } of points) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    top = Math.min(top, y);
    bottom = Math.max(bottom, y);
  }
  return left > right ? { left: 0, right: 0, top: 0, bottom: 0 } : { left, right, top, bottom };
}

/** Crossings and touches inside a body: the same however it is turned. */
export function innerCost({ vertices, curves: all, strokes: points }: Shape): number {
  const curves = [...all.values()];
  let cost = 0;
  for (let i = 0; i < points.length; i++)
    for (let j = i + 1; j < points.length; j++) cost += CROSSING * crossings(points[i]!, points[j]!);
  for (const p of vertices.values())
    curves.forEach(({ from, to }, i) => {
      const own = (from.x === p.x && from.y === p.y) || (to.x === p.x && to.y === p.y);
      if (!own && distanceToCurve(p, points[i]!) < CLEAR) cost += TOUCH;
    });
  return cost;
}

function legCost({ shape, ends }: Candidate, legs: readonly Leg[]): number {
  const lines = legs.map(({ leg, vertex }) => [shape.vertices.get(vertex)!, ends.get(leg)!]);
  let cost = 0;
  lines.forEach((line, i) => {
    for (const curve of shape.strokes) cost += LEG_CROSSING * crossings(line, curve);
    for (let j = i + 1; j < lines.length; j++) cost += LEG_CROSSING * crossings(line, lines[j]!);
    for (const [v, p] of shape.vertices) if (v !== legs[i]!.vertex && distanceToCurve(p, line) < CLEAR) cost += TOUCH;
  });
  return cost;
}

/** Legs of one side are read from the top: 1 above 2, 3 above 4. */
function disorder({ ends }: Candidate, legs: readonly Leg[]): number {
  let cost = 0;
  legs.forEach((a, i) => {
    for (const b of legs.slice(i + 1))
      if (a.side === b.side && a.leg < b.leg && ends.get(a.leg)!.y > ends.get(b.leg)!.y) cost += DISORDER;
  });
  return cost;
}

function middleOf(points: readonly Point[]): Point {
  const [a, b] = [points[(points.length - 1) >> 1]!, points[points.length >> 1]!];
  return { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 };
}

/** How far, on average, vertices and middles of lines are from where a mirror would have them; the better of both axes. */
function asymmetry({ vertices, strokes }: Shape): number {
  const points = [...vertices.values(), ...strokes.map(middleOf)];
  const { left, right, top, bottom } = boundsOf(points);
  const upright = (p: Point): Point => ({ x: left + right - p.x, y: p.y });
  const level = (p: Point): Point => ({ x: p.x, y: top + bottom - p.y });
  const off = (mirror: (p: Point) => Point): number =>
    points.reduce((sum, p) => {
      const q = mirror(p);
      return sum + points.reduce((least, { x, y }) => Math.min(least, Math.abs(x - q.x) + Math.abs(y - q.y)), 99);
    }, 0) / points.length;
  return Math.min(off(upright), off(level));
}

/** What is cheap to tell: height, pieces that hang down or stand askew, tilt and disorder of legs. */
function postureCost(candidate: Candidate, legs: readonly Leg[]): number {
  const { shape, ends, bounds } = candidate;
  const width = bounds.right - bounds.left;
  const height = bounds.bottom - bounds.top;
  if (legs.length === 0) return height * HEIGHT + (height > width + 1 ? 5 : 0);
  let cost = disorder(candidate, legs) + height * HEIGHT;
  const attached = new Set(legs.map(({ vertex }) => vertex));
  const level = legs.reduce((sum, { vertex }) => sum + shape.vertices.get(vertex)!.y, 0) / legs.length;
  for (const [v, { y }] of shape.vertices) if (!attached.has(v) && y > level) cost += (y - level) * HANGING;
  for (const { loop } of shape.curves.values()) if (loop) cost += (1 + Math.sin(loop.angle)) * 4;
  if (legs.length === 2) cost += Math.abs(ends.get(legs[0]!.leg)!.y - ends.get(legs[1]!.leg)!.y) * TILT;
  for (const { leg, vertex } of legs) {
    const [from, to] = [shape.vertices.get(vertex)!, ends.get(leg)!];
    cost += Math.hypot(to.x - from.x, to.y - from.y) * LONG + Math.abs(to.y - from.y) * STEEP;
  }
  return cost;
}

/**
 * What makes a turned shape less pleasing: legs that cross or run long, pieces that hang down, a tilt, no mirror. Gives up, with
 * infinity, as soon as the cost is not below `limit`.
 */
export function outerCost(candidate: Candidate, legs: readonly Leg[], limit: number): number {
  let cost = postureCost(candidate, legs);
  if (cost >= limit) return Number.POSITIVE_INFINITY;
  cost += asymmetry(candidate.shape) * CROOKED;
  if (cost >= limit || legs.length === 0) return cost;
  return cost + legCost(candidate, legs);
}

/** A shape with its legs drawn. */
export function withLegs(shape: Shape, legs: readonly Leg[], lean: number): Candidate {
  let bounds = boundsOf(shape.vertices.values());
  for (const points of shape.strokes) {
    const own = boundsOf(points);
    bounds = {
      left: Math.min(bounds.left, own.left),
      right: Math.max(bounds.right, own.right),
      top: Math.min(bounds.top, own.top),
      bottom: Math.max(bounds.bottom, own.bottom),
    };
  }
  return { shape, ends: legEnds(shape, legs, bounds, lean), bounds };
}

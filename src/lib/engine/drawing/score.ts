import { crossings, distanceToCurve } from './geometry.ts';
import type { Bounds } from './legs.ts';
import type { Shape } from './place.ts';
import type { Point } from './types.ts';

export const CROSSING = 60;
export const TOUCH = 80;
/** A line keeps at least this far from vertices that are not its own. */
export const CLEAR = 7;

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

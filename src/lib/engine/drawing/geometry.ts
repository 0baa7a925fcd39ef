import type { Point } from './types.ts';

export const add = (a: Point, b: Point, scale = 1): Point => ({ x: a.x + scale * b.x, y: a.y + scale * b.y });
export const minus = (a: Point, b: Point): Point => ({ x: a.x - b.x, y: a.y - b.y });
export const length = ({ x, y }: Point): number => Math.hypot(x, y);
/** The unit vector at an angle; y grows downwards, so angles run clockwise on the page. */
export const polar = (angle: number, radius = 1): Point => ({
  x: radius * Math.cos(angle),
  y: radius * Math.sin(angle),
});
export const angleOf = ({ x, y }: Point): number => Math.atan2(y, x);

/** A stroke between two vertices: straight, an arc, or a loop at one vertex. */
export interface Curve {
  readonly from: Point;
  readonly to: Point;
  /** Signed height of the arc over the chord, to the left of from → to on the page when positive; 0 is straight. */
  readonly sagitta: number;
  /** For a loop: direction and radius of its circle, which passes through `from` (= `to`). */
  readonly loop: { readonly angle: number; readonly radius: number } | null;
}

export const round = (value: number): number => Math.round(value * 10) / 10 + 0;
const at = ({ x, y }: Point): string => `${round(x)} ${round(y)}`;

/** Unit normal of from → to on whose side a positive sagitta lies. */
function normal(from: Point, to: Point): Point {
  const d = minus(to, from);
  const size = length(d) || 1;
  return { x: d.y / size, y: -d.x / size };
}

/** Radius of the circle through both ends with the given height over the chord. */
const radiusOf = (chord: number, sagitta: number): number => (chord * chord) / (8 * sagitta) + sagitta / 2;

/** SVG path data of a curve. */
export function pathOf({ from, to, sagitta, loop }: Curve): string {
  if (loop) {
    const far = add(from, polar(loop.angle, 2 * loop.radius));
    const r = round(loop.radius);
    return `M${at(from)}A${r} ${r} 0 0 1 ${at(far)}A${r} ${r} 0 0 1 ${at(from)}`;
  }
  if (Math.abs(sagitta) < 0.5) return `M${at(from)}L${at(to)}`;
  const chord = length(minus(to, from));
  const r = round(radiusOf(chord, Math.abs(sagitta)));
  const large = Math.abs(sagitta) > chord / 2 + 0.01 ? 1 : 0;
  return `M${at(from)}A${r} ${r} 0 ${large} ${sagitta > 0 ? 1 : 0} ${at(to)}`;
}

/** The point at share t of the way along a curve. */
export function pointOn({ from, to, sagitta, loop }: Curve, t: number): Point {
  if (loop) {
    const centre = add(from, polar(loop.angle, loop.radius));
    return add(centre, polar(loop.angle + Math.PI + 2 * Math.PI * t, loop.radius));
  }
  if (Math.abs(sagitta) < 0.5) return add(from, minus(to, from), t);
  const chord = length(minus(to, from));
  const radius = radiusOf(chord, Math.abs(sagitta));
  const up = normal(from, to);
  const side = Math.sign(sagitta);
  const middle = add(from, minus(to, from), 0.5);
  const centre = add(middle, up, side * (Math.abs(sagitta) - radius));
  const start = angleOf(minus(from, centre));
  const half = 2 * Math.atan2(2 * Math.abs(sagitta), chord);
  return add(centre, polar(start + side * 2 * half * t, radius));
}

/** Points along a curve, both ends included. */
export const sampled = (curve: Curve, pieces: number): Point[] =>
  Array.from({ length: pieces + 1 }, (_, i) => pointOn(curve, i / pieces));

/** How many straight pieces follow a curve closely enough to count crossings; odd, so that a line through the middle meets no joint. */
export const piecesOf = ({ sagitta, loop }: Curve): number => (loop ? 11 : Math.abs(sagitta) < 0.5 ? 1 : 9);

const turn = (a: Point, b: Point, c: Point): number => (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x);

/** Whether two segments cross at a point inside both. */
export function segmentsCross(a: Point, b: Point, c: Point, d: Point): boolean {
  const margin = 1e-6;
  return turn(a, b, c) * turn(a, b, d) < -margin && turn(c, d, a) * turn(c, d, b) < -margin;
}

/** Crossings of two curves given as points. */
export function crossings(a: readonly Point[], b: readonly Point[]): number {
  let count = 0;
  for (let i = 0; i + 1 < a.length; i++)
    for (let j = 0; j + 1 < b.length; j++) if (segmentsCross(a[i]!, a[i + 1]!, b[j]!, b[j + 1]!)) count++;
  return count;
}

/** Distance of a point from a segment. */
export function distanceTo(p: Point, a: Point, b: Point): number {
  const d = minus(b, a);
  const size = d.x * d.x + d.y * d.y;
  const t = size === 0 ? 0 : Math.max(0, Math.min(1, ((p.x - a.x) * d.x + (p.y - a.y) * d.y) / size));
  return length(minus(p, add(a, d, t)));
}

export const distanceToCurve = (p: Point, points: readonly Point[]): number =>
  points.slice(1).reduce((least, b, i) => Math.min(least, distanceTo(p, points[i]!, b)), Number.POSITIVE_INFINITY);

/** An arrowhead in the middle of a curve, as a closed path that is filled. */
export function arrowOn(curve: Curve, reversed = false, where = 0.5): string {
  const size = 4.5;
  const tip = pointOn(curve, where);
  const ahead = pointOn(curve, where + 0.02);
  const behind = pointOn(curve, where - 0.02);
  const angle = angleOf(minus(ahead, behind)) + (reversed ? Math.PI : 0);
  const front = add(tip, polar(angle, size));
  const left = add(tip, polar(angle + 2.5, size));
  const right = add(tip, polar(angle - 2.5, size));
  return `M${at(front)}L${at(left)}L${at(right)}Z`;
}

export function dotAt(p: Point, radius: number): string {
  const r = round(radius);
  return `M${round(p.x - radius)} ${round(p.y)}a${r} ${r} 0 1 0 ${round(2 * radius)} 0a${r} ${r} 0 1 0 ${round(-2 * radius)} 0`;
}

export function crossAt(p: Point, size: number): string {
  const [l, r, t, b] = [p.x - size, p.x + size, p.y - size, p.y + size].map(round);
  return `M${l} ${t}L${r} ${b}M${l} ${b}L${r} ${t}`;
}

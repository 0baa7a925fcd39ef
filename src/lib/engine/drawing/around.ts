import { add, length, minus } from './geometry.ts';
import type { Point } from './types.ts';

/** A ring that has been given its place. */
export interface PlacedRing {
  readonly order: readonly number[];
  readonly angles: readonly number[];
  readonly hub: number | null;
  readonly centre: Point;
  readonly radius: number;
}

const TURN = 2 * Math.PI;
/** Least height of the outer lines of a lens. */
const LENS = 11;
const PARALLEL = 15;

/**
 * Angles of a ring's vertices from `start` on. Evenly round the circle, or, with `special` vertices (two and more), those evenly and
 * the others evenly between them: what carries legs or further pieces then stands opposite each other.
 */
export function anglesOf(order: readonly number[], special: ReadonlySet<number> | null, start: number): number[] {
  const n = order.length;
  const marked = order.flatMap((v, i) => (special?.has(v) ? [i] : []));
  if (marked.length < 2 || marked.length === n) return order.map((_, i) => start + (TURN * i) / n);
  const angles = new Array<number>(n);
  marked.forEach((from, rank) => {
    const steps = (marked[(rank + 1) % marked.length]! - from + n) % n;
    for (let step = 0; step < steps; step++)
      angles[(from + step) % n] = start + (TURN / marked.length) * (rank + step / steps);
  });
  return angles;
}

/** The heights of m lines between the same two places, the outermost ±height. */
const spread = (m: number, height: number): number[] =>
  Array.from({ length: m }, (_, i) => (m === 1 ? 0 : height * (1 - (2 * i) / (m - 1))));

/** Height of the circle over the chord between two neighbours; the whole radius where they are opposite. */
function arcHeight({ angles, radius }: PlacedRing, from: number, to: number): number {
  const gap = (((angles[to]! - angles[from]!) % TURN) + TURN) % TURN;
  return radius * (1 - Math.cos(gap / 2));
}

/**
 * Heights of the m lines from a to b over their chord: arcs of the circle between neighbours, lenses where there are several,
 * chords across. p and q are where a and b stand.
 */
export function heightsOf(ring: PlacedRing, a: number, b: number, m: number, p: Point, q: Point): number[] {
  const { order, hub, centre, radius } = ring;
  const n = order.length;
  if (n === 2) return spread(m, m === 1 ? 0 : radius);
  const [i, j] = [order.indexOf(a), order.indexOf(b)];
  const forward = (j - i + n) % n;
  if (i >= 0 && j >= 0 && (forward === 1 || forward === n - 1)) {
    const outside = forward === 1 ? 1 : -1;
    const arc = forward === 1 ? arcHeight(ring, i, j) : arcHeight(ring, j, i);
    return m === 1 ? [outside * arc] : spread(m, outside * Math.max(arc, LENS));
  }
  const chord = spread(m, ((m - 1) * PARALLEL) / 2);
  // A diameter would run through the vertex in the middle.
  const middle = add(p, minus(q, p), 0.5);
  const blocked = hub !== null && hub !== a && hub !== b && length(minus(middle, centre)) < 8;
  return blocked ? chord.map((height) => height + 18) : chord;
}

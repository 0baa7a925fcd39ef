import type { Body } from './place.ts';
import type { Point, Side } from './types.ts';

/** A leg of a component: which vertex it ends on, and on which side of the drawing. */
export interface Leg {
  readonly leg: number;
  readonly vertex: number;
  readonly side: Side;
}

export interface Bounds {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

const REACH = 34;
const SPACING = 24;
/** Half the opening of two legs at one vertex. */
const OPENING = 24;
const MOST_LEAN = 40;

/** Heights wanted by the legs of one side, made to keep their distance. */
function apart(wanted: readonly number[]): number[] {
  const placed = [...wanted];
  for (let i = 1; i < placed.length; i++) placed[i] = Math.max(placed[i]!, placed[i - 1]! + SPACING);
  // What was pushed down as a whole is centred on what was wanted.
  const drift = placed.reduce((sum, y, i) => sum + y - wanted[i]!, 0) / Math.max(placed.length, 1);
  return placed.map((y) => y - drift);
}

/** Where the legs of one side end: aligned in a column, in the order of their vertices. */
function column(body: Body, legs: readonly Leg[], x: number, middle: number, lean: number): Map<number, Point> {
  const byVertex = new Map<number, Leg[]>();
  for (const leg of legs) byVertex.set(leg.vertex, [...(byVertex.get(leg.vertex) ?? []), leg]);
  const wishes = [...byVertex].flatMap(([vertex, group]) => {
    const { y } = body.vertices.get(vertex)!;
    return group.map((leg, i) => ({
      leg: leg.leg,
      wanted:
        group.length === 1
          ? y + Math.max(-MOST_LEAN, Math.min(MOST_LEAN, lean * (y - middle)))
          : y + (i - (group.length - 1) / 2) * ((2 * OPENING) / (group.length - 1)),
    }));
  });
  wishes.sort((a, b) => a.wanted - b.wanted || a.leg - b.leg);
  const heights = apart(wishes.map(({ wanted }) => wanted));
  return new Map(wishes.map(({ leg }, i) => [leg, { x, y: heights[i]! }]));
}

/** Ends of all legs: incoming in a column to the left, outgoing to the right. `lean`: how far a single leg leans away from the middle. */
export function legEnds(body: Body, legs: readonly Leg[], bounds: Bounds, lean: number): Map<number, Point> {
  const ys = [...body.vertices.values()].map(({ y }) => y);
  const middle = (Math.min(...ys) + Math.max(...ys)) / 2;
  const of = (side: Side): Leg[] => legs.filter((leg) => leg.side === side);
  return new Map([
    ...column(body, of('in'), bounds.left - REACH, middle, lean),
    ...column(body, of('out'), bounds.right + REACH, middle, lean),
  ]);
}

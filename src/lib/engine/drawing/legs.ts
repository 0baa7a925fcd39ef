import type { Side } from './types.ts';

/** A leg of a component: which vertex it ends on, and on which side of the drawing. */
export interface Leg {
  readonly leg: number;
  readonly vertex: number;
  readonly side: Side;
}

export interface Bounds {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

const REACH = 34;
const SPACING = 24;
/** Half the opening of two legs at one vertex. */
const OPENING = 24;
const MOST_LEAN = 40;

/** One leg's wish: alone at its vertex it leans away from the middle, with others it keeps a fixed offset. */
interface Wish {
  /** Index into the list of legs. */
  readonly at: number;
  readonly leg: number;
  readonly vertex: number;
  readonly offset: number | null;
  wanted: number;
  placed: number;
}

function wishesOf(legs: readonly Leg[], side: Side): Wish[] {
  const byVertex = new Map<number, { leg: Leg; at: number }[]>();
  legs.forEach((leg, at) => {
    if (leg.side === side) byVertex.set(leg.vertex, [...(byVertex.get(leg.vertex) ?? []), { leg, at }]);
  });
  return [...byVertex].flatMap(([vertex, group]) =>
    group.map(({ leg, at }, i) => ({
      at,
      leg: leg.leg,
      vertex,
      offset: group.length === 1 ? null : (i - (group.length - 1) / 2) * ((2 * OPENING) / (group.length - 1)),
      wanted: 0,
      placed: 0,
    })),
  );
}

/** Heights made to keep their distance; what was pushed down as a whole is centred on what was wanted. */
function keepApart(wishes: Wish[]): void {
  wishes.sort((a, b) => a.wanted - b.wanted || a.leg - b.leg);
  let drift = 0;
  wishes.forEach((wish, i) => {
    wish.placed = i === 0 ? wish.wanted : Math.max(wish.wanted, wishes[i - 1]!.placed + SPACING);
    drift += wish.placed - wish.wanted;
  });
  for (const wish of wishes) wish.placed -= drift / wishes.length;
}

/** Where the legs of a component end: incoming in a column to the left, outgoing to the right, in the order of their vertices. */
export class Columns {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly #sides: readonly { readonly side: Side; readonly wishes: Wish[] }[];

  constructor(legs: readonly Leg[]) {
    this.x = new Float64Array(legs.length);
    this.y = new Float64Array(legs.length);
    this.#sides = (['in', 'out'] as const).map((side) => ({ side, wishes: wishesOf(legs, side) }));
  }

  /** Fills x and y for vertices at heights `yOf`; `lean`: how far a single leg leans away from the middle. */
  place(yOf: (vertex: number) => number, middle: number, bounds: Bounds, lean: number): void {
    for (const { side, wishes } of this.#sides) {
      const x = side === 'in' ? bounds.left - REACH : bounds.right + REACH;
      for (const wish of wishes) {
        const y = yOf(wish.vertex);
        const leaning = Math.max(-MOST_LEAN, Math.min(MOST_LEAN, lean * (y - middle)));
        wish.wanted = y + (wish.offset ?? leaning);
      }
      keepApart(wishes);
      for (const { at, placed } of wishes) {
        this.x[at] = x;
        this.y[at] = placed;
      }
    }
  }
}

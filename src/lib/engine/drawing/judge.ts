import { type Bounds, Columns, type Leg } from './legs.ts';
import { type Shape, turnedShape } from './place.ts';
import { CLEAR, TOUCH } from './score.ts';
import type { Point } from './types.ts';

/** A shape turned into place with the ends of its legs. */
export interface Candidate {
  readonly shape: Shape;
  readonly ends: ReadonlyMap<number, Point>;
  readonly bounds: Bounds;
}

const LEG_CROSSING = 160;
const DISORDER = 6;
const HANGING = 0.25;
const TILT = 0.6;
const LONG = 0.3;
const STEEP = 0.15;
const HEIGHT = 0.15;
const CROOKED = 0.8;
const UNEQUAL = 99;

/**
 * Judges the ways to turn one shape: hundreds of them for each drawing, so points stand in flat arrays that are turned into the
 * same two buffers, and what is cheap to tell is told first.
 */
export class Judge {
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  readonly #turnedX: Float64Array;
  readonly #turnedY: Float64Array;
  /** #starts[s] … #starts[s + 1]: the points of stroke s; vertices stand before them all. */
  readonly #starts: number[];
  readonly #indexOf: ReadonlyMap<number, number>;
  readonly #loops: readonly number[];
  readonly #free: readonly number[];
  readonly #columns: Columns;
  readonly #bounds: Bounds = { left: 0, right: 0, top: 0, bottom: 0 };
  readonly #mirrorX: Float64Array;
  readonly #mirrorY: Float64Array;
  #angle = 0;
  #mirrored = false;
  #middle = 0;

  constructor(
    private readonly shape: Shape,
    private readonly legs: readonly Leg[],
  ) {
    const points = [...shape.vertices.values(), ...shape.strokes.flat()];
    this.#x = Float64Array.from(points, ({ x }) => x);
    this.#y = Float64Array.from(points, ({ y }) => y);
    this.#turnedX = new Float64Array(points.length);
    this.#turnedY = new Float64Array(points.length);
    this.#starts = [shape.vertices.size];
    for (const stroke of shape.strokes) this.#starts.push(this.#starts.at(-1)! + stroke.length);
    this.#indexOf = new Map([...shape.vertices.keys()].map((v, i) => [v, i]));
    this.#loops = [...shape.curves.values()].flatMap(({ loop }) => (loop ? [loop.angle] : []));
    const attached = new Set(legs.map(({ vertex }) => vertex));
    this.#free = [...shape.vertices.keys()].flatMap((v, i) => (attached.has(v) ? [] : [i]));
    this.#columns = new Columns(legs);
    this.#mirrorX = new Float64Array(shape.vertices.size + shape.strokes.length);
    this.#mirrorY = new Float64Array(shape.vertices.size + shape.strokes.length);
  }

  /** Turns the shape; costs are those of this turn until the next. */
  turn(angle: number, mirrored: boolean): void {
    this.#angle = angle;
    this.#mirrored = mirrored;
    const [cos, sin, flip] = [Math.cos(angle), Math.sin(angle), mirrored ? -1 : 1];
    let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
    let [low, high] = [Infinity, -Infinity];
    const vertices = this.#starts[0]!;
    for (let i = 0; i < this.#x.length; i++) {
      const x = this.#x[i]! * cos - flip * this.#y[i]! * sin;
      const y = this.#x[i]! * sin + flip * this.#y[i]! * cos;
      this.#turnedX[i] = x;
      this.#turnedY[i] = y;
      if (x < left) left = x;
      if (x > right) right = x;
      if (y < top) top = y;
      if (y > bottom) bottom = y;
      if (i < vertices) {
        if (y < low) low = y;
        if (y > high) high = y;
      }
    }
    Object.assign(this.#bounds, { left, right, top, bottom });
    this.#middle = (low + high) / 2;
  }

  readonly #heightOf = (vertex: number): number => this.#turnedY[this.#indexOf.get(vertex)!]!;

  /**
   * What makes the turned shape less pleasing: legs that cross or run long, pieces that hang down, a tilt, no mirror. Gives up, with
   * infinity, as soon as the cost is not below `limit`.
   */
  cost(lean: number, limit: number): number {
    if (this.legs.length > 0) this.#columns.place(this.#heightOf, this.#middle, this.#bounds, lean);
    let cost = this.#posture();
    if (cost >= limit) return Number.POSITIVE_INFINITY;
    cost += this.#asymmetry((limit - cost) / CROOKED) * CROOKED;
    if (cost >= limit || this.legs.length === 0) return cost;
    return cost + this.#legs();
  }

  /** The shape as it is turned now, with its legs. */
  candidate(lean: number): Candidate {
    const shape = turnedShape(this.shape, this.#angle, this.#mirrored);
    this.#columns.place(this.#heightOf, this.#middle, this.#bounds, lean);
    const { x, y } = this.#columns;
    const ends = new Map(this.legs.map(({ leg }, at) => [leg, { x: x[at]!, y: y[at]! }]));
    return { shape, ends, bounds: { ...this.#bounds } };
  }

  /** Height, pieces that hang down or stand askew, tilt and disorder of legs. */
  #posture(): number {
    const { left, right, top, bottom } = this.#bounds;
    const [width, height] = [right - left, bottom - top];
    const { legs } = this;
    if (legs.length === 0) return height * HEIGHT + (height > width + 1 ? 5 : 0);
    const { x, y } = this.#columns;
    let cost = height * HEIGHT + this.#disorder();
    let level = 0;
    for (const { vertex } of legs) level += this.#heightOf(vertex) / legs.length;
    for (const i of this.#free) if (this.#turnedY[i]! > level) cost += (this.#turnedY[i]! - level) * HANGING;
    for (const angle of this.#loops) {
      const turned = (this.#mirrored ? -angle : angle) + this.#angle;
      cost += (1 + Math.sin(turned)) * 4;
    }
    if (legs.length === 2) cost += Math.abs(y[0]! - y[1]!) * TILT;
    legs.forEach(({ vertex }, at) => {
      const i = this.#indexOf.get(vertex)!;
      const [dx, dy] = [x[at]! - this.#turnedX[i]!, y[at]! - this.#turnedY[i]!];
      cost += Math.sqrt(dx * dx + dy * dy) * LONG + Math.abs(dy) * STEEP;
    });
    return cost;
  }

  /** Legs of one side are read from the top: 1 above 2, 3 above 4. */
  #disorder(): number {
    const { legs } = this;
    const { y } = this.#columns;
    let cost = 0;
    for (let a = 0; a < legs.length; a++)
      for (let b = a + 1; b < legs.length; b++)
        if (legs[a]!.side === legs[b]!.side && legs[a]!.leg < legs[b]!.leg && y[a]! > y[b]!) cost += DISORDER;
    return cost;
  }

  /** How far, on average, vertices and middles of lines are from where a mirror would have them; the better of both axes. */
  #asymmetry(most: number): number {
    const [xs, ys] = [this.#mirrorX, this.#mirrorY];
    const vertices = this.#starts[0]!;
    for (let i = 0; i < vertices; i++) {
      xs[i] = this.#turnedX[i]!;
      ys[i] = this.#turnedY[i]!;
    }
    for (let s = 0; s + 1 < this.#starts.length; s++) {
      const [from, to] = [this.#starts[s]!, this.#starts[s + 1]!];
      const [a, b] = [from + ((to - from - 1) >> 1), from + ((to - from) >> 1)];
      xs[vertices + s] = (this.#turnedX[a]! + this.#turnedX[b]!) / 2;
      ys[vertices + s] = (this.#turnedY[a]! + this.#turnedY[b]!) / 2;
    }
    let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
    for (let i = 0; i < xs.length; i++) {
      left = Math.min(left, xs[i]!);
      right = Math.max(right, xs[i]!);
      top = Math.min(top, ys[i]!);
      bottom = Math.max(bottom, ys[i]!);
    }
    const upright = off(xs, ys, left + right, null, most);
    return Math.min(upright, off(xs, ys, null, top + bottom, Math.min(most, upright)));
  }

  #legs(): number {
    const [xs, ys] = [this.#turnedX, this.#turnedY];
    const { x, y } = this.#columns;
    let cost = 0;
    this.legs.forEach(({ vertex }, at) => {
      const own = this.#indexOf.get(vertex)!;
      const [ax, ay, bx, by] = [xs[own]!, ys[own]!, x[at]!, y[at]!];
      for (let s = 0; s + 1 < this.#starts.length; s++)
        for (let i = this.#starts[s]!; i + 1 < this.#starts[s + 1]!; i++)
          if (cross(ax, ay, bx, by, xs[i]!, ys[i]!, xs[i + 1]!, ys[i + 1]!)) cost += LEG_CROSSING;
      for (let other = at + 1; other < this.legs.length; other++) {
        const to = this.#indexOf.get(this.legs[other]!.vertex)!;
        if (cross(ax, ay, bx, by, xs[to]!, ys[to]!, x[other]!, y[other]!)) cost += LEG_CROSSING;
      }
      for (let v = 0; v < this.#starts[0]!; v++) if (v !== own && near(xs[v]!, ys[v]!, ax, ay, bx, by)) cost += TOUCH;
    });
    return cost;
  }
}

/** Mean distance of points from the set's own mirror image, x + x′ = sumX or y + y′ = sumY; infinite as soon as it is above `most`. */
function off(xs: Float64Array, ys: Float64Array, sumX: number | null, sumY: number | null, most: number): number {
  let total = 0;
  for (let i = 0; i < xs.length; i++) {
    const x = sumX === null ? xs[i]! : sumX - xs[i]!;
    const y = sumY === null ? ys[i]! : sumY - ys[i]!;
    let least = UNEQUAL;
    for (let j = 0; j < xs.length; j++) {
      const away = Math.abs(xs[j]! - x) + Math.abs(ys[j]! - y);
      if (away < least) least = away;
    }
    total += least;
    if (total > most * xs.length) return Number.POSITIVE_INFINITY;
  }
  return total / xs.length;
}

const turnOf = (ax: number, ay: number, bx: number, by: number, cx: number, cy: number): number =>
  (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);

/** Whether two segments cross at a point inside both. */
function cross(
  ax: number,
  ay: number,
  bx: number,
  by: number,
  cx: number,
  cy: number,
  dx: number,
  dy: number,
): boolean {
  const margin = 1e-6;
  return (
    turnOf(ax, ay, bx, by, cx, cy) * turnOf(ax, ay, bx, by, dx, dy) < -margin &&
    turnOf(cx, cy, dx, dy, ax, ay) * turnOf(cx, cy, dx, dy, bx, by) < -margin
  );
}

/** Whether a point is too close to a segment. */
function near(px: number, py: number, ax: number, ay: number, bx: number, by: number): boolean {
  const [dx, dy] = [bx - ax, by - ay];
  const size = dx * dx + dy * dy;
  const t = size === 0 ? 0 : Math.max(0, Math.min(1, ((px - ax) * dx + (py - ay) * dy) / size));
  const [ex, ey] = [px - (ax + t * dx), py - (ay + t * dy)];
  return Math.sqrt(ex * ex + ey * ey) < CLEAR;
}

import type { Diagram } from '../graph/diagram.ts';
import { type Component, componentsOf } from './blocks.ts';
import { type Curve, round } from './geometry.ts';
import { type Candidate, Judge } from './judge.ts';
import type { Leg } from './legs.ts';
import { type Body, bodiesOf, shapeOf } from './place.ts';
import { boundsOf, innerCost } from './score.ts';
import type { Point, Side } from './types.ts';

/** Coordinates of a whole diagram, origin at the top left corner. */
export interface Layout {
  readonly width: number;
  readonly height: number;
  readonly vertices: readonly Point[];
  readonly curves: readonly Curve[];
  /** Where each leg ends, and the vertex or other leg end that it comes from. */
  readonly legs: readonly { readonly from: Point; readonly end: Point; readonly side: Side }[];
}

const TURNS = 24;
const BODIES = 8;
const GAP = 26;
const JOINED = 92;
/** Room for the labels of legs, and around everything. */
const LABEL = 26;
const MARGIN = 8;

/** In the order of the legs: the first half comes in from the left, the rest goes out to the right. */
export const usualSides = (legs: number): Side[] =>
  Array.from({ length: legs }, (_, i) => (i < Math.ceil(legs / 2) ? 'in' : 'out'));

/** Single legs lean a little or strongly; the one leg of each side of a two-point drawing runs level. */
const leansOf = (legs: readonly Leg[]): readonly number[] => {
  if (legs.length === 0) return [0];
  const alone = legs.length === 1 || (legs.length === 2 && legs[0]!.side !== legs[1]!.side);
  return alone ? [0] : [0.5, 1.5];
};

/** Bodies without those that came out alike. */
function distinct(bodies: readonly Body[]): Body[] {
  const seen = new Map<string, Body>();
  for (const body of bodies) {
    const key = [...body.vertices]
      .map(([v, { x, y }]) => `${v} ${round(x)} ${round(y)}`)
      .sort()
      .join();
    if (!seen.has(key)) seen.set(key, body);
  }
  return [...seen.values()];
}

/** The best drawing of one component: every good shape, turned and mirrored, judged with its legs. */
function best(component: Component, diagram: Diagram, legs: readonly Leg[]): Candidate {
  const shapes = distinct(bodiesOf(component, diagram, new Set(legs.map(({ vertex }) => vertex))))
    .map(shapeOf)
    .map((shape) => ({ shape, inner: innerCost(shape) }))
    .sort((a, b) => a.inner - b.inner)
    .slice(0, BODIES);
  let chosen: { judge: Judge; angle: number; mirrored: boolean; lean: number } | null = null;
  let least = Number.POSITIVE_INFINITY;
  for (const { shape, inner } of shapes) {
    if (inner > shapes[0]!.inner + 1) break;
    const judge = new Judge(shape, legs);
    for (const mirrored of [false, true])
      for (let turn = 0; turn < TURNS; turn++) {
        const angle = (2 * Math.PI * turn) / TURNS;
        judge.turn(angle, mirrored);
        for (const lean of leansOf(legs)) {
          const cost = inner + judge.cost(lean, least - inner);
          if (cost < least - 1e-6) {
            least = cost;
            chosen = { judge, angle, mirrored, lean };
          }
        }
      }
  }
  const { judge, angle, mirrored, lean } = chosen!;
  judge.turn(angle, mirrored);
  return judge.candidate(lean);
}

interface Piece {
  readonly width: number;
  readonly height: number;
  readonly legged: boolean;
  /** Puts the piece at an offset into the layout. */
  readonly put: (dx: number, dy: number) => void;
}

const moved = (p: Point, dx: number, dy: number): Point => ({ x: p.x + dx, y: p.y + dy });

/** A diagram's drawing while its components find their places. */
class Sheet {
  readonly vertices: Point[] = [];
  readonly curves: Curve[] = [];
  readonly legs: { from: Point; end: Point; side: Side }[] = [];

  constructor(
    private readonly diagram: Diagram,
    private readonly sides: readonly Side[],
  ) {}

  component(component: Component): Piece {
    const members = new Set(component.vertices);
    const legs = this.diagram.legs.flatMap((vertex, leg): Leg[] =>
      members.has(vertex) ? [{ leg, vertex, side: this.sides[leg]! }] : [],
    );
    const { shape, ends, bounds } = best(component, this.diagram, legs);
    const box = boundsOf([{ x: bounds.left, y: bounds.top }, { x: bounds.right, y: bounds.bottom }, ...ends.values()]);
    return {
      width: box.right - box.left,
      height: box.bottom - box.top,
      legged: legs.length > 0,
      put: (x, y) => {
        const [dx, dy] = [x - box.left, y - box.top];
        for (const [v, p] of shape.vertices) this.vertices[v] = moved(p, dx, dy);
        for (const [line, curve] of shape.curves)
          this.curves[line] = { ...curve, from: moved(curve.from, dx, dy), to: moved(curve.to, dx, dy) };
        for (const { leg, vertex, side } of legs)
          this.legs[leg] = {
            from: moved(shape.vertices.get(vertex)!, dx, dy),
            end: moved(ends.get(leg)!, dx, dy),
            side,
          };
      },
    };
  }

  /** Two legs joined to each other: across, or as a bow where both end on one side. */
  joined(a: number, b: number): Piece {
    const across = this.sides[a] !== this.sides[b];
    const [first, second] = this.sides[a] === 'out' && across ? [b, a] : [a, b];
    return {
      width: JOINED,
      height: across ? 0 : 30,
      legged: true,
      put: (x, y) => {
        const near = this.sides[first] === 'in' ? x : x + JOINED;
        const left = { x: near, y };
        const right = across ? { x: x + JOINED, y } : { x: near, y: y + 30 };
        this.legs[first] = { from: right, end: left, side: this.sides[first]! };
        this.legs[second] = { from: left, end: right, side: this.sides[second]! };
      },
    };
  }
}

function piecesOf(sheet: Sheet, diagram: Diagram): Piece[] {
  const pieces = componentsOf(diagram).map((component) => sheet.component(component));
  diagram.legs.forEach((at, leg) => {
    if (at < 0 && -1 - at > leg) pieces.push(sheet.joined(leg, -1 - at));
  });
  return pieces;
}

/**
 * Lays out a diagram. Each component: its biconnected blocks on circles, the tree of blocks grown from its middle, turned so that
 * legs cross least, incoming legs left and outgoing right with their ends in columns. Components with legs stand one above the other, vacuum
 * components to their right. Deterministic; exhaustive for blocks of up to seven vertices, local search beyond.
 */
export function layout(diagram: Diagram, sides: readonly Side[] = usualSides(diagram.legs.length)): Layout {
  const sheet = new Sheet(diagram, sides);
  const pieces = piecesOf(sheet, diagram);
  const legged = pieces.filter((piece) => piece.legged);
  const vacuum = pieces.filter((piece) => !piece.legged);
  const side = diagram.legs.length > 0 ? LABEL : MARGIN;
  const width = Math.max(0, ...legged.map((piece) => piece.width));
  const stack = legged.reduce((sum, piece) => sum + piece.height + GAP, 0) - (legged.length > 0 ? GAP : 0);
  const tallest = Math.max(stack, 0, ...vacuum.map((piece) => piece.height));
  let y = MARGIN + (tallest - stack) / 2;
  for (const piece of legged) {
    piece.put(side + (width - piece.width) / 2, y);
    y += piece.height + GAP;
  }
  let x = legged.length > 0 ? 2 * side + width + MARGIN : MARGIN;
  for (const piece of vacuum) {
    piece.put(x, MARGIN + (tallest - piece.height) / 2);
    x += piece.width + GAP;
  }
  const right = vacuum.length > 0 ? x - GAP + MARGIN : 2 * side + width;
  return {
    width: Math.max(right, 2 * MARGIN + 8),
    height: Math.max(tallest + 2 * MARGIN, 2 * MARGIN + 8),
    vertices: sheet.vertices,
    curves: sheet.curves,
    legs: sheet.legs,
  };
}

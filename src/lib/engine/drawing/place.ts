import type { Diagram } from '../graph/diagram.ts';
import { anglesOf, heightsOf, type PlacedRing } from './around.ts';
import type { Block, Component } from './blocks.ts';
import { add, type Curve, piecesOf, polar, sampled } from './geometry.ts';
import { type Ring, ringsFor } from './ring.ts';
import type { Point } from './types.ts';

/** A component laid out as a rigid body, before it is turned and its legs are drawn. */
export interface Body {
  readonly vertices: ReadonlyMap<number, Point>;
  /** The direction that points away from what a vertex is joined to. */
  readonly outward: ReadonlyMap<number, number>;
  /** Curves by line of the diagram. */
  readonly curves: ReadonlyMap<number, Curve>;
}

/** A body with its curves as points: what is turned and judged. */
export interface Shape extends Body {
  /** Points along each curve, in the order of `curves`. */
  readonly strokes: readonly (readonly Point[])[];
}

export const shapeOf = (body: Body): Shape => ({
  vertices: body.vertices,
  outward: body.outward,
  curves: body.curves,
  strokes: [...body.curves.values()].map((curve) => sampled(curve, piecesOf(curve))),
});

const BRIDGE = 46;
const BUBBLE = 54;
const CHORD = 50;
export const LOOP = 11;
const UP = -Math.PI / 2;
const ASIDE = Math.PI / 2;

/** What hangs on a vertex beside the block it was reached by. */
type Item = { readonly block: number } | { readonly loop: number };

class Builder {
  readonly vertices = new Map<number, Point>();
  readonly outward = new Map<number, number>();
  readonly curves = new Map<number, Curve>();
  readonly #placed = new Set<number>();

  constructor(
    private readonly diagram: Diagram,
    private readonly component: Component,
    private readonly rings: ReadonlyMap<number, readonly Ring[]>,
    private readonly legsAt: ReadonlySet<number>,
  ) {}

  items(v: number): Item[] {
    const blocks = this.component.blocksAt.get(v)!.filter((block) => !this.#placed.has(block));
    const loops = this.diagram.lines.flatMap(({ from, to }, line) =>
      from === v && to === v && !this.curves.has(line) ? [{ loop: line }] : [],
    );
    return [...blocks.map((block) => ({ block })), ...loops];
  }

  /** Hangs everything on a vertex, spread about a direction; all round when `around`, with empty slots for legs. */
  hang(v: number, direction: number, around: boolean, slots = 0): void {
    const items = this.items(v);
    const k = items.length;
    const step = around ? (2 * Math.PI) / (k + slots) : Math.min(1.9, 3.4 / Math.max(k, 1));
    // A leg leaves straight outward: what else hangs here stands at right angles to it, upwards first.
    const aside = !around && this.legsAt.has(v);
    const side = Math.sin(direction - ASIDE) < Math.sin(direction + ASIDE) ? -1 : 1;
    items.forEach((item, i) => {
      const spreading = around ? i * step : (i - (k - 1) / 2) * step;
      const angle = direction + (aside ? side * (i % 2 === 0 ? ASIDE : -ASIDE) * (1 + (i >> 1) / 2) : spreading);
      if ('loop' in item) this.loop(v, item.loop, angle);
      else this.block(item.block, v, angle);
    });
  }

  private loop(v: number, line: number, angle: number): void {
    const at = this.vertices.get(v)!;
    this.curves.set(line, { from: at, to: at, sagitta: 0, loop: { angle, radius: LOOP } });
  }

  /** The ring of a block with the entry first, and what goes on from it as far from the entry as can be. */
  private ringFrom(index: number, entry: number): Ring {
    let best: Ring | null = null;
    let least = Number.POSITIVE_INFINITY;
    for (const ring of this.rings.get(index)!) {
      if (ring.hub === entry) continue;
      const at = ring.order.indexOf(entry);
      const order = [...ring.order.slice(at), ...ring.order.slice(0, at)];
      const n = order.length;
      const onward = order.reduce((sum, v, i) => sum + (i > 0 && this.goesOn(v, index) ? Math.abs(i - n / 2) : 0), 0);
      if (ring.cost + onward < least) {
        least = ring.cost + onward;
        best = { ...ring, order };
      }
    }
    return best!;
  }

  private goesOn(v: number, block: number): boolean {
    return this.legsAt.has(v) || this.component.blocksAt.get(v)!.some((other) => other !== block);
  }

  private block(index: number, entry: number, angle: number): void {
    const block = this.component.blocks[index]!;
    const ring = this.ringFrom(index, entry);
    const radius = this.radius(block, ring);
    const centre = add(this.vertices.get(entry)!, polar(angle, radius));
    const onward = new Set(ring.order.filter((v) => v === entry || this.goesOn(v, index)));
    this.ring(index, ring, centre, anglesOf(ring.order, onward.size === 2 ? onward : null, angle + Math.PI), radius);
  }

  private radius(block: Block, { order, hub }: Ring): number {
    if (block.vertices.length === 2) return (block.lines.length === 1 ? BRIDGE : BUBBLE) / 2;
    return Math.max(hub === null ? 29 : 38, CHORD / 2 / Math.sin(Math.PI / order.length));
  }

  /** The first block of all: its first vertex at angle `start`; `uneven` sets those that carry more opposite each other. */
  root(index: number, ring: Ring, start: number, uneven: boolean): void {
    const onward = new Set(ring.order.filter((v) => this.goesOn(v, index)));
    const angles = anglesOf(ring.order, uneven ? onward : null, start);
    this.ring(index, ring, { x: 0, y: 0 }, angles, this.radius(this.component.blocks[index]!, ring));
  }

  private ring(index: number, ring: Ring, centre: Point, angles: readonly number[], radius: number): void {
    const { order, hub } = ring;
    this.#placed.add(index);
    const fresh: number[] = [];
    order.forEach((v, i) => {
      const angle = angles[i]!;
      if (!this.vertices.has(v)) {
        this.vertices.set(v, add(centre, polar(angle, radius)));
        fresh.push(v);
      }
      if (!this.outward.has(v)) this.outward.set(v, angle);
    });
    if (hub !== null) {
      this.vertices.set(hub, centre);
      this.outward.set(hub, angles[0]! + Math.PI / order.length);
      fresh.push(hub);
    }
    this.strokes(this.component.blocks[index]!, { order, hub, angles, centre, radius });
    for (const v of fresh) this.hang(v, this.outward.get(v)!, false);
  }

  private strokes(block: Block, ring: PlacedRing): void {
    const bundles = new Map<string, number[]>();
    for (const line of block.lines) {
      const { from, to } = this.diagram.lines[line]!;
      const key = from < to ? `${from},${to}` : `${to},${from}`;
      bundles.set(key, [...(bundles.get(key) ?? []), line]);
    }
    for (const [key, lines] of bundles) {
      const [a, b] = key.split(',').map(Number) as [number, number];
      const heights = heightsOf(ring, a, b, lines.length, this.vertices.get(a)!, this.vertices.get(b)!);
      lines.forEach((line, i) => {
        const { from, to } = this.diagram.lines[line]!;
        const height = from === a ? heights[i]! : -heights[i]!;
        this.curves.set(line, {
          from: this.vertices.get(from)!,
          to: this.vertices.get(to)!,
          sagitta: height,
          loop: null,
        });
      });
    }
  }

  /** Heights of the m lines from a to b: arcs of the circle between neighbours, lenses, chords. */
}

/** A node of the tree of blocks, vertices and self-contractions. */
type TreeNode = `b${number}` | `v${number}` | `l${number}`;

/** The middle of the tree: leaves are taken off layer by layer. @returns a vertex or a block to begin with. */
function middle(component: Component, diagram: Diagram): { vertex: number } | { block: number } {
  const edges = new Map<TreeNode, Set<TreeNode>>();
  const join = (a: TreeNode, b: TreeNode): void => {
    edges.set(a, (edges.get(a) ?? new Set()).add(b));
    edges.set(b, (edges.get(b) ?? new Set()).add(a));
  };
  component.blocks.forEach((block, index) => {
    for (const v of block.vertices) {
      const more =
        component.blocksAt.get(v)!.length > 1 || diagram.lines.some(({ from, to }) => from === v && to === v);
      if (more) join(`b${index}`, `v${v}`);
    }
  });
  diagram.lines.forEach(({ from, to }, line) => {
    if (from === to && component.vertices.includes(from)) join(`l${line}`, `v${from}`);
  });
  if (edges.size === 0) return component.blocks.length > 0 ? { block: 0 } : { vertex: component.vertices[0]! };
  while (edges.size > 2) {
    const leaves = [...edges].filter(([, others]) => others.size <= 1).map(([node]) => node);
    if (leaves.length === edges.size) break;
    for (const leaf of leaves) {
      for (const other of edges.get(leaf)!) edges.get(other)?.delete(leaf);
      edges.delete(leaf);
    }
  }
  const nodes = [...edges.keys()].sort();
  const block = nodes.find((node) => node.startsWith('b'));
  const vertex = nodes.find((node) => node.startsWith('v'));
  if (nodes.length === 1 && vertex) return { vertex: Number(vertex.slice(1)) };
  if (block) return { block: Number(block.slice(1)) };
  return { vertex: Number(vertex!.slice(1)) };
}

/**
 * The candidate bodies of a component: its tree of blocks grown from the middle, for each of the good rings of the middle
 * block. Chains of bubbles come out straight because each block leaves its entry on the far side.
 */
export function bodiesOf(component: Component, diagram: Diagram, legsAt: ReadonlySet<number>): Body[] {
  const carries = (v: number): boolean =>
    legsAt.has(v) ||
    component.blocksAt.get(v)!.length > 1 ||
    diagram.lines.some(({ from, to }) => from === v && to === v);
  const rings = new Map(component.blocks.map((block, index) => [index, ringsFor(block, diagram, carries)]));
  const start = middle(component, diagram);
  const build = (grow: (builder: Builder) => void): Body => {
    const builder = new Builder(diagram, component, rings, legsAt);
    grow(builder);
    return builder;
  };
  const fromBlock = (block: number): Body[] =>
    rings
      .get(block)!
      .flatMap((ring) => [false, true].map((uneven) => build((builder) => builder.root(block, ring, Math.PI, uneven))));
  if ('block' in start) return fromBlock(start.block);
  const fromVertex = (legsAt.has(start.vertex) ? [0, 1, 2] : [0]).map((slots) =>
    build((builder) => {
      builder.vertices.set(start.vertex, { x: 0, y: 0 });
      builder.outward.set(start.vertex, UP);
      builder.hang(start.vertex, UP, true, slots);
    }),
  );
  // Between two pieces the middle is a matter of taste: either may be the one that the rest hangs on.
  const around = component.blocksAt.get(start.vertex)!;
  return [...fromVertex, ...(around.length <= 2 ? around.flatMap(fromBlock) : [])];
}

/** A shape turned by an angle, mirrored before that. */
export function turnedShape(shape: Shape, angle: number, mirrored: boolean): Shape {
  const [cos, sin, flip] = [Math.cos(angle), Math.sin(angle), mirrored ? -1 : 1];
  const point = ({ x, y }: Point): Point => ({ x: x * cos - flip * y * sin, y: x * sin + flip * y * cos });
  const direction = (a: number): number => flip * a + angle;
  return {
    vertices: new Map([...shape.vertices].map(([v, p]) => [v, point(p)])),
    outward: new Map([...shape.outward].map(([v, a]) => [v, direction(a)])),
    curves: new Map(
      [...shape.curves].map(([line, { from, to, sagitta, loop }]) => [
        line,
        {
          from: point(from),
          to: point(to),
          sagitta: flip * sagitta,
          loop: loop && { angle: direction(loop.angle), radius: loop.radius },
        },
      ]),
    ),
    strokes: shape.strokes.map((points) => points.map(point)),
  };
}

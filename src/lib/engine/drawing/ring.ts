import type { Diagram } from '../graph/diagram.ts';
import type { Block } from './blocks.ts';

/** A block on a circle: its vertices in the order around it, and perhaps one in the middle. */
export interface Ring {
  readonly order: readonly number[];
  readonly hub: number | null;
  /** Crossings of its own chords, and what else makes it less pleasing; smaller is better. */
  readonly cost: number;
}

/** Blocks with more vertices on the circle than this are ordered by local search instead of trying every order. */
const EXHAUSTIVE = 7;
const KEPT = 8;
const CROSSING = 10;
const GAP = 6;
const HUB = 4;
const IRREGULAR = 2;

type Joins = (a: number, b: number) => number;

/** Lines between two vertices of a block. */
export function joinsOf(block: Block, { lines }: Diagram): Joins {
  const size = 1 + Math.max(...block.vertices);
  const counts = new Uint8Array(size * size);
  for (const line of block.lines) {
    const { from, to } = lines[line]!;
    counts[from * size + to]!++;
    counts[to * size + from]!++;
  }
  return (a, b) => counts[a * size + b]!;
}

/** Chords that cross, neighbours that no line joins, and unlike multiplicities at mirrored places. */
function costOf(order: readonly number[], joins: Joins): number {
  const n = order.length;
  let cost = 0;
  const chords: [number, number, number][] = [];
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      const m = joins(order[i]!, order[j]!);
      const neighbours = j - i === 1 || j - i === n - 1;
      if (neighbours && m === 0) cost += GAP;
      if (!neighbours && m > 0) chords.push([i, j, m]);
    }
  for (let a = 0; a < chords.length; a++)
    for (let b = a + 1; b < chords.length; b++) {
      const [i, j, m] = chords[a]!;
      const [k, l, o] = chords[b]!;
      if ((i < k && k < j && j < l) || (k < i && i < l && l < j)) cost += CROSSING * m * o;
    }
  return cost + chords.reduce((sum, [, , m]) => sum + m - 1, 0) * IRREGULAR + asymmetry(order, joins);
}

/** 0 when some mirror axis maps neighbours' multiplicities onto each other, else 1: a visible symmetry is preferred. */
function asymmetry(order: readonly number[], joins: Joins): number {
  const n = order.length;
  const around = order.map((v, i) => joins(v, order[(i + 1) % n]!));
  for (let axis = 0; axis < n; axis++) if (around.every((m, i) => m === around[(((axis - i) % n) + n) % n])) return 0;
  return 1;
}

/** Every order of the items, in lexicographic order of their places; the list handed over is used again. */
function eachOrder(items: readonly number[], look: (order: readonly number[]) => void): void {
  const order: number[] = [];
  const used = items.map(() => false);
  const choose = (): void => {
    if (order.length === items.length) {
      look(order);
      return;
    }
    for (let i = 0; i < items.length; i++) {
      if (used[i]) continue;
      used[i] = true;
      order.push(items[i]!);
      choose();
      order.pop();
      used[i] = false;
    }
  };
  choose();
}

/** All orders around a circle up to rotation and reflection. */
function circular(vertices: readonly number[]): number[][] {
  const [first, ...rest] = vertices;
  const found: number[][] = [];
  eachOrder(rest, (order) => {
    if (order.length < 2 || order[0]! < order.at(-1)!) found.push([first!, ...order]);
  });
  return found;
}

/** From a first order, exchanges and reversals of stretches as long as they help. */
function improved(start: readonly number[], joins: Joins): number[] {
  let best = [...start];
  let cost = costOf(best, joins);
  for (let better = true; better; ) {
    better = false;
    for (let i = 0; i < best.length; i++)
      for (let j = i + 1; j < best.length; j++) {
        const reversed = [...best.slice(0, i), ...best.slice(i, j + 1).reverse(), ...best.slice(j + 1)];
        const moved = best.filter((_, at) => at !== i);
        moved.splice(j, 0, best[i]!);
        for (const candidate of [reversed, moved]) {
          const next = costOf(candidate, joins);
          if (next < cost) {
            [best, cost, better] = [candidate, next, true];
          }
        }
      }
  }
  return best;
}

/** A walk that always goes on to the unvisited vertex it is joined to most closely: a start for the search. */
function greedy(vertices: readonly number[], joins: Joins, start: number): number[] {
  const order = [start];
  const left = new Set(vertices.filter((v) => v !== start));
  while (left.size > 0) {
    const last = order.at(-1)!;
    const next = [...left].sort((a, b) => joins(last, b) - joins(last, a) || a - b)[0]!;
    order.push(next);
    left.delete(next);
  }
  return order;
}

function ringsOf(vertices: readonly number[], joins: Joins): { order: number[]; cost: number }[] {
  const orders =
    vertices.length <= EXHAUSTIVE
      ? circular(vertices)
      : vertices.slice(0, 4).map((start) => improved(greedy(vertices, joins, start), joins));
  return orders.map((order) => ({ order, cost: costOf(order, joins) }));
}

/** Crossings that spokes from the middle make with chords of the circle. */
function spokeCost(order: readonly number[], hub: number, joins: Joins): number {
  const n = order.length;
  let cost = HUB;
  for (let i = 0; i < n; i++)
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue;
      const m = joins(order[i]!, order[j]!);
      if (m === 0) continue;
      // The chord cuts off i+1 … j−1 from one side; spokes into the smaller part cross it.
      const inside = order.slice(i + 1, j);
      const outside = order.filter((v) => !inside.includes(v) && v !== order[i] && v !== order[j]);
      const spokes = (part: readonly number[]): number => part.reduce((sum, v) => sum + joins(hub, v), 0);
      cost += CROSSING * m * Math.min(spokes(inside), spokes(outside)) + (2 * (j - i) === n ? CROSSING : 0);
    }
  return cost;
}

/**
 * The best ways to set a block on a circle, fewest crossings first: every order for small blocks, local search beyond; with one
 * vertex in the middle where that takes crossings away (three spokes and more). Never one that `carries` legs or other pieces.
 */
export function ringsFor(block: Block, diagram: Diagram, carries: (v: number) => boolean): Ring[] {
  const { vertices } = block;
  const joins = joinsOf(block, diagram);
  const found: Ring[] = ringsOf(vertices, joins).map(({ order, cost }) => ({ order, hub: null, cost }));
  if (vertices.length >= 4 && vertices.length <= EXHAUSTIVE + 1)
    for (const hub of vertices) {
      if (carries(hub)) continue;
      const rest = vertices.filter((v) => v !== hub);
      const spokes = rest.reduce((sum, v) => sum + joins(hub, v), 0);
      if (spokes < 3 || rest.some((v) => joins(hub, v) > 1)) continue;
      for (const { order, cost } of ringsOf(rest, joins))
        found.push({ order, hub, cost: cost + spokeCost(order, hub, joins) });
    }
  found.sort((a, b) => a.cost - b.cost);
  const least = found[0]!.cost;
  return found.filter(({ cost }) => cost <= least + 3).slice(0, KEPT);
}

import { factorial } from '../exact/combinatorics.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { Theory } from '../graph/theory.ts';

/** How a diagram's vertices may be exchanged, found by plain trial: no labelling search, nothing shared with graph/search. */
class Exchanges {
  readonly #n: number;
  /** #joins[v·n + w]: lines from v to w by type, as text; comparing texts compares the joins. */
  readonly #joins: string[];
  readonly #colour: string[];
  readonly #order: number[];

  constructor({ kinds, legs, lines }: Diagram, theory: Theory) {
    const n = kinds.length;
    this.#n = n;
    const joins: number[][] = Array.from({ length: n * n }, () => []);
    for (const { from, to, type } of lines) {
      joins[from * n + to]!.push(2 * type + 1);
      joins[to * n + from]!.push(theory.partner[type] === type ? 2 * type + 1 : 2 * type);
    }
    this.#joins = joins.map((types) => types.sort((a, b) => a - b).join());
    this.#colour = kinds.map((kind, v) => `${kind} ${legs.flatMap((at, leg) => (at === v ? [leg] : [])).join()}`);
    this.#order = this.#walk();
  }

  /** Vertices so that each one, where it can, follows a neighbour: wrong images are found early. */
  #walk(): number[] {
    const order: number[] = [];
    const seen = new Set<number>();
    for (let start = 0; start < this.#n; start++) {
      if (seen.has(start)) continue;
      seen.add(start);
      order.push(start);
      for (let at = order.length - 1; at < order.length; at++)
        for (let w = 0; w < this.#n; w++)
          if (!seen.has(w) && this.#joins[order[at]! * this.#n + w] !== '') {
            seen.add(w);
            order.push(w);
          }
    }
    return order;
  }

  #fits(image: readonly number[], at: number, w: number): boolean {
    const v = this.#order[at]!;
    const n = this.#n;
    if (this.#colour[v] !== this.#colour[w] || this.#joins[v * n + v] !== this.#joins[w * n + w]) return false;
    for (let i = 0; i < at; i++) {
      const u = this.#order[i]!;
      if (image[u] === w || this.#joins[v * n + u] !== this.#joins[w * n + image[u]!]) return false;
    }
    return true;
  }

  #extends(image: number[], at: number): boolean {
    if (at === this.#n) return true;
    for (let w = 0; w < this.#n; w++) {
      if (!this.#fits(image, at, w)) continue;
      image[this.#order[at]!] = w;
      if (this.#extends(image, at + 1)) return true;
    }
    return false;
  }

  /** For each vertex, in how many places it can stand when the vertices before it stay where they are. */
  choices(): number[] {
    return this.#order.map((v, at) => {
      let count = 0;
      for (let w = 0; w < this.#n; w++) {
        const image = this.#order.map(() => -1);
        for (let i = 0; i < at; i++) image[this.#order[i]!] = this.#order[i]!;
        if (!this.#fits(image, at, w)) continue;
        image[v] = w;
        if (this.#extends(image, at + 1)) count++;
      }
      return count;
    });
  }
}

/** How the labelled vertices of the expansion stand on the places of a diagram. */
export interface Placements {
  /** ∏ n_kind!: all ways to put them there. */
  readonly all: bigint;
  /** Ways that differ only by exchanging places that the diagram does not tell apart. */
  readonly same: bigint;
  /** all / same. */
  readonly different: bigint;
}

/**
 * Counts the placements of labelled vertices on a diagram: one vertex after the other, each in all places that it can take with
 * those before it fixed (orbit–stabiliser). Exponential in the vertices at worst.
 *
 * @see C. C. Sims, in: Computational Problems in Abstract Algebra (1970) 169, for the chain of stabilisers.
 */
export function placements(diagram: Diagram, theory: Theory): Placements {
  const content = theory.kinds.map((_, kind) => diagram.kinds.filter((k) => k === kind).length);
  const all = content.reduce((product, n) => product * factorial(n), 1n);
  const same = new Exchanges(diagram, theory).choices().reduce((product, n) => product * BigInt(n), 1n);
  return { all, same, different: all / same };
}

import type { CountedDiagram, Line } from '../../graph/diagram.ts';
import type { Theory } from '../../graph/theory.ts';
import type { Frame } from './frame.ts';

/** Products of small integers stay exact numbers below this. */
const SAFE = 2 ** 53;

/** Turns finished matrices into diagrams: lines, legs, and |Aut| = |vertex automorphisms| · ∏ m! · ∏ l! 2^l. */
export class Emitter {
  private readonly lineOf = new Map<number, Line>();
  private readonly types: number;

  constructor(
    private readonly frame: Frame,
    private readonly theory: Theory,
    /** Type of the theory behind each type of the table. */
    private readonly used: readonly number[],
  ) {
    this.types = theory.partner.length;
  }

  diagram(orbitSizes: Int32Array): CountedDiagram {
    const { n, external, matrix, kinds } = this.frame;
    const legs = new Array<number>(external);
    const lines: Line[] = [];
    const factors: number[] = [];
    for (const size of orbitSizes) if (size > 1) factors.push(size);
    for (let i = 0; i < n; i++) {
      for (let j = Math.max(i, external); j < n; j++) {
        const code = matrix[i * n + j]!;
        if (code === 0) continue;
        if (i < external) legs[i] = j - external;
        else this.addLines(lines, factors, i - external, j - external, code);
      }
      for (let j = i + 1; j < external; j++) {
        if (matrix[i * n + j] === 0) continue;
        legs[i] = -1 - j;
        legs[j] = -1 - i;
      }
    }
    return { kinds, legs, lines, symmetryFactor: product(factors) };
  }

  private addLines(lines: Line[], factors: number[], i: number, j: number, code: number): void {
    const { table } = this.frame;
    const counts = (i === j ? table.selfCounts : table.counts)[code]!;
    counts.forEach((count, at) => {
      if (count === 0) return;
      const type = this.used[at]!;
      const partner = this.theory.partner[type]!;
      const real = partner === type;
      if (i === j && partner < type) return;
      const multiplicity = real && i === j ? count / 2 : count;
      // A half-line φ at i is the `to` end of a complex line; a half-line φ* is its `from` end.
      const [from, to] = !real && type < partner ? [j, i] : [i, j];
      const line = this.line(from, to, Math.min(type, partner));
      for (let k = 1; k <= multiplicity; k++) {
        lines.push(line);
        if (k > 1) factors.push(k);
        if (real && i === j) factors.push(2);
      }
    });
  }

  /** Lines are values: one object for each that occurs. */
  private line(from: number, to: number, type: number): Line {
    const key = (from * this.frame.n + to) * this.types + type;
    const known = this.lineOf.get(key);
    if (known) return known;
    const line = { from, to, type };
    this.lineOf.set(key, line);
    return line;
  }
}

function product(factors: readonly number[]): bigint {
  let small = 1;
  let large = 1n;
  for (const factor of factors) {
    if (small * factor >= SAFE) {
      large *= BigInt(small);
      small = 1;
    }
    small *= factor;
  }
  return large * BigInt(small);
}

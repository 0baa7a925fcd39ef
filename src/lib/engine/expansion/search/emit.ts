import { factorial } from '../../exact/combinatorics.ts';
import type { CountedDiagram, Line } from '../../graph/diagram.ts';
import type { Theory } from '../../graph/theory.ts';
import type { Frame } from './frame.ts';

/** Products of small integers stay exact numbers below this. */
const SAFE = 2 ** 53;
const NONE: readonly number[] = [];

/** What one join code between vertices i ≤ j stands for. */
interface Bundle {
  /** ∏ m! over equal lines, ∏ l! 2^l over self-contractions of a real field. */
  readonly factor: number;
  readonly lines: readonly { readonly type: number; readonly count: number; readonly reversed: boolean }[];
}

/** Turns finished matrices into diagrams with |Aut| = |vertex automorphisms| · ∏ m! · ∏ l! 2^l. */
export class Emitter {
  private readonly frame: Frame;
  private readonly between: readonly Bundle[];
  private readonly own: readonly Bundle[];
  /** Lines are values: one object for each (from, to, type) that occurs. */
  private readonly lineOf: Line[] = [];
  private readonly types: number;
  /** Lines of the rows before row r are lines[0…lineCount[r]−1]; their factors are small[r] · large[r]. */
  private readonly lines: Line[] = [];
  private readonly lineCount: Int32Array;
  private readonly small: Float64Array;
  private readonly large: bigint[];

  /** used: the type of the theory behind each type of the frame's table. */
  constructor(frame: Frame, theory: Theory, used: readonly number[]) {
    this.frame = frame;
    const bundle = (counts: readonly number[], own: boolean) => bundleOf(counts, own, used, theory);
    this.between = frame.table.counts.map((counts) => bundle(counts, false));
    this.own = frame.table.selfCounts.map((counts) => bundle(counts, true));
    this.types = theory.partner.length;
    this.lineCount = new Int32Array(frame.n + 1);
    this.small = new Float64Array(frame.n + 1).fill(1);
    this.large = new Array<bigint>(frame.n + 1).fill(1n);
  }

  /** The diagram of the matrix as it stands; its arrays are its own. Rows before `changed` are as they were at the last call. */
  diagram(orbitSizes: Int32Array, changed: number): CountedDiagram {
    const { n, external, kinds } = this.frame;
    for (let row = Math.max(changed, external); row < n; row++) this.readRow(row);
    let small = this.small[n]!;
    let large = this.large[n]!;
    for (let v = external; v < n; v++) {
      const size = orbitSizes[v]!;
      if (size === 1) continue;
      if (small * size >= SAFE) {
        large *= BigInt(small);
        small = 1;
      }
      small *= size;
    }
    const symmetryFactor = large === 1n ? BigInt(small) : large * BigInt(small);
    return { kinds, legs: this.legs(), lines: this.lines.slice(0, this.lineCount[n]), symmetryFactor };
  }

  private readRow(row: number): void {
    const { n, external, matrix } = this.frame;
    let count = this.lineCount[row]!;
    let small = this.small[row]!;
    let large = this.large[row]!;
    for (let j = row; j < n; j++) {
      const code = matrix[row * n + j]!;
      if (code === 0) continue;
      const bundle = (row === j ? this.own : this.between)[code]!;
      count = this.addLines(bundle, row - external, j - external, count);
      if (small * bundle.factor >= SAFE) {
        large *= BigInt(small);
        small = 1;
      }
      small *= bundle.factor;
    }
    this.lineCount[row + 1] = count;
    this.small[row + 1] = small;
    this.large[row + 1] = large;
  }

  private legs(): readonly number[] {
    const { n, external, matrix } = this.frame;
    if (external === 0) return NONE;
    const legs: number[] = [];
    for (let i = 0; i < external; i++) {
      let j = 0;
      while (matrix[i * n + j] === 0) j++;
      legs.push(j < external ? -1 - j : j - external);
    }
    return legs;
  }

  private addLines(bundle: Bundle, i: number, j: number, count: number): number {
    let at = count;
    for (const { type, count: lines, reversed } of bundle.lines) {
      const line = reversed ? this.line(j, i, type) : this.line(i, j, type);
      for (let k = 0; k < lines; k++) this.lines[at++] = line;
    }
    return at;
  }

  private line(from: number, to: number, type: number): Line {
    const key = (from * this.frame.n + to) * this.types + type;
    const known = this.lineOf[key];
    if (known !== undefined) return known;
    const line = { from, to, type };
    this.lineOf[key] = line;
    return line;
  }
}

function bundleOf(counts: readonly number[], own: boolean, used: readonly number[], theory: Theory): Bundle {
  let factor = 1;
  const lines = counts.flatMap((halfLines, at) => {
    const type = used[at]!;
    const partner = theory.partner[type]!;
    const loop = own && partner === type;
    // A self-contraction of a complex field counts under both of its types.
    if (halfLines === 0 || (own && partner < type)) return [];
    const count = loop ? halfLines / 2 : halfLines;
    factor *= Number(factorial(count)) * (loop ? 2 ** count : 1);
    // A half-line φ at i is the `to` end of a complex line, a half-line φ* its `from` end.
    return [{ type: Math.min(type, partner), count, reversed: type < partner }];
  });
  return { factor, lines };
}

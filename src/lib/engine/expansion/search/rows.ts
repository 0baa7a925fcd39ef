import { BridgeTest } from './bridges.ts';
import { Canonicity } from './canonicity.ts';
import { ComponentTest } from './components.ts';
import type { Components, Frame } from './frame.ts';

/** What the search leaves out, and when it ends early. */
export interface SearchOptions {
  readonly components: Components;
  /** Leaves out diagrams with an internal line that is a bridge. */
  readonly noBridges?: boolean;
  /** Asked now and then, also while nothing is found. */
  readonly stop?: () => boolean;
}

/** Steps between two questions whether to stop. */
const STEPS_BETWEEN = 256;

/**
 * Orderly generation: fills the matrix of a frame row by row, larger joins first, so that it visits exactly the canonical
 * matrices (the largest of each class), in descending order.
 *
 * Every finished row is tested as the beginning of a canonical matrix; when a test fails, the search goes back to the last
 * row that the failure rests on.
 *
 * @see R. C. Read, Ann. Discrete Math. 2 (1978) 107; I. A. Faradžev, Colloq. Internat. CNRS 260 (1978) 131; M. Meringer,
 * J. Graph Theory 30 (1999) 137.
 */
export class RowSearch {
  private readonly frame: Frame;
  readonly canonicity: Canonicity;
  private readonly component: ComponentTest;
  private readonly bridge: BridgeTest | null;
  /** Half-lines left at each node: packed by type, and their number. */
  private readonly left: Int32Array;
  private readonly open: Int32Array;
  /** after[r·(n+1) + j]: half-lines left at nodes ≥ j when row r begins. */
  private readonly after: Int32Array;
  /** selfCap[r·n + j]: the largest self-join that node j may have when row r begins. */
  private readonly selfCap: Int32Array;
  /** With one half-line type numbers alone say what fits. */
  private readonly oneType: boolean;
  /** The first row that differs from the matrix before. */
  changed = 0;
  private readonly stop: (() => boolean) | undefined;
  private started = false;
  private steps = 0;

  constructor(frame: Frame, options: SearchOptions) {
    this.frame = frame;
    const { n, table } = frame;
    this.canonicity = new Canonicity(frame);
    this.component = new ComponentTest(frame, options.components);
    // Each side of a bridge has an odd number of half-lines, so some node has: an external point or a vertex.
    const bridges = table.degree.some((degree) => degree % 2 === 1);
    this.bridge = options.noBridges && bridges ? new BridgeTest(frame) : null;
    this.stop = options.stop;
    this.left = table.halfLines.slice();
    this.open = table.degree.slice();
    this.after = new Int32Array((n + 1) * (n + 1));
    this.selfCap = new Int32Array((n + 1) * n).fill(table.selfSize.length - 1);
    this.oneType = table.counts[0]!.length === 1;
    this.openRow(0);
  }

  /** Goes on to the next canonical matrix; false when there is none, or when asked to stop. */
  next(): boolean {
    const { n } = this.frame;
    let row = this.started ? n - 1 : 0;
    let column = this.started ? this.retreat(row, n - 1) : 0;
    this.changed = row;
    this.started = true;
    for (;;) {
      if (column >= 0) column = this.fill(row, column);
      if (column >= 0) {
        const back = this.finish(row);
        if (back > row) {
          if (++row === n) return true;
          column = row;
          continue;
        }
        for (; row > back; row--) this.clear(row);
        column = this.retreat(row, n - 1);
      } else {
        if (--row < 0) return false;
        column = this.retreat(row, n - 1);
      }
      if (row < this.changed) this.changed = row;
      if (++this.steps % STEPS_BETWEEN === 0 && this.stop?.()) return false;
    }
  }

  /** Fills row `row` from column `from` with the largest joins that fit; n when the row is complete, −1 when it has no completion. */
  private fill(row: number, from: number): number {
    const { n } = this.frame;
    const { open } = this;
    for (let column = from; open[row]! > 0; column++) {
      if (column === n) return -1;
      if (!this.choose(row, column, this.cap(row, column))) {
        column = this.retreat(row, column - 1) - 1;
        if (column < -1) return -1;
      }
    }
    return n;
  }

  /** Lowers the last entry of the row at or before `column` that can be lowered; the column to go on from, −1 if there is none. */
  private retreat(row: number, column: number): number {
    const { n, matrix } = this.frame;
    for (let c = column; c >= row; c--) {
      const code = matrix[row * n + c]!;
      if (code === 0) continue;
      this.put(row, c, code, -1);
      if (this.choose(row, c, code - 1)) return c + 1;
    }
    return -1;
  }

  private cap(row: number, column: number): number {
    const { n, runEnd, matrix, table } = this.frame;
    const base = row * n;
    if (column === row) return this.selfCap[base + column]!;
    const alike = column > row + 1 && runEnd[base + column] === runEnd[base + column - 1];
    return alike ? matrix[base + column - 1]! : table.size.length - 1;
  }

  /** Puts the largest join ≤ cap that fits and lets the row be completed; false if there is none. */
  private choose(row: number, column: number, cap: number): boolean {
    const { n, table, runEnd } = this.frame;
    const own = column === row;
    const size = own ? table.selfSize : table.size;
    const rest = this.open[row]!;
    const base = row * (n + 1);
    const end = own ? row + 1 : runEnd[row * n + column]!;
    const beyond = this.after[base + end]!;
    const repeat = own ? 1 : end - column;
    const most = own ? rest : Math.min(rest, this.open[column]!);
    let code = Math.min(cap, (own ? table.selfTop : table.top)[most]!);
    for (; code >= 0; code--) {
      if (rest > size[code]! * repeat + beyond) return false;
      if (this.fits(row, column, code)) break;
    }
    if (code < 0) return false;
    if (code > 0) this.put(row, column, code, 1);
    return true;
  }

  private fits(row: number, column: number, code: number): boolean {
    if (this.oneType) return true;
    const { table } = this.frame;
    if (column === row) return this.covers(row, table.selfNeed, code);
    return this.covers(row, table.need, code) && this.covers(column, table.need, table.back[code]!);
  }

  private covers(node: number, need: Int32Array, code: number): boolean {
    const { words, guard } = this.frame.table;
    for (let w = 0; w < words; w++) {
      const mask = guard[w]!;
      if ((((this.left[node * words + w]! | mask) - need[code * words + w]!) & mask) !== mask) return false;
    }
    return true;
  }

  /** Puts (sign 1) or takes away (sign −1) a join. */
  private put(row: number, column: number, code: number, sign: 1 | -1): void {
    const { n, table, matrix } = this.frame;
    const value = sign > 0 ? code : 0;
    if (row === column) {
      matrix[row * n + row] = value;
      this.open[row]! -= sign * table.selfSize[code]!;
      this.take(row, table.selfNeed, code, sign);
      return;
    }
    const back = table.back[code]!;
    matrix[row * n + column] = value;
    matrix[column * n + row] = sign > 0 ? back : 0;
    this.open[row]! -= sign * table.size[code]!;
    this.open[column]! -= sign * table.size[code]!;
    this.take(row, table.need, code, sign);
    this.take(column, table.need, back, sign);
  }

  private take(node: number, need: Int32Array, code: number, sign: number): void {
    if (this.oneType) return;
    const { words } = this.frame.table;
    for (let w = 0; w < words; w++) this.left[node * words + w]! -= sign * need[code * words + w]!;
  }

  private clear(row: number): void {
    const { n, matrix } = this.frame;
    for (let c = row; c < n; c++) {
      const code = matrix[row * n + c]!;
      if (code !== 0) this.put(row, c, code, -1);
    }
  }

  /** Tests a complete row and prepares the next; a number > row to go on, else the row to go back to. */
  private finish(row: number): number {
    const { n } = this.frame;
    if (!this.component.admits(row, this.open)) return row;
    if (this.bridge && !this.bridge.admits(row, this.open)) return row;
    if (!this.canonicity.enter(row)) return this.canonicity.restsOn;
    if (row + 1 === n) return this.canonicity.isCanonical() ? n : this.canonicity.restsOn;
    this.split(row);
    this.openRow(row + 1);
    return row + 1;
  }

  /** Columns after the row: alike as long as they were and have the same entry; what their self-joins may be. */
  private split(row: number): void {
    const { n, runEnd, matrix } = this.frame;
    const base = row * n;
    const next = base + n;
    for (let j = n - 1; j > row; j--) {
      const alike = j + 1 < runEnd[base + j]! && matrix[base + j] === matrix[base + j + 1];
      runEnd[next + j] = alike ? runEnd[next + j + 1]! : j + 1;
      const cap = this.selfCap[base + j]!;
      this.selfCap[next + j] = j < runEnd[base + row]! ? Math.min(cap, matrix[base + row]!) : cap;
    }
  }

  private openRow(row: number): void {
    const { n } = this.frame;
    const base = row * (n + 1);
    this.after[base + n] = 0;
    for (let j = n - 1; j >= row; j--) this.after[base + j] = this.after[base + j + 1]! + this.open[j]!;
  }
}

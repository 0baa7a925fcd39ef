import type { Components, Frame } from './frame.ts';

/**
 * Notices a component that is finished too early: in `connected` one that is not everything, in `noVacuum` one without an
 * external point.
 *
 * Nodes that the finished rows own or have joined are "touched". While the touched nodes hang together one look at the open
 * half-lines decides; otherwise the component of the last row is walked through.
 */
export class ComponentTest {
  private readonly frame: Frame;
  private readonly components: Components;
  /** whole[r]: after row r the touched nodes are one component. */
  private readonly whole: Uint8Array;
  /** seen[v] === stamp: met in this walk. */
  private readonly seen: Int32Array;
  private readonly stack: Int32Array;
  private stamp = 0;

  constructor(frame: Frame, components: Components) {
    this.frame = frame;
    this.components = components;
    this.whole = new Uint8Array(frame.n);
    this.seen = new Int32Array(frame.n);
    this.stack = new Int32Array(frame.n);
  }

  /**
   * Whether the component of the finished row r is still open or may stand. open: half-lines left at each node.
   * O(n) while the touched nodes are one component, else O(n²).
   */
  admits(r: number, open: Int32Array): boolean {
    const { n, external, table } = this.frame;
    if (this.components === 'any') return true;
    // Where a component had closed before the last row, it was refused then.
    if (this.components === 'connected' && r === n - 1) return true;
    if (r > 0 && (this.whole[r - 1] === 0 || !this.touchedBefore(r))) return this.walk(r, open);
    this.whole[r] = 1;
    if (this.components === 'noVacuum') return external > 0;
    let untouched = false;
    for (let v = r + 1; v < n; v++) {
      if (open[v] === table.degree[v]) untouched = true;
      else if (open[v]! > 0) return true;
    }
    return !untouched;
  }

  private touchedBefore(r: number): boolean {
    const { n, matrix } = this.frame;
    for (let v = 0; v < r; v++) if (matrix[r * n + v] !== 0) return true;
    return false;
  }

  private walk(r: number, open: Int32Array): boolean {
    const { n, external, matrix } = this.frame;
    const { seen, stack } = this;
    const stamp = ++this.stamp;
    stack[0] = r;
    seen[r] = stamp;
    let members = 1;
    let leftOver = open[r]! > 0;
    let legged = r < external;
    for (let size = 1; size > 0; ) {
      const base = stack[--size]! * n;
      for (let u = 0; u < n; u++) {
        if (matrix[base + u] === 0 || seen[u] === stamp) continue;
        seen[u] = stamp;
        stack[size++] = u;
        members++;
        if (open[u]! > 0) leftOver = true;
        if (u < external) legged = true;
      }
    }
    this.whole[r] = members === this.touched(r, open) ? 1 : 0;
    if (leftOver) return true;
    return this.components === 'noVacuum' ? legged : members === n;
  }

  private touched(r: number, open: Int32Array): number {
    const { n, table } = this.frame;
    let count = r + 1;
    for (let v = r + 1; v < n; v++) if (open[v] !== table.degree[v]) count++;
    return count;
  }
}

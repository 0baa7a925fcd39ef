import type { Components, Frame } from './frame.ts';

/** Notices a component that is finished too early: in `connected` one that is not everything, in `noVacuum` one without a point. */
export class ComponentTest {
  private readonly seen: Uint8Array;
  private readonly stack: Int32Array;

  constructor(
    private readonly frame: Frame,
    private readonly components: Components,
  ) {
    this.seen = new Uint8Array(frame.n);
    this.stack = new Int32Array(frame.n);
  }

  /**
   * Whether the component of the finished row r is still open or may stand. open: half-lines left at each node. O(n²) for a
   * component that has closed, O(n) for most others.
   */
  admits(r: number, open: Int32Array): boolean {
    const { n, matrix } = this.frame;
    if (this.components === 'any') return true;
    // Where a component had closed before the last row, it was refused then.
    if (this.components === 'connected' && r === n - 1) return true;
    for (let v = r + 1; v < n; v++) if (matrix[r * n + v] !== 0 && open[v]! > 0) return true;
    return this.flood(r, open);
  }

  private flood(r: number, open: Int32Array): boolean {
    const { n, external, matrix } = this.frame;
    const { seen, stack } = this;
    const noVacuum = this.components === 'noVacuum';
    seen.fill(0);
    stack[0] = r;
    seen[r] = 1;
    let members = 1;
    for (let size = 1; size > 0; ) {
      const v = stack[--size]!;
      if (open[v]! > 0 || (noVacuum && v < external)) return true;
      for (let u = 0; u < n; u++) {
        if (matrix[v * n + u] === 0 || seen[u] === 1) continue;
        seen[u] = 1;
        members++;
        stack[size++] = u;
      }
    }
    return !noVacuum && members === n;
  }
}

import type { Frame } from './frame.ts';

/**
 * Notices lines between vertices that will be bridges whatever comes: one side of the line has no half-line left; or a
 * component has a single half-line left, whose line will be one. After the last row no bridge is left unnoticed.
 *
 * @see R. E. Tarjan, Inf. Process. Lett. 2 (1974) 160 (bridges by depth-first numbers).
 */
export class BridgeTest {
  private readonly frame: Frame;
  private readonly number: Int32Array;
  private readonly mark: Int32Array;
  private stamp = 0;
  private counter = 0;
  /** Half-lines left in the component walked through. */
  private total = 0;
  /** left[v]: half-lines left in the tree below v. */
  private readonly left: Int32Array;
  private readonly low: Int32Array;
  /** Vertices whose line to their parent in the tree is a bridge. */
  private readonly below: Int32Array;
  private bridges = 0;

  constructor(frame: Frame) {
    this.frame = frame;
    const { n } = frame;
    this.number = new Int32Array(n);
    this.mark = new Int32Array(n);
    this.left = new Int32Array(n);
    this.low = new Int32Array(n);
    this.below = new Int32Array(n);
  }

  /** Whether the component of the finished row r can still lose every bridge. O(n²). */
  admits(r: number, open: Int32Array): boolean {
    const { n, external } = this.frame;
    if (r < external) return true;
    this.stamp++;
    this.counter = 0;
    this.bridges = 0;
    this.total = 0;
    this.visit(r, -1, open);
    if (this.total === 1 && n - external > 1) return false;
    for (let i = 0; i < this.bridges; i++) {
      const side = this.left[this.below[i]!]!;
      if (side === 0 || side === this.total) return false;
    }
    return true;
  }

  private visit(v: number, parent: number, open: Int32Array): void {
    const { n, external, matrix, table } = this.frame;
    this.mark[v] = this.stamp;
    this.number[v] = this.counter++;
    this.low[v] = this.number[v]!;
    this.left[v] = open[v]!;
    this.total += open[v]!;
    for (let u = external; u < n; u++) {
      const code = matrix[v * n + u]!;
      if (code === 0 || u === v || (u === parent && table.size[code] === 1)) continue;
      if (this.mark[u] === this.stamp) {
        this.low[v] = Math.min(this.low[v]!, this.number[u]!);
        continue;
      }
      this.visit(u, v, open);
      this.left[v]! += this.left[u]!;
      this.low[v] = Math.min(this.low[v]!, this.low[u]!);
      if (this.low[u]! > this.number[v]!) this.below[this.bridges++] = u;
    }
  }
}

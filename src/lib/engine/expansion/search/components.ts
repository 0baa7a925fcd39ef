import type { Components, Frame } from './frame.ts';

/**
 * Components of the part made by the finished rows: labels[r·n + v] after rows 0…r−1, each label the least node of its
 * component.
 */
export class ComponentTrack {
  private readonly labels: Int32Array;

  constructor(
    private readonly frame: Frame,
    private readonly components: Components,
  ) {
    const { n } = frame;
    this.labels = new Int32Array((n + 1) * n);
    for (let v = 0; v < n; v++) this.labels[v] = v;
  }

  /** Takes in row r; false when the component of r has no half-line left and is one that is not admitted. O(n · lines of r). */
  close(r: number, left: Int32Array): boolean {
    const { n, external, matrix } = this.frame;
    const { labels } = this;
    const base = r * n;
    const next = base + n;
    for (let v = 0; v < n; v++) labels[next + v] = labels[base + v]!;
    for (let v = r + 1; v < n; v++) {
      if (matrix[base + v] === 0) continue;
      const a = labels[next + r]!;
      const b = labels[next + v]!;
      if (a === b) continue;
      const low = Math.min(a, b);
      for (let u = 0; u < n; u++) if (labels[next + u] === a || labels[next + u] === b) labels[next + u] = low;
    }
    if (this.components === 'any') return true;
    const own = labels[next + r]!;
    if (this.components === 'noVacuum' && own < external) return true;
    let members = 0;
    for (let v = 0; v < n; v++) {
      if (labels[next + v] !== own) continue;
      if (left[v]! > 0) return true;
      members++;
    }
    return this.components === 'connected' && members === n;
  }
}

/**
 * Exponents of multivariate exponential generating series, interned as small integers.
 *
 * A series Σ a(m) x^m/m! over multi-indices m multiplies by a(m) = Σ over splits m = m' + m'' of ∏ C(m_i, m'_i) a'(m') a''(m''):
 * the number of ways to deal labelled objects onto two factors. This class gives each multi-index an id and keeps the list of its
 * splits with their binomials, so that every product, logarithm and exponential of the ledger is a loop over a list.
 */
export interface Splits {
  readonly left: readonly number[];
  readonly right: readonly number[];
  /** ways[i] = ∏ C(m_j, left_j). */
  readonly ways: readonly bigint[];
}

interface MutableSplits {
  left: number[];
  right: number[];
  ways: bigint[];
}

/** C(n, k) for 0 ≤ k ≤ n, exact; each step of the product is an integer. */
export function binomial(n: number, k: number): bigint {
  let value = 1n;
  for (let i = 1; i <= k; i++) value = (value * BigInt(n - k + i)) / BigInt(i);
  return value;
}

export class SeriesIndex {
  /** The id of the zero index. */
  readonly zero = 0;
  private readonly ids = new Map<string, number>();
  private readonly vectors: (readonly number[])[] = [];
  private readonly totals: number[] = [];
  private readonly allSplits = new Map<number, Splits>();
  private readonly rootedSplits = new Map<number, Splits>();
  private readonly sums = new Map<number, number>();

  /** `charge` hears the number of splits of an index before they are listed, and may throw to forbid it. */
  constructor(
    readonly dimension: number,
    private readonly charge: (splits: number) => void = () => {},
  ) {
    this.id(new Array<number>(dimension).fill(0));
  }

  /** The id of a multi-index; equal vectors have equal ids. Components must be below 65 536. */
  id(vector: readonly number[]): number {
    const key = String.fromCharCode(...vector);
    const known = this.ids.get(key);
    if (known !== undefined) return known;
    const id = this.vectors.length;
    this.ids.set(key, id);
    this.vectors.push([...vector]);
    this.totals.push(vector.reduce((sum, entry) => sum + entry, 0));
    return id;
  }

  vector(id: number): readonly number[] {
    return this.vectors[id]!;
  }

  /** |m|: the sum of the components. */
  total(id: number): number {
    return this.totals[id]!;
  }

  /** How many indices have an id: what the tables of a series are charged for. */
  get size(): number {
    return this.vectors.length;
  }

  /** The id of the i-th unit index. */
  unit(i: number): number {
    const vector = new Array<number>(this.dimension).fill(0);
    vector[i] = 1;
    return this.id(vector);
  }

  /** The id of a + b. Cached. */
  add(a: number, b: number): number {
    if (a === this.zero) return b;
    if (b === this.zero) return a;
    const key = a < b ? a * 0x4000000 + b : b * 0x4000000 + a;
    let sum = this.sums.get(key);
    if (sum === undefined) {
      const other = this.vectors[b]!;
      sum = this.id(this.vectors[a]!.map((entry, i) => entry + other[i]!));
      this.sums.set(key, sum);
    }
    return sum;
  }

  /** The first component that is not zero, or −1: where the root label of m sits. */
  root(id: number): number {
    return this.vectors[id]!.findIndex((entry) => entry > 0);
  }

  /** Every split m = left + right, ∏ (m_i + 1) of them. Cached. */
  splits(id: number): Splits {
    let splits = this.allSplits.get(id);
    if (!splits) {
      splits = this.enumerate(this.vectors[id]!);
      this.allSplits.set(id, splits);
    }
    return splits;
  }

  /**
   * The splits with the root label (one chosen label of component `root(id)`) on the left: ways = C(m_r − 1, left_r − 1) ∏_{i≠r} C(m_i, left_i).
   * Summing "the part that holds the root" times "the rest" gives logarithms and exponentials without division. Empty for m = 0. Cached.
   */
  rooted(id: number): Splits {
    let splits = this.rootedSplits.get(id);
    if (!splits) {
      splits = this.restrictToRoot(id);
      this.rootedSplits.set(id, splits);
    }
    return splits;
  }

  private restrictToRoot(id: number): Splits {
    const root = this.root(id);
    const result: MutableSplits = { left: [], right: [], ways: [] };
    if (root < 0) return result;
    const whole = BigInt(this.vectors[id]![root]!);
    const all = this.splits(id);
    for (let i = 0; i < all.left.length; i++) {
      const inLeft = this.vectors[all.left[i]!]![root]!;
      if (inLeft === 0) continue;
      result.left.push(all.left[i]!);
      result.right.push(all.right[i]!);
      result.ways.push((all.ways[i]! * BigInt(inLeft)) / whole);
    }
    return result;
  }

  private enumerate(vector: readonly number[]): Splits {
    this.charge(vector.reduce((product, entry) => product * (entry + 1), 1));
    const result: MutableSplits = { left: [], right: [], ways: [] };
    const left = new Array<number>(this.dimension).fill(0);
    const right = [...vector];
    const support = vector.flatMap((entry, i) => (entry > 0 ? [i] : []));
    const descend = (depth: number, ways: bigint): void => {
      if (depth === support.length) {
        result.left.push(this.id(left));
        result.right.push(this.id(right));
        result.ways.push(ways);
        return;
      }
      const i = support[depth]!;
      const whole = vector[i]!;
      for (let k = 0; k <= whole; k++) {
        left[i] = k;
        right[i] = whole - k;
        descend(depth + 1, k === 0 || k === whole ? ways : ways * binomial(whole, k));
      }
      left[i] = 0;
      right[i] = whole;
    };
    descend(0, 1n);
    return result;
  }
}

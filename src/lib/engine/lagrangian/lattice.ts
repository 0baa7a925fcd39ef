/** A vector of integers. */
export type Integers = readonly bigint[];

/** The greatest common divisor g = x·a + y·b with its cofactors. */
function bezout(a: bigint, b: bigint): { g: bigint; x: bigint; y: bigint } {
  let [r, s] = [a, b];
  let [x, nextX] = [1n, 0n];
  let [y, nextY] = [0n, 1n];
  while (s !== 0n) {
    const q = r / s;
    [r, s] = [s, r - q * s];
    [x, nextX] = [nextX, x - q * nextX];
    [y, nextY] = [nextY, y - q * nextY];
  }
  return r < 0n ? { g: -r, x: -x, y: -y } : { g: r, x, y };
}

const combine = (a: Integers, x: bigint, b: Integers, y: bigint): bigint[] =>
  a.map((value, i) => x * value + y * b[i]!);

/**
 * A basis of the lattice spanned by integer vectors, in row echelon form (Hermite's reduction, one vector at a time).
 * O(vectors × size²) operations on integers; stops early once the lattice holds every vector.
 */
export function echelonBasis(size: number, vectors: Iterable<Integers>): bigint[][] {
  const pivots: (bigint[] | null)[] = new Array<null>(size).fill(null);
  const isWhole = (): boolean => pivots.every((row, i) => row !== null && (row[i] === 1n || row[i] === -1n));
  for (const vector of vectors) {
    let rest = [...vector];
    for (let column = 0; column < size; column++) {
      const b = rest[column]!;
      if (b === 0n) continue;
      const pivot = pivots[column];
      if (!pivot) {
        pivots[column] = rest;
        break;
      }
      const a = pivot[column]!;
      const { g, x, y } = bezout(a, b);
      if (b % a === 0n) rest = combine(rest, 1n, pivot, -(b / a));
      else {
        pivots[column] = combine(pivot, x, rest, y);
        rest = combine(rest, a / g, pivot, -(b / g));
      }
    }
    if (isWhole()) break;
  }
  return pivots.filter((row) => row !== null);
}

/** A homomorphism from integer vectors to phases: v ↦ v·exponents / order (order 0: to the integers, v ↦ v·exponents). */
export interface Character {
  readonly exponents: Integers;
  readonly order: bigint;
}

const absolute = (n: bigint): bigint => (n < 0n ? -n : n);

/** Position of the entry of least size in the block from `at`, or null when the block is zero. */
function leastEntry(rows: readonly Integers[], at: number): [number, number] | null {
  let best: [number, number] | null = null;
  for (let i = at; i < rows.length; i++)
    for (let j = at; j < rows[i]!.length; j++) {
      const size = absolute(rows[i]![j]!);
      if (size !== 0n && (best === null || size < absolute(rows[best[0]]![best[1]]!))) best = [i, j];
    }
  return best;
}

/** A column of a matrix of rows replaced by itself less q times another. */
function subtractColumn(rows: readonly bigint[][], column: number, from: number, q: bigint): void {
  for (const row of rows) row[column] = row[column]! - q * row[from]!;
}

function swapColumns(rows: readonly bigint[][], i: number, j: number): void {
  for (const row of rows) [row[i], row[j]] = [row[j]!, row[i]!];
}

/** Clears row and column `at` beside the pivot; false when a remainder is left that makes a smaller pivot. */
function cleared(rows: bigint[][], columns: bigint[][], at: number): boolean {
  const pivot = rows[at]![at]!;
  let clean = true;
  for (let i = at + 1; i < rows.length; i++) {
    rows[i] = combine(rows[i]!, 1n, rows[at]!, -(rows[i]![at]! / pivot));
    clean &&= rows[i]![at] === 0n;
  }
  for (let j = at + 1; j < columns.length; j++) {
    const q = rows[at]![j]! / pivot;
    subtractColumn(rows, j, at, q);
    subtractColumn(columns, j, at, q);
    clean &&= rows[at]![j] === 0n;
  }
  return clean;
}

/**
 * The characters that are trivial on a lattice: a vector lies in the lattice exactly when all of them vanish on it.
 *
 * From Smith's normal form D = U·B·V of a basis B (H. J. S. Smith, Phil. Trans. R. Soc. 151 (1861) 293): column j of V is a character of order
 * d_j, of infinite order (0) beyond the rank. Characters of order 1 are left out. O(size³) operations on integers for each pivot at most.
 */
export function annihilator(size: number, basis: readonly Integers[]): Character[] {
  const rows = basis.map((row) => [...row]);
  const columns = Array.from({ length: size }, (_, i) => Array.from({ length: size }, (_, j) => (i === j ? 1n : 0n)));
  for (let at = 0; at < rows.length; ) {
    const least = leastEntry(rows, at);
    if (!least) break;
    [rows[at], rows[least[0]]] = [rows[least[0]]!, rows[at]!];
    swapColumns(rows, at, least[1]);
    swapColumns(columns, at, least[1]);
    if (cleared(rows, columns, at)) at++;
  }
  return Array.from({ length: size }, (_, j): Character => {
    const order = absolute(rows[j]?.[j] ?? 0n);
    return { order, exponents: columns.map((row) => row[j]!) };
  }).filter(({ order }) => order !== 1n);
}

/** v·exponents, reduced to 0 … order − 1 for a character of finite order. */
export function charge({ exponents, order }: Character, vector: Integers): bigint {
  const sum = vector.reduce((total, value, i) => total + value * exponents[i]!, 0n);
  return order === 0n ? sum : ((sum % order) + order) % order;
}

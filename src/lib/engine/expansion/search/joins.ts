import type { Theory } from '../../graph/theory.ts';

/** Bits of a packed word; the sign bit stays free. */
const WORD = 30;

/**
 * Everything two nodes can be joined by, as small integers that compare like the joins: more lines first, then more of the
 * smaller half-line types. Half-lines of all types are packed into words with one guard bit per type, so that "fits" is a
 * subtraction and a mask.
 */
export interface JoinTable {
  /** Words per packed count. */
  readonly words: number;
  readonly guard: Int32Array;
  /** Between two nodes: code 0 is nothing. need: half-lines taken from the row's node; back: the code seen from the other. */
  readonly need: Int32Array;
  readonly size: Int32Array;
  readonly back: Int32Array;
  /** counts[code][h]: half-lines of type h taken from the row's node. */
  readonly counts: readonly (readonly number[])[];
  /** top[s]: the largest code of at most s lines. */
  readonly top: Int32Array;
  /** The same for a node joined to itself; sizes are half-lines. A complex line counts under both of its types. */
  readonly selfNeed: Int32Array;
  readonly selfSize: Int32Array;
  readonly selfCounts: readonly (readonly number[])[];
  readonly selfTop: Int32Array;
  /** Packed half-lines of each node, and their number. */
  readonly halfLines: Int32Array;
  readonly degree: Int32Array;
}

type Counts = readonly number[];

const total = (counts: Counts): number => counts.reduce((sum, count) => sum + count, 0);

/** Ascending: fewer lines first, then fewer of the first type in which they differ. */
function byRank(a: Counts, b: Counts): number {
  const difference = total(a) - total(b);
  if (difference !== 0) return difference;
  const at = a.findIndex((count, h) => count !== b[h]);
  return at < 0 ? 0 : a[at]! - b[at]!;
}

/** All count vectors within a bound, in no order. */
function within(bound: Counts): Counts[] {
  return bound.reduce<number[][]>(
    (found, most) => found.flatMap((counts) => Array.from({ length: most + 1 }, (_, m) => [...counts, m])),
    [[]],
  );
}

function distinct(all: readonly Counts[]): Counts[] {
  return [...new Map(all.map((counts) => [counts.join(), counts])).values()].sort(byRank);
}

/** Where each type stands in the packed words. */
interface Layout {
  readonly word: readonly number[];
  readonly shift: readonly number[];
  readonly words: number;
  readonly guard: Int32Array;
}

/** most[h]: the largest count of type h that is to be packed. */
function layout(most: Counts): Layout {
  const word: number[] = [];
  const shift: number[] = [];
  const guards: number[] = [0];
  let used = 0;
  for (const count of most) {
    const bits = 33 - Math.clz32(Math.max(count, 1));
    if (used + bits > WORD) {
      guards.push(0);
      used = 0;
    }
    word.push(guards.length - 1);
    shift.push(used);
    guards[guards.length - 1]! |= 1 << (used + bits - 1);
    used += bits;
  }
  return { word, shift, words: guards.length, guard: Int32Array.from(guards) };
}

function pack(list: readonly Counts[], { word, shift, words }: Layout): Int32Array {
  const packed = new Int32Array(list.length * words);
  list.forEach((counts, i) => {
    counts.forEach((count, h) => {
      packed[i * words + word[h]!]! += count << shift[h]!;
    });
  });
  return packed;
}

/** Entry s: the largest code of size ≤ s. */
function largestWithin(size: Int32Array, most: number): Int32Array {
  return Int32Array.from({ length: most + 1 }, (_, s) => {
    let code = size.length - 1;
    while (size[code]! > s) code--;
    return code;
  });
}

function selfJoins(nodeTypes: readonly Counts[], { partner }: Theory): Counts[] {
  const bounds = nodeTypes.map((counts) =>
    counts.map((count, h) => {
      if (partner[h] === h) return count >> 1;
      return h < partner[h]! ? Math.min(count, counts[partner[h]!]!) : 0;
    }),
  );
  const doubled = (counts: Counts): Counts =>
    counts.map((count, h) => (partner[h] === h ? 2 * count : Math.max(count, counts[partner[h]!]!)));
  return distinct(bounds.flatMap((bound) => within(bound).map(doubled)));
}

/**
 * Tables for nodes with the given half-lines. At most ∏ (min(a_h, b_partner) + 1) codes for each pair of unlike nodes a, b.
 */
export function joinTable(nodes: readonly Counts[], theory: Theory): JoinTable {
  const { partner } = theory;
  const unlike = distinct(nodes);
  const between = distinct([
    partner.map(() => 0),
    ...unlike.flatMap((a) => unlike.flatMap((b) => within(a.map((count, h) => Math.min(count, b[partner[h]!]!))))),
  ]);
  const own = distinct([partner.map(() => 0), ...selfJoins(unlike, theory)]);
  const places = layout(partner.map((_, h) => Math.max(0, ...nodes.map((counts) => counts[h]!))));
  const rank = new Map(between.map((counts, code) => [counts.join(), code]));
  const degree = Int32Array.from(nodes, total);
  const size = Int32Array.from(between, total);
  const selfSize = Int32Array.from(own, total);
  const most = degree.reduce((a, b) => Math.max(a, b), 0);
  return {
    words: places.words,
    guard: places.guard,
    need: pack(between, places),
    size,
    back: Int32Array.from(between, (counts) => rank.get(partner.map((h) => counts[h]).join())!),
    counts: between,
    top: largestWithin(size, most),
    selfNeed: pack(own, places),
    selfSize,
    selfCounts: own,
    selfTop: largestWithin(selfSize, most),
    halfLines: pack(nodes, places),
    degree,
  };
}

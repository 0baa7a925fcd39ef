import type { ComponentSum } from './components.ts';
import type { CountingSpace } from './space.ts';

/** Sums over diagrams of several components, by loop number: index L holds the contractions with L loops (index 0 holds all when loops are not asked for). */
export type ByLoops = readonly bigint[];

/**
 * Puts components together: the exponential of the sum over components, graded by loops where asked.
 *
 * The component that holds the root is dealt with first (root: the first external point; without points the first vertex), the rest is
 * again a set of components. With `vacuum` false only components with external points occur, as in Z[J]/Z[0].
 * Loops add over components; one with m ≠ 0 has L = I − V + 1, I = half of the half-lines at vertices that no external point takes.
 */
export function assemble(
  space: CountingSpace,
  component: ComponentSum,
  options: { readonly vacuum: boolean; readonly byLoops: boolean },
): (m: number, g: number) => ByLoops {
  const { contents, legs } = space;
  const known = new Map<number, ByLoops>();
  const loops = (m: number, g: number): number => {
    if (!options.byLoops || m === contents.zero) return 0;
    const halfLines = space.halfLines(m).reduce((sum, n) => sum + n, 0);
    return (halfLines - legs.total(g)) / 2 - contents.total(m) + 1;
  };
  const compute = (m: number, g: number): ByLoops => {
    const value: bigint[] = [];
    const outer = g === legs.zero ? contents.rooted(m) : contents.splits(m);
    for (let i = 0; i < outer.left.length; i++) {
      const part = outer.left[i]!;
      const inner = g === legs.zero ? space.legSplits(g, part) : space.rootedLegSplits(g, part);
      space.spend(inner.left.length + 1);
      for (let j = 0; j < inner.left.length; j++) {
        const points = inner.left[j]!;
        const sum = component(part, points);
        if (sum === 0n) continue;
        const shift = loops(part, points);
        at(outer.right[i]!, inner.right[j]!).forEach((rest, l) => {
          if (rest !== 0n) value[l + shift] = (value[l + shift] ?? 0n) + outer.ways[i]! * inner.ways[j]! * sum * rest;
        });
      }
    }
    return Array.from(value, (entry) => entry ?? 0n);
  };
  const at = (m: number, g: number): ByLoops => {
    if (m === contents.zero && g === legs.zero) return [1n];
    if (!space.balanced(m, g) || (g === legs.zero && !options.vacuum)) return [];
    const key = space.cell(m, g);
    let value = known.get(key);
    if (!value) {
      value = compute(m, g);
      known.set(key, value);
    }
    return value;
  };
  return at;
}

/** Z[J]/Z[0] at content m: Z less every way to set aside vertices that form components of their own. */
export function normalise(space: CountingSpace, full: ComponentSum): ComponentSum {
  const { contents, legs } = space;
  const known = new Map<number, bigint>();
  const ratio: ComponentSum = (m, g) => {
    if (!space.balanced(m, g)) return 0n;
    const key = space.cell(m, g);
    let value = known.get(key);
    if (value === undefined) {
      value = full(m, g);
      const splits = contents.splits(m);
      space.spend(splits.left.length);
      for (let i = 0; i < splits.left.length; i++)
        if (splits.left[i] !== m)
          value -= splits.ways[i]! * ratio(splits.left[i]!, g) * full(splits.right[i]!, legs.zero);
      known.set(key, value);
    }
    return value;
  };
  return ratio;
}

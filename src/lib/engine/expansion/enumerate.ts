import { factorial } from '../exact/combinatorics.ts';
import type { CountedDiagram, Line } from '../graph/diagram.ts';
import type { Content, Theory } from '../graph/theory.ts';

/** interim: fill matrix row by row, refine columns, final canonicity test counts automorphisms */
export function* enumerateContent(
  theory: Theory,
  legs: readonly number[],
  content: Content,
  options: { components: 'any' | 'noVacuum' | 'connected'; stop?: () => boolean },
): Generator<CountedDiagram> {
  const { partner } = theory;
  const H = partner.length;
  const E = legs.length;
  const kinds: number[] = [];
  content.forEach((n, k) => {
    for (let i = 0; i < n; i++) kinds.push(k);
  });
  const N = E + kinds.length;
  if (N === 0) {
    if (options.components !== 'connected') yield { kinds: [], legs: [], lines: [], symmetryFactor: 1n };
    return;
  }
  const colour = [...legs.map((_, i) => i), ...kinds.map((k) => E + k)];
  const rem: number[][] = [];
  for (const l of legs) {
    const v = new Array(H).fill(0);
    v[l] = 1;
    rem.push(v);
  }
  for (const k of kinds) rem.push([...theory.kinds[k]!]);
  const M: number[][][] = Array.from({ length: N }, () => Array.from({ length: N }, () => new Array(H).fill(0)));
  const cmp = (a: number[], b: number[]): number => {
    for (let h = 0; h < H; h++) if (a[h] !== b[h]) return a[h]! - b[h]!;
    return 0;
  };
  // canonical test: returns 0 if some permutation gives greater, else number of automorphisms
  const canon = (): number => {
    let autos = 0;
    let ok = true;
    const perm: number[] = [];
    const used = new Array(N).fill(false);
    const rec = (pos: number): void => {
      if (!ok) return;
      if (pos === N) {
        autos++;
        return;
      }
      for (let v = 0; v < N && ok; v++) {
        if (used[v] || colour[v] !== colour[pos]) continue;
        // compare column entries (i,pos) i<=pos under column-major order
        let c = 0;
        for (let i = 0; i < pos && c === 0; i++) c = cmp(M[perm[i]!]![v]!, M[i]![pos]!);
        if (c === 0) c = cmp(M[v]![v]!, M[pos]![pos]!);
        if (c > 0) {
          ok = false;
          return;
        }
        if (c < 0) continue;
        used[v] = true;
        perm.push(v);
        rec(pos + 1);
        perm.pop();
        used[v] = false;
      }
    };
    rec(0);
    return ok ? autos : 0;
  };
  const connected = (): { count: number; vacuum: boolean } => {
    const of = new Array(N).fill(-1);
    let count = 0;
    let vacuum = false;
    for (let s = 0; s < N; s++) {
      if (of[s] >= 0) continue;
      let legged = false;
      const st = [s];
      of[s] = count;
      while (st.length) {
        const x = st.pop()!;
        if (x < E) legged = true;
        for (let y = 0; y < N; y++)
          if (of[y] < 0 && (M[x]![y]!.some((m) => m > 0) || M[y]![x]!.some((m) => m > 0))) {
            of[y] = count;
            st.push(y);
          }
      }
      if (!legged) vacuum = true;
      count++;
    }
    return { count, vacuum };
  };
  // column-major fill: column j entries (0..j, j); vertex j's entries to earlier nodes and itself
  const need = (from: number): boolean => {
    void from;
    return true;
  };
  function* fill(i: number, j: number): Generator<CountedDiagram> {
    if (j === N) {
      if (rem.some((r) => r.some((x) => x > 0))) return;
      const autos = canon();
      if (autos === 0) return;
      const { count, vacuum } = connected();
      if (options.components === 'connected' && count !== 1) return;
      if (options.components === 'noVacuum' && vacuum) return;
      yield emit(autos);
      return;
    }
    if (i > j) {
      // node j's earlier capacity: later nodes must be able to absorb
      yield* fill(0, j + 1);
      return;
    }
    yield* entry(i, j, 0);
  }
  function* entry(i: number, j: number, h: number): Generator<CountedDiagram> {
    if (h === H) {
      if (!need(j)) return;
      yield* fill(i + 1, j);
      return;
    }
    const p = partner[h]!;
    if (i === j) {
      if (p < h) {
        M[i]![i]![h] = M[i]![i]![p]!;
        yield* entry(i, j, h + 1);
        return;
      }
      const max = p === h ? Math.floor(rem[i]![h]! / 2) : Math.min(rem[i]![h]!, rem[i]![p]!);
      for (let m = max; m >= 0; m--) {
        M[i]![i]![h] = m;
        rem[i]![h]! -= m;
        rem[i]![p]! -= m;
        yield* entry(i, j, h + 1);
        rem[i]![h]! += m;
        rem[i]![p]! += m;
        M[i]![i]![h] = 0;
      }
      return;
    }
    const max = Math.min(rem[i]![h]!, rem[j]![p]!);
    for (let m = max; m >= 0; m--) {
      M[i]![j]![h] = m;
      M[j]![i]![p] = m;
      rem[i]![h]! -= m;
      rem[j]![p]! -= m;
      yield* entry(i, j, h + 1);
      M[i]![j]![h] = 0;
      M[j]![i]![p] = 0;
      rem[i]![h]! += m;
      rem[j]![p]! += m;
    }
  }
  const emit = (autos: number): CountedDiagram => {
    let s = BigInt(autos);
    const lines: Line[] = [];
    const outLegs = new Array(E).fill(0);
    for (let i = 0; i < N; i++)
      for (let j = i; j < N; j++)
        for (let h = 0; h < H; h++) {
          const m = M[i]![j]![h]!;
          if (m === 0) continue;
          const p = partner[h]!;
          if (i === j) {
            if (p < h) continue;
            s *= factorial(m) * (p === h ? 2n ** BigInt(m) : 1n);
            for (let q = 0; q < m; q++) lines.push({ from: i - E, to: i - E, type: h });
            continue;
          }
          if (i >= E) s *= factorial(m);
          for (let q = 0; q < m; q++) {
            if (i < E && j < E) {
              outLegs[i] = -1 - j;
              outLegs[j] = -1 - i;
            } else if (i < E) outLegs[i] = j - E;
            else if (h <= p)
              lines.push(h === p ? { from: i - E, to: j - E, type: h } : { from: j - E, to: i - E, type: h });
            else lines.push({ from: i - E, to: j - E, type: p });
          }
        }
    return { kinds: [...kinds], legs: outLegs, lines, symmetryFactor: s };
  };
  yield* fill(0, 0);
}

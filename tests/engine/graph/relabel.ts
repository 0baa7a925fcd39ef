import type { Diagram } from '#engine/graph/diagram.ts';
import type { Theory } from '#engine/graph/theory.ts';

/** A seeded generator of integers below n (mulberry32), so that a failing case can be repeated. */
export function seeded(seed: number): (n: number) => number {
  let state = seed;
  return (n) => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return Math.floor((((t ^ (t >>> 14)) >>> 0) / 2 ** 32) * n);
  };
}

export function shuffled<T>(items: readonly T[], below: (n: number) => number): T[] {
  const out = [...items];
  for (let i = out.length - 1; i > 0; i--) {
    const j = below(i + 1);
    [out[i], out[j]] = [out[j]!, out[i]!];
  }
  return out;
}

/** The same diagram with its vertices numbered and its lines ordered at random, real lines turned round. */
export function relabelled(diagram: Diagram, theory: Theory, below: (n: number) => number): Diagram {
  const to = shuffled(
    diagram.kinds.map((_, v) => v),
    below,
  );
  const kinds: number[] = [];
  diagram.kinds.forEach((kind, v) => {
    kinds[to[v]!] = kind;
  });
  const lines = diagram.lines.map((line) => {
    const [from, end] = [to[line.from]!, to[line.to]!];
    const real = theory.partner[line.type] === line.type;
    return real && from > end ? { from: end, to: from, type: line.type } : { from, to: end, type: line.type };
  });
  return { kinds, legs: diagram.legs.map((at) => (at >= 0 ? to[at]! : at)), lines: shuffled(lines, below) };
}

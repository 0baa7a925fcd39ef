import type { Drop, Keep, Theory } from '#engine/graph/theory.ts';

/**
 * Every contraction of a small case, one by one, with the definitions of keep and drop applied to each as they are worded: the
 * slow and literal answer that the ledger must reproduce. Shares nothing with the engine but the type Theory.
 */
interface Pairing {
  /** Nodes: vertices 0…V−1, external point k is V + k. */
  readonly vertices: number;
  readonly nodes: number;
  readonly lines: readonly (readonly [number, number])[];
  count: bigint;
}

/** All pairings of the half-lines, equal line lists counted together. */
export function allPairings(theory: Theory, legs: readonly number[], content: readonly number[]): Pairing[] {
  const node: number[] = [];
  const type: number[] = [];
  let vertices = 0;
  content.forEach((n, k) => {
    for (let i = 0; i < n; i++, vertices++)
      theory.kinds[k]!.forEach((valence, h) => {
        for (let j = 0; j < valence; j++) {
          node.push(vertices);
          type.push(h);
        }
      });
  });
  legs.forEach((h, k) => {
    node.push(vertices + k);
    type.push(h);
  });
  const found = new Map<string, Pairing>();
  const lines: [number, number][] = [];
  const used = node.map(() => false);
  const pair = (from: number): void => {
    let first = from;
    while (first < node.length && used[first]) first++;
    if (first === node.length) {
      const key = lines
        .map(([a, b]) => a * 64 + b)
        .sort((a, b) => a - b)
        .join();
      const known = found.get(key);
      if (known) known.count += 1n;
      else found.set(key, { vertices, nodes: vertices + legs.length, lines: lines.map(([a, b]) => [a, b]), count: 1n });
      return;
    }
    used[first] = true;
    for (let second = first + 1; second < node.length; second++) {
      if (used[second] || type[second] !== theory.partner[type[first]!]) continue;
      used[second] = true;
      lines.push([node[first]!, node[second]!]);
      pair(first + 1);
      lines.pop();
      used[second] = false;
    }
    used[first] = false;
  };
  pair(0);
  return [...found.values()];
}

/** Component label of each node; nodes of `without` and the line number `cut` are left out (label −1). */
function labels({ nodes, lines }: Pairing, cut = -1, without = -1): number[] {
  const label = Array.from({ length: nodes }, (_, v) => (v === without ? -1 : v));
  for (let changed = true; changed; ) {
    changed = false;
    lines.forEach(([a, b], i) => {
      if (i === cut || a === without || b === without || label[a] === label[b]) return;
      const low = Math.min(label[a]!, label[b]!);
      label[a] = low;
      label[b] = low;
      changed = true;
    });
  }
  return label;
}

/** Loops of the part with the given label, the lines to node `hinge` included. */
function cycles(p: Pairing, label: readonly number[], part: number, cut = -1, hinge = -1): number {
  const inside = (v: number): boolean => label[v] === part;
  const lines = p.lines.filter(
    ([a, b], i) => i !== cut && (inside(a) || inside(b)) && [a, b].every((v) => inside(v) || v === hinge),
  );
  const size = label.filter((l) => l === part).length + (hinge >= 0 ? 1 : 0);
  return lines.length - size + 1;
}

const hasPoint = (p: Pairing, label: readonly number[], part: number): boolean =>
  label.some((l, v) => l === part && v >= p.vertices);

const isInternal = (p: Pairing, i: number): boolean => p.lines[i]!.every((v) => v < p.vertices);

/** Loops as in the contract: internal lines − vertices + components with a vertex. */
export function loopNumber(p: Pairing): number {
  const label = labels(p);
  const internal = p.lines.filter((_, i) => isInternal(p, i)).length;
  return internal - p.vertices + new Set(label.slice(0, p.vertices)).size;
}

export function isKept(p: Pairing, keep: Keep): boolean {
  const label = labels(p);
  const parts = new Set(label);
  if (keep === 'all') return true;
  if (keep === 'normalised') return [...parts].every((part) => hasPoint(p, label, part));
  if (parts.size !== 1) return false;
  if (keep === 'connected') return true;
  return p.vertices > 0 && p.lines.every((_, i) => !isInternal(p, i) || new Set(labels(p, i)).size === 1);
}

function selfContracted(p: Pairing): boolean {
  return p.lines.some(([a, b]) => a === b);
}

/** Parts cut off by internal line i, where there are more than before. */
function cutOff(p: Pairing, i: number, whole: readonly number[]): { label: number[]; sides: number[] } | null {
  const [a, b] = p.lines[i]!;
  const label = labels(p, i);
  return !isInternal(p, i) || label[a] === label[b] || whole[a] !== whole[b]
    ? null
    : { label, sides: [label[a]!, label[b]!] };
}

function hasTadpole(p: Pairing): boolean {
  const whole = labels(p);
  return p.lines.some((_, i) => {
    const cut = cutOff(p, i, whole);
    return cut?.sides.some((side) => !hasPoint(p, cut.label, side)) ?? false;
  });
}

function hasScaleless(p: Pairing): boolean {
  if (selfContracted(p)) return true;
  const whole = labels(p);
  const atLine = p.lines.some(([a], i) => {
    const cut = cutOff(p, i, whole);
    if (!cut) return false;
    if (!hasPoint(p, whole, whole[a]!)) return true;
    return cut.sides.some((side) => !hasPoint(p, cut.label, side) && cycles(p, cut.label, side, i) > 0);
  });
  if (atLine) return true;
  for (let v = 0; v < p.vertices; v++) {
    const label = labels(p, -1, v);
    const around = new Set(label.filter((_, u) => u !== v && whole[u] === whole[v]));
    if (!hasPoint(p, whole, whole[v]!)) {
      if (around.size > 1) return true;
    } else if ([...around].some((part) => !hasPoint(p, label, part) && cycles(p, label, part, -1, v) > 0)) return true;
  }
  return false;
}

export function isDropped(p: Pairing, drop: readonly Drop[]): boolean {
  return drop.some((filter) =>
    filter === 'self-contractions' ? selfContracted(p) : filter === 'tadpoles' ? hasTadpole(p) : hasScaleless(p),
  );
}

import { LimitError } from '../errors.ts';
import { add, multiply, negate, type Rational, rational, sign } from '../exact/rational.ts';
import type { Content, CountingRequest, Theory } from '../graph/theory.ts';
import { InfiniteOrder } from './infiniteOrder.ts';

/** Vertices of one diagram, and vertex contents of one request, beyond which a request is refused. */
const MOST_VERTICES = 40;
const MOST_CONTENTS = 100_000;

const valence = (kind: readonly number[]): number => kind.reduce((a, b) => a + b, 0);

/** Whether all half-lines can be paired at all: even numbers of a real field, as many φ as φ*. */
function pairable(theory: Theory, legs: readonly number[], content: Content): boolean {
  const total = theory.partner.map(() => 0);
  for (const type of legs) total[type]!++;
  content.forEach((n, kind) => {
    theory.kinds[kind]!.forEach((count, type) => {
      total[type]! += n * count;
    });
  });
  return total.every((count, type) => {
    const partner = theory.partner[type]!;
    return partner === type ? count % 2 === 0 : count === total[partner];
  });
}

class Collector {
  readonly found: number[][] = [];

  constructor(private readonly request: CountingRequest) {}

  add(content: readonly number[]): void {
    if (!pairable(this.request.theory, this.request.legs, content)) return;
    if (this.found.length === MOST_CONTENTS)
      throw new LimitError(
        `The order admits more than ${MOST_CONTENTS} different vertex contents; ask for a lower order.`,
        MOST_CONTENTS,
      );
    this.found.push([...content]);
  }

  checkVertices(n: number): void {
    if (n > MOST_VERTICES)
      throw new LimitError(
        `The order admits diagrams with more than ${MOST_VERTICES} vertices; ask for a lower order.`,
        MOST_VERTICES,
        n,
      );
  }
}

/**
 * For each component of a power order, the sign that every usable kind has in it, if there is one.
 *
 * A kind is unusable when it would push a component past its bound with nothing to bring it back. What remains is finite
 * exactly when components taken one after the other bound every kind: a component in which all remaining kinds have one
 * sign bounds those that are not zero there, and the others must be bounded by further components.
 */
function boundPowers(request: CountingRequest): { usable: boolean[] } {
  const { order, theory } = request;
  if (order.by !== 'powers') throw new TypeError('powers expected');
  const { weights, bound, through } = order;
  const usable = theory.kinds.map(() => true);
  for (let changed = true; changed; ) {
    changed = false;
    bound.forEach((limit, c) => {
      const signs = weights.map((row, kind) => (usable[kind] ? sign(row[c]!) : 0));
      const [up, down] = [signs.includes(1), signs.includes(-1)];
      signs.forEach((s, kind) => {
        const stuckUp = s > 0 && !down && sign(limit) <= 0;
        const stuckDown = s < 0 && !up && sign(limit) >= 0 && !through;
        if (!stuckUp && !stuckDown) return;
        usable[kind] = false;
        changed = true;
      });
    });
  }
  const open = new Set(usable.flatMap((yes, kind) => (yes ? [kind] : [])));
  for (let changed = true; changed; ) {
    changed = false;
    bound.forEach((_, c) => {
      const signs = [...open].map((kind) => sign(weights[kind]![c]!));
      const oneSign = !(signs.includes(1) && signs.includes(-1));
      if (!oneSign || (through && signs.includes(-1))) return;
      for (const kind of [...open])
        if (sign(weights[kind]![c]!) !== 0) {
          open.delete(kind);
          changed = true;
        }
    });
  }
  const [culprit] = open;
  if (culprit !== undefined)
    throw new InfiniteOrder(
      culprit,
      'can be added any number of times without using up what is bounded. Bound a power it carries.',
    );
  return { usable };
}

/** Order in which kinds are chosen: those of a component with one sign first, so that every loop below is bounded. */
function byPowers(request: CountingRequest, collector: Collector): void {
  const { order, theory } = request;
  if (order.by !== 'powers') return;
  const { usable } = boundPowers(request);
  const kinds = theory.kinds.map((_, kind) => kind).filter((kind) => usable[kind]);
  const content = theory.kinds.map(() => 0);
  const done = (left: readonly Rational[]): boolean =>
    left.every((value) => (order.through ? sign(value) >= 0 : sign(value) === 0));
  /** Whether the kinds from `at` on can still bring every component of `left` home. */
  const hopeful = (at: number, left: readonly Rational[]): boolean =>
    left.every((value, c) => {
      const signs = kinds.slice(at).map((kind) => sign(order.weights[kind]![c]!));
      if (sign(value) < 0) return signs.includes(-1);
      return order.through || sign(value) === 0 || signs.includes(1);
    });
  const choose = (at: number, left: readonly Rational[], vertices: number): void => {
    if (!hopeful(at, left)) return;
    if (at === kinds.length) {
      if (done(left)) collector.add(content);
      return;
    }
    const kind = kinds[at]!;
    const most = mostOf(request, kinds, at, left);
    for (let n = 0; n <= most; n++) {
      collector.checkVertices(vertices + n);
      content[kind] = n;
      const spent = order.weights[kind]!.map((weight) => multiply(negate(rational(n)), weight));
      choose(
        at + 1,
        left.map((value, c) => add(value, spent[c]!)),
        vertices + n,
      );
    }
    content[kind] = 0;
  };
  choose(0, order.bound, 0);
}

/** The largest number of vertices of a kind that any component with one sign among the kinds still to choose allows. */
function mostOf(request: CountingRequest, kinds: readonly number[], at: number, left: readonly Rational[]): number {
  const { order } = request;
  if (order.by !== 'powers') return 0;
  let most = MOST_VERTICES + 1;
  left.forEach((value, c) => {
    const own = order.weights[kinds[at]!]![c]!;
    const against = kinds.slice(at + 1).some((kind) => sign(order.weights[kind]![c]!) === -sign(own));
    if (sign(own) === 0 || against || (order.through && sign(own) < 0)) return;
    const share = rational(value.num * own.den, value.den * own.num);
    most = Math.min(most, share.num < 0n ? -1 : Number(share.num / share.den));
  });
  return most;
}

/**
 * Loops: a connected diagram has 2(L − 1) + E = Σ(k − 2), so each vertex of valence k and loop order ℓ uses up k − 2 + 2ℓ.
 * A disconnected list (`all`, `normalised`) adds C components with 2(L − C) + E = Σ(k − 2): vacuum components of the
 * request's loop numbers are bounded in the same way, because each has L ≥ 1 once k − 2 + 2ℓ > 0 for every kind, except
 * components of tree level, which need legs. So L − C ≤ bound − 1 and at most E tree components bound the vertices.
 */
function byLoops(request: CountingRequest, collector: Collector): void {
  const { order, theory, keep, legs } = request;
  if (order.by !== 'loops') return;
  const cost = theory.kinds.map((kind, k) => valence(kind) - 2 + 2 * order.kindLoops[k]!);
  const exempt = (kind: number): boolean => keep === '1PI' && valence(theory.kinds[kind]!) === 1;
  cost.forEach((value, kind) => {
    if (value <= 0 && !exempt(kind))
      throw new InfiniteOrder(
        kind,
        valence(theory.kinds[kind]!) === 1
          ? 'is a tadpole term, which has no bounded loop order: bound the power of its coupling instead, or give its parameter a loop order.'
          : 'is an insertion on a line, which has no bounded loop order: bound the power of its coupling instead, or give its parameter a loop order.',
      );
  });
  const single = keep === 'connected' || keep === '1PI';
  const budget = 2 * (order.bound - 1) + legs.length;
  const most = single ? budget : 2 * order.bound + legs.length;
  const content = theory.kinds.map(() => 0);
  const choose = (kind: number, left: number, vertices: number): void => {
    collector.checkVertices(vertices);
    if (kind === theory.kinds.length) {
      if (!single || left === 0 || (order.through && left % 2 === 0)) collector.add(content);
      return;
    }
    if (exempt(kind)) {
      // One such vertex is 1PI only as the whole diagram: one leg, loop order ℓ.
      const alone = vertices === 0 && legs.length === 1 && order.kindLoops[kind]! <= order.bound;
      if (alone && (order.through || order.kindLoops[kind] === order.bound)) {
        content[kind] = 1;
        collector.add(content);
        content[kind] = 0;
      }
      choose(kind + 1, left, vertices);
      return;
    }
    for (let n = 0; n * cost[kind]! <= left; n++) {
      content[kind] = n;
      choose(kind + 1, left - n * cost[kind]!, vertices + n);
    }
    content[kind] = 0;
  };
  choose(0, most, 0);
}

/**
 * All vertex contents that belong to a request's order and whose half-lines can be paired, in a deterministic order that
 * does not depend on names. Finiteness is decided before anything is listed (physics: "Order").
 *
 * For disconnected lists by loops a content may belong only in part; the expansion keeps the diagrams of the right loop number.
 * @throws InfiniteOrder naming the kind; LimitError beyond 40 vertices or 100 000 contents.
 */
export function contents(request: CountingRequest): Content[] {
  const collector = new Collector(request);
  if (request.order.by === 'powers') byPowers(request, collector);
  else byLoops(request, collector);
  const total = (content: Content): number => content.reduce((a, b) => a + b, 0);
  return collector.found.sort((a, b) => total(a) - total(b) || compareLists(b, a));
}

function compareLists(a: Content, b: Content): number {
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return a[i]! - b[i]!;
  return 0;
}

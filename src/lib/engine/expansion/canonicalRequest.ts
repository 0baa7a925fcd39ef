import { format } from '../exact/rational.ts';
import type { CountingRequest, Order, Theory } from '../graph/theory.ts';

/** A request in the numbering that does not depend on names, and how to come back from it. */
export interface CanonicalRequest {
  readonly request: CountingRequest;
  /** typeOrder[t]: the original half-line type at canonical type t. */
  readonly typeOrder: readonly number[];
  /** kindOrder[k]: the original kind at canonical kind k. */
  readonly kindOrder: readonly number[];
}

/** Numberings of interchangeable fields that are tried; beyond it the order given stays (results are then reused less often). */
const MOST_NUMBERINGS = 5040;

interface Field {
  /** The smaller of the field's types (φ of a complex field). */
  readonly type: number;
  readonly types: readonly number[];
}

const fieldsOf = (theory: Theory): Field[] =>
  theory.partner.flatMap((partner, type) =>
    partner === type ? [{ type, types: [type] }] : partner > type ? [{ type, types: [type, partner] }] : [],
  );

/** Weights or loop orders of a kind, components sorted away. */
function kindCost(order: Order, kind: number): string {
  return order.by === 'powers' ? order.weights[kind]!.map(format).sort().join() : String(order.kindLoops[kind]);
}

/** What is seen of a field without names. */
function fieldKey(request: CountingRequest, { types }: Field): string {
  const legs = request.legs.map((leg) => types.indexOf(leg) + 1).join('');
  const kinds = request.theory.kinds
    .map((counts, kind) => {
      const rest = counts.filter((_, type) => !types.includes(type)).sort();
      return `${types.map((type) => counts[type])}|${rest}|${kindCost(request.order, kind)}`;
    })
    .sort();
  return `${types.length}/${legs}/${kinds.join(';')}`;
}

function* permutations<T>(items: readonly T[]): Generator<T[]> {
  if (items.length < 2) {
    yield [...items];
    return;
  }
  for (let at = 0; at < items.length; at++)
    for (const rest of permutations([...items.slice(0, at), ...items.slice(at + 1)])) yield [items[at]!, ...rest];
}

/** Orders of the groups' members, one group after the other. */
function* products<T>(groups: readonly (readonly T[])[]): Generator<T[]> {
  const [first, ...rest] = groups;
  if (first === undefined) {
    yield [];
    return;
  }
  for (const head of permutations(first)) for (const tail of products(rest)) yield [...head, ...tail];
}

function candidates(request: CountingRequest): Field[][] {
  const groups = new Map<string, Field[]>();
  for (const field of fieldsOf(request.theory)) {
    const key = fieldKey(request, field);
    groups.set(key, [...(groups.get(key) ?? []), field]);
  }
  const sorted = [...groups.keys()].sort().map((key) => groups.get(key)!);
  const count = sorted.reduce((product, group) => group.reduce((p, _, i) => p * (i + 1), product), 1);
  return count > MOST_NUMBERINGS ? [sorted.flat()] : [...products(sorted)];
}

/** Components of a power order, sorted by how they weigh the kinds in the order given; equal components are equal columns. */
function sortedComponents(order: Order & { by: 'powers' }, kindOrder: readonly number[]): number[] {
  const column = (c: number): string =>
    `${format(order.bound[c]!)}/${kindOrder.map((kind) => format(order.weights[kind]![c]!)).join()}`;
  return order.bound.map((_, c) => c).sort((a, b) => (column(a) < column(b) ? -1 : column(a) > column(b) ? 1 : 0));
}

function reorder(order: Order, kindOrder: readonly number[]): Order {
  if (order.by === 'loops') return { ...order, kindLoops: kindOrder.map((kind) => order.kindLoops[kind]!) };
  const components = sortedComponents(order, kindOrder);
  return {
    ...order,
    weights: kindOrder.map((kind) => components.map((c) => order.weights[kind]![c]!)),
    bound: components.map((c) => order.bound[c]!),
  };
}

/** Kinds under one numbering of types: by their counts and costs; kinds equal in both are tried in every order. */
function kindOrders(request: CountingRequest, typeOrder: readonly number[]): number[][] {
  const groups = new Map<string, number[]>();
  request.theory.kinds.forEach((counts, kind) => {
    const key = `${typeOrder.map((type) => String.fromCharCode(32 + counts[type]!)).join('')}|${kindCost(request.order, kind)}`;
    groups.set(key, [...(groups.get(key) ?? []), kind]);
  });
  const sorted = [...groups.keys()].sort().map((key) => groups.get(key)!);
  const count = sorted.reduce((product, group) => group.reduce((p, _, i) => p * (i + 1), product), 1);
  return count > MOST_NUMBERINGS ? [sorted.flat()] : [...products(sorted)];
}

function renumber(
  request: CountingRequest,
  typeOrder: readonly number[],
  kindOrder: readonly number[],
): CountingRequest {
  const place = new Map(typeOrder.map((type, at) => [type, at]));
  return {
    theory: {
      partner: typeOrder.map((type) => place.get(request.theory.partner[type]!)!),
      kinds: kindOrder.map((kind) => typeOrder.map((type) => request.theory.kinds[kind]![type]!)),
    },
    legs: request.legs.map((type) => place.get(type)!),
    order: reorder(request.order, kindOrder),
    keep: request.keep,
    drop: [...request.drop].sort(),
  };
}

/** One text for each canonical request: equal texts, equal results. */
export function requestKey(request: CountingRequest): string {
  const { order } = request;
  return JSON.stringify([
    request.theory.partner,
    request.theory.kinds,
    request.legs,
    order.by === 'powers'
      ? [order.weights.map((row) => row.map(format)), order.bound.map(format), order.through]
      : [order.kindLoops, order.bound, order.through],
    request.keep,
    request.drop,
  ]);
}

/**
 * The request in a numbering of fields, kinds and components that depends on no name: requests that are the same up to
 * renaming and reordering get the same canonical request, so one stored result serves both.
 *
 * The least key over all numberings of fields and kinds that their invariants leave open.
 */
export function canonicalRequest(request: CountingRequest): CanonicalRequest {
  let best: { key: string; found: CanonicalRequest } | null = null;
  for (const fields of candidates(request)) {
    const typeOrder = fields.flatMap(({ types }) => types);
    for (const kindOrder of kindOrders(request, typeOrder)) {
      const renumbered = renumber(request, typeOrder, kindOrder);
      const key = requestKey(renumbered);
      if (best === null || key < best.key) best = { key, found: { request: renumbered, typeOrder, kindOrder } };
    }
  }
  return best!.found;
}

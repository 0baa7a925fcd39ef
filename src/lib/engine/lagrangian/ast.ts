import type { Rational } from '../exact/rational.ts';
import type { Span } from './model.ts';

/** A summand with its sign; `hc` stands for "+ h.c.". */
export interface Summand extends Span {
  readonly sign: 1 | -1;
  readonly node: Node | 'hc';
}

/** A factor of a product: how it is joined to what stands before it. */
export interface FactorNode {
  readonly by: '*' | '/';
  /** Joined by mere juxtaposition. */
  readonly juxtaposed: boolean;
  readonly node: Node;
}

/** The Lagrangian as it was typed. Spans count UTF-16 units of the text. */
export type Node = Span &
  (
    | { readonly is: 'number'; readonly value: Rational }
    | { readonly is: 'name'; readonly name: string }
    | { readonly is: 'imaginary' | 'pi' }
    | { readonly is: 'sum'; readonly items: readonly Summand[] }
    | { readonly is: 'product'; readonly factors: readonly FactorNode[] }
    | { readonly is: 'negative'; readonly node: Node }
    | { readonly is: 'power'; readonly base: Node; readonly exponent: Node }
    | { readonly is: 'conjugate'; readonly node: Node }
    | { readonly is: 'modulus'; readonly node: Node }
    | { readonly is: 'root'; readonly degree: number; readonly node: Node }
    | { readonly is: 'factorial'; readonly step: 1 | 2; readonly node: Node }
    | { readonly is: 'fraction'; readonly above: Node; readonly below: Node }
    /** ∂ applied `count` times with one index (null: contracted with what stands beside it). */
    | { readonly is: 'derivative'; readonly index: string | null; readonly count: number; readonly node: Node }
    /** □^count that waits for what stands on its right. */
    | { readonly is: 'operator'; readonly count: number }
    | { readonly is: 'group'; readonly open: string; readonly node: Node }
  );

export type NodeKind = Node['is'];

/** The nodes directly below a node. */
export function children(node: Node): readonly Node[] {
  switch (node.is) {
    case 'sum':
      return node.items.flatMap((item) => (item.node === 'hc' ? [] : [item.node]));
    case 'product':
      return node.factors.map((factor) => factor.node);
    case 'power':
      return [node.base, node.exponent];
    case 'fraction':
      return [node.above, node.below];
    case 'number':
    case 'name':
    case 'imaginary':
    case 'pi':
    case 'operator':
      return [];
    default:
      return [node.node];
  }
}

/** Calls `visit` on every node below and including this one, parents first. */
export function walk(node: Node, visit: (node: Node) => void): void {
  visit(node);
  for (const child of children(node)) walk(child, visit);
}

/** The node inside any brackets. */
export function unwrapped(node: Node): Node {
  let inner = node;
  while (inner.is === 'group') inner = inner.node;
  return inner;
}

import { type Node, unwrapped, walk } from './ast.ts';
import { BOUNDS } from './bounds.ts';
import type { FieldFactor, Span } from './model.ts';
import { parse } from './parser.ts';
import type { Source } from './source.ts';

/** The names of a text and what their use says about them. */
export interface Usage {
  /** Every name, with the span where it stands first. */
  readonly first: ReadonlyMap<string, Span>;
  /** Names that stand under a derivative: the only ones that can be fields. */
  readonly derived: ReadonlySet<string>;
  /** Names of which a conjugate or a modulus is taken. */
  readonly conjugated: ReadonlySet<string>;
}

/** The one name inside brackets, powers, conjugates and derivatives, or null. */
function innermost(node: Node): string | null {
  const inner = unwrapped(node);
  switch (inner.is) {
    case 'name':
      return inner.name;
    case 'power':
      return innermost(inner.base);
    case 'conjugate':
    case 'derivative':
    case 'modulus':
      return innermost(inner.node);
    default:
      return null;
  }
}

function namesIn(node: Node): Set<string> {
  const names = new Set<string>();
  walk(node, (inner) => {
    if (inner.is === 'name') names.add(inner.name);
  });
  return names;
}

function holdsOperator(node: Node): boolean {
  let found = false;
  walk(node, (inner) => {
    if (inner.is === 'operator') found = true;
  });
  return found;
}

/** The factors of a product that stand on the right of a □ that waits. */
function afterOperator(node: Node & { is: 'product' }): readonly Node[] {
  const at = node.factors.findIndex((factor) => holdsOperator(factor.node));
  return at < 0 ? [] : node.factors.slice(at + 1).map((factor) => factor.node);
}

/** Collects how the names of a text are used. @throws LimitError with more names than fields and parameters together may be. */
export function usageOf(source: Source, nodes: readonly Node[]): Usage {
  const first = new Map<string, Span>();
  const derived = new Set<string>();
  const conjugated = new Set<string>();
  const composite: Node[] = [];
  const note = (node: Node): void => {
    const name = innermost(node);
    if (name === null) composite.push(node);
    else derived.add(name);
  };
  const visit = (node: Node): void => {
    if (node.is === 'name' && !first.has(node.name)) {
      first.set(node.name, { start: node.start, end: node.end });
      if (first.size > BOUNDS.fields + BOUNDS.parameters)
        throw source.limit(
          `The text has more than ${BOUNDS.fields + BOUNDS.parameters} names, the most that are read.`,
          BOUNDS.fields + BOUNDS.parameters,
          null,
          node,
        );
    }
    if (node.is === 'derivative') note(node.node);
    if (node.is === 'product') for (const factor of afterOperator(node)) note(factor);
    if (node.is !== 'conjugate' && node.is !== 'modulus') return;
    const name = innermost(node.node);
    if (name !== null) conjugated.add(name);
  };
  for (const node of nodes) walk(node, visit);
  for (const node of composite) {
    const names = namesIn(node);
    if (![...names].some((name) => derived.has(name))) for (const name of names) derived.add(name);
  }
  return { first, derived, conjugated };
}

/**
 * Reads one name as a request spells it, in any spelling of the language: "phi", "\phi^\dagger", "φ†", "λ₁", "conj(phi)".
 * Null when the text is not one name.
 */
export function readName(text: string): FieldFactor | null {
  const { items, error } = parse(text);
  const [only] = items;
  if (error || items.length !== 1 || only!.sign !== 1 || only!.node === 'hc') return null;
  let node = unwrapped(only!.node);
  let conjugate = false;
  while (node.is === 'conjugate') {
    conjugate = !conjugate;
    node = unwrapped(node.node);
  }
  return node.is === 'name' ? { field: node.name, conjugate } : null;
}

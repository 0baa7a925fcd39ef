import type { CountingRequest } from '../graph/theory.ts';
import { BridgeRemoval } from './bridges.ts';
import { GeneratingFunctions } from './generating.ts';
import type { CountingSpace } from './space.ts';
import { bareVertices, CoreVertices, normalOrderedVertices, treeDressedVertices } from './vertexParts.ts';

/** Sum over connected components with content m and external points g, as labelled contractions. */
export type ComponentSum = (m: number, g: number) => bigint;

/** The sums from which a request is put together. */
export interface Components {
  readonly sum: ComponentSum;
  /** Z of the same vertices, when no filter looks at components: the direct way to `all` and `normalised`. */
  readonly full: ComponentSum | null;
}

/**
 * The sum over one connected component that the request keeps, for each combination of `keep` and `drop`.
 *
 * Nothing dropped: W, or G under 1PI. Self-contractions: the same with normal-ordered vertices. Tadpoles: the source that makes ⟨φ⟩ = 0;
 * a component without external points then has no bridge at all, so it is G. Scaleless: the core vertices V′; a tadpole tree without
 * a loop is kept unless tadpoles are dropped too, hence V(φ + τ) in place of V. A component without external points must have no
 * cut vertex, bridge or self-contraction: seen from its root vertex it is a connected core with the root's half-lines as external points.
 */
export function componentSums(space: CountingSpace, request: CountingRequest): Components {
  const drops = new Set(request.drop);
  const irreducible = request.keep === '1PI';
  if (drops.has('scaleless')) return scaleless(space, irreducible, drops.has('tadpoles'));
  const vertices = drops.has('self-contractions') ? normalOrderedVertices(space) : bareVertices(space);
  const functions = new GeneratingFunctions(space, vertices);
  const bridges = new BridgeRemoval(functions);
  if (irreducible) return { sum: (m, g) => bridges.irreducible(m, g), full: null };
  if (!drops.has('tadpoles')) return { sum: (m, g) => functions.connected(m, g), full: (m, g) => functions.full(m, g) };
  return { sum: (m, g) => tadpoleFree(space, bridges, m, g), full: null };
}

function tadpoleFree(space: CountingSpace, bridges: BridgeRemoval, m: number, g: number): bigint {
  if (m === space.contents.zero) return space.bareLine(g);
  return g === space.legs.zero ? bridges.irreducible(m, g) : bridges.withoutTadpoles(m, g);
}

function scaleless(space: CountingSpace, irreducible: boolean, tadpolesToo: boolean): Components {
  const core = new CoreVertices(space, bareVertices(space));
  const dressing =
    !irreducible && !tadpolesToo && space.theory.kinds.some((_, k) => space.legs.total(space.monomial(k)) === 1);
  const legged = dressing ? new CoreVertices(space, treeDressedVertices(space)) : core;
  const sum: ComponentSum = (m, g) => {
    if (m === space.contents.zero) return irreducible ? 0n : space.bareLine(g);
    if (g === space.legs.zero) return biconnected(space, core, m);
    return irreducible ? core.bridges.irreducible(m, g) : legged.bridges.withoutTadpoles(m, g);
  };
  return { sum, full: null };
}

/** Components without external points, bridges, self-contractions and cut vertices; the end of a one-point vertex's line is always a bridge. */
function biconnected(space: CountingSpace, core: CoreVertices, m: number): bigint {
  const { contents, legs } = space;
  const vector = contents.vector(m);
  if (vector.some((n, k) => n > 0 && legs.total(space.monomial(k)) === 1)) return 0n;
  const root = contents.root(m);
  const rest = contents.id(vector.map((n, k) => (k === root ? n - 1 : n)));
  return rest === contents.zero ? 0n : core.bridges.withoutTadpoles(rest, space.monomial(root));
}

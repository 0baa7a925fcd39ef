import type { CountedDiagram } from '../graph/diagram.ts';
import { type Facts, facts } from '../graph/facts.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import { enumerateContent } from './enumerate.ts';
import { passesDrop, passesKeep } from './filters.ts';
import { contents } from './orders.ts';

/** A diagram of a list with its factor, what is true of it, and its vertex content. */
export interface ExpandedDiagram extends CountedDiagram {
  readonly content: Content;
  readonly facts: Facts;
}

const COMPONENTS = { all: 'any', normalised: 'noVacuum', connected: 'connected', '1PI': 'connected' } as const;

/** Whether a diagram has the loop order asked for; powers are settled by the content already. */
function hasOrder({ order }: CountingRequest, content: Content, loops: number): boolean {
  if (order.by === 'powers') return true;
  const total = loops + content.reduce((sum, n, kind) => sum + n * order.kindLoops[kind]!, 0);
  return order.through ? total <= order.bound : total === order.bound;
}

/**
 * The diagrams of a request with one vertex content, in the enumerator's canonical order, after the filters.
 *
 * `stop` is asked now and then, also while nothing is found; when it says yes the stream ends early.
 */
export function* expandContent(
  request: CountingRequest,
  content: Content,
  stop?: () => boolean,
): Generator<ExpandedDiagram> {
  const components = COMPONENTS[request.keep];
  const noBridges = request.keep === '1PI';
  const options = stop ? { components, noBridges, stop } : { components, noBridges };
  for (const diagram of enumerateContent(request.theory, request.legs, content, options)) {
    const found = facts(diagram);
    if (!passesKeep(found, request.keep) || !passesDrop(found, request.drop)) continue;
    if (hasOrder(request, content, found.loops)) yield { ...diagram, content, facts: found };
  }
}

/**
 * Every diagram of a request exactly once, as a stream: contents in order, within a content the enumerator's canonical order,
 * then the filters. Ending the generator early cancels; memory is that of one diagram.
 *
 * @throws InputError infinite-order, LimitError, before the first diagram.
 */
export function* expandRequest(request: CountingRequest): Generator<ExpandedDiagram> {
  for (const content of contents(request)) yield* expandContent(request, content);
}

import type { CountedDiagram } from '../graph/diagram.ts';
import type { Content, Theory } from '../graph/theory.ts';
import { Emitter } from './search/emit.ts';
import { type Components, newFrame } from './search/frame.ts';
import { RowSearch } from './search/rows.ts';

/**
 * Every class of contractions of the given vertices and external points exactly once, with the order of its automorphism
 * group; as a stream in an order that depends on the arguments only. Memory is that of one diagram.
 *
 * `components`: any; noVacuum, every component has an external point; connected, one component in all. The empty diagram has
 * none: it is admitted by the first two. `stop` is asked now and then, also while nothing is found; when it says yes the stream ends.
 */
export function* enumerateContent(
  theory: Theory,
  legs: readonly number[],
  content: Content,
  options: { components: Components; stop?: () => boolean },
): Generator<CountedDiagram> {
  const frame = newFrame(theory, legs, content);
  if (frame.n === 0) {
    if (options.components !== 'connected') yield { kinds: [], legs: [], lines: [], symmetryFactor: 1n };
    return;
  }
  const search = new RowSearch(frame, options.components, options.stop);
  const emitter = new Emitter(frame, theory, frame.used);
  while (search.next()) yield emitter.diagram(search.canonicity.orbitSizes, search.changed);
}

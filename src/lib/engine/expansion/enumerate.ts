import type { CountedDiagram } from '../graph/diagram.ts';
import type { Content, Theory } from '../graph/theory.ts';
import { Emitter } from './search/emit.ts';
import { newFrame } from './search/frame.ts';
import { RowSearch, type SearchOptions } from './search/rows.ts';

/** Whether all half-lines can be contracted at all, and, if asked, with enough lines to hang together. O(kinds · types). */
function contractible(
  { partner, kinds }: Theory,
  legs: readonly number[],
  content: Content,
  connected: boolean,
): boolean {
  const halfLines = partner.map(
    (_, h) => legs.filter((type) => type === h).length + content.reduce((sum, n, k) => sum + n * kinds[k]![h]!, 0),
  );
  const balanced = partner.every((p, h) => (p === h ? halfLines[h]! % 2 === 0 : halfLines[h] === halfLines[p]));
  const nodes = content.reduce((sum, n) => sum + n, legs.length);
  return balanced && (!connected || halfLines.reduce((sum, n) => sum + n, 0) >= 2 * (nodes - 1));
}

/**
 * Every class of contractions of the given vertices and external points exactly once, with the order of its automorphism
 * group; as a stream in an order that depends on the arguments only. Memory is that of one diagram.
 *
 * `components`: any; noVacuum, every component has an external point; connected, one component in all. The empty diagram has
 * none: it is admitted by the first two. `noBridges` leaves out diagrams in which an internal line is a bridge. `stop` is asked
 * now and then, also while nothing is found; when it says yes the stream ends.
 */
export function* enumerateContent(
  theory: Theory,
  legs: readonly number[],
  content: Content,
  options: SearchOptions,
): Generator<CountedDiagram> {
  if (!contractible(theory, legs, content, options.components === 'connected')) return;
  const frame = newFrame(theory, legs, content);
  if (frame.n === 0) {
    if (options.components !== 'connected') yield { kinds: [], legs: [], lines: [], symmetryFactor: 1n };
    return;
  }
  const search = new RowSearch(frame, options);
  const emitter = new Emitter(frame, theory, frame.used);
  while (search.next()) yield emitter.diagram(search.canonicity.orbitSizes, search.changed);
}

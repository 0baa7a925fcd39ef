import { layout } from '../drawing/layout.ts';
import { packLayout } from '../drawing/packed.ts';
import { add, format, type Rational, rational, ZERO } from '../exact/rational.ts';
import { expandRequest } from '../expansion/expand.ts';
import { passesDrop } from '../expansion/filters.ts';
import { pairingsOf } from '../expansion/pairings.ts';
import { shapeLabel } from '../expansion/shape.ts';
import { canonicalLabel } from '../graph/canonical.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import { balance, type ListSum } from '../ledger/balance.ts';
import { independentSums, type LedgerSums } from '../ledger/independent.ts';
import { type CompactDiagram, factsFlags, packBody } from './compact.ts';
import { type LedgerBody, ledgerBody } from './ledger.ts';
import type { Prepared } from './prepare.ts';

/** Summary of a list without names: `excluded` holds kinds of the canonical request. */
export interface SummaryBody {
  readonly state: 'complete' | 'none';
  readonly classes: number;
  readonly weight: string;
  readonly pairings: string;
  readonly excluded: readonly number[];
}

export interface RunEnd {
  readonly summary: SummaryBody;
  readonly ledger: LedgerBody;
}

/** Sums of a list by vertex content, as the ledger compares them. */
class Sums {
  readonly #rows = new Map<string, { content: Content; classes: number; weight: Rational; pairings: bigint }>();

  add(content: Content, symmetryFactor: bigint, pairings: bigint): void {
    const key = content.join();
    const row = this.#rows.get(key) ?? { content, classes: 0, weight: ZERO, pairings: 0n };
    row.classes++;
    row.weight = add(row.weight, rational(1n, symmetryFactor));
    row.pairings += pairings;
    this.#rows.set(key, row);
  }

  get rows(): ListSum[] {
    return [...this.#rows.values()];
  }
}

/** Kinds of the request that no content uses because the order leaves a coupling of theirs at power 0. */
function excludedKinds(request: CountingRequest, contents: readonly Content[]): number[] {
  const { order } = request;
  if (order.by !== 'powers') return [];
  return request.theory.kinds
    .map((_, kind) => kind)
    .filter((kind) => contents.every((content) => content[kind] === 0))
    .filter((kind) => order.weights[kind]!.some((weight, c) => weight.num !== 0n && order.bound[c]!.num === 0n));
}

/**
 * The expansion of a prepared request as a stream of compact diagrams in canonical order; returns the summary and the
 * balanced (or not) ledger at the end. Ending the generator early cancels. Memory: one diagram at a time.
 *
 * `pictures`: how many of the first diagrams are laid out for their drawings.
 * The uncut list is summed alongside when filters drop something, since a cut without an independent sum rests on it.
 */
export function* runExpansion(
  prepared: Prepared,
  options: { readonly pictures: number } = { pictures: 0 },
): Generator<CompactDiagram, RunEnd> {
  const { request } = prepared.canonical;
  const proof: LedgerSums = independentSums(request);
  const cut = new Sums();
  const uncut = new Sums();
  let position = 0;
  for (const diagram of expandRequest({ ...request, drop: [] })) {
    const pairings = pairingsOf(request.theory, diagram);
    uncut.add(diagram.content, diagram.symmetryFactor, pairings);
    if (!passesDrop(diagram.facts, request.drop)) continue;
    cut.add(diagram.content, diagram.symmetryFactor, pairings);
    const { bare, numberings } = canonicalLabel(diagram, request.theory, request.legs);
    const body = packBody(diagram, numberings);
    yield {
      position: ++position,
      body,
      label: bare,
      loops: diagram.facts.loops,
      symmetryFactor: `${diagram.symmetryFactor}`,
      weight: format(rational(1n, diagram.symmetryFactor)),
      pairings: `${pairings}`,
      order: diagram.content.join(),
      shape: shapeLabel(diagram, request, body),
      flags: factsFlags(diagram.facts),
      picture: position <= options.pictures ? packLayout(layout(diagram)) : null,
    };
  }
  const compared = balance(proof, cut.rows, uncut.rows);
  return {
    summary: {
      state: position > 0 ? 'complete' : 'none',
      classes: position,
      weight: format(compared.weight),
      pairings: `${compared.pairings}`,
      excluded: excludedKinds(request, prepared.contents),
    },
    ledger: ledgerBody(compared),
  };
}

import { LimitError } from '../errors.ts';
import { factorial } from '../exact/combinatorics.ts';
import { type Rational, rational, sum } from '../exact/rational.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import { assemble, normalise } from './assembly.ts';
import { componentSums } from './components.ts';
import { admittedContents } from './contents.ts';
import { methodText } from './method.ts';
import { CountingSpace, LEDGER_STEPS } from './space.ts';

/** What the list must sum to at one vertex content: Σ 1/S and Σ pairings. */
export interface IndependentRow {
  readonly content: Content;
  readonly weight: Rational;
  readonly pairings: bigint;
}

/** Sums over all contents, and the contents at which they are not zero. */
export interface IndependentTotals {
  readonly rows: readonly IndependentRow[];
  readonly weight: Rational;
  readonly pairings: bigint;
}

/**
 * The independent side of the ledger.
 *
 * proved: the sums of the request itself. rests: its filter could not be summed within the bound; `uncut` then holds the sums of the
 * same request with nothing dropped, on which the cut list rests.
 */
export type LedgerSums =
  | (IndependentTotals & {
      readonly state: 'proved';
      readonly method: string;
      /** How many vertex contents the order admits, those with sum zero included. */
      readonly contents: number;
    })
  | {
      readonly state: 'rests';
      readonly method: string;
      readonly contents: number;
      readonly uncut: IndependentTotals;
    };

/**
 * Σ 1/S and Σ pairings that a complete list must have, per vertex content, computed without any diagram.
 *
 * Zero-dimensional field theory: every propagator is 1 and every kind k is c_k ∏ φ^{k_h}/k_h!; the sums are coefficients of
 * Z, Z[J]/Z[0], W = log Z and Γ at φ = 0 (physics: "completeness ledger"; see GeneratingFunctions, BridgeRemoval, CoreVertices).
 * Labelled contractions are counted as integers; weight = pairings / (∏ n_kind! ∏ k_field!). Legs are labelled.
 * With no legs and no vertices `all` and `normalised` hold the empty diagram: 1 and 1.
 *
 * @throws InputError infinite-order; LimitError when the uncut sums need more than `limit` multiplications.
 * @example φ⁴ vacuum, connected, order 2: weight 1/12, pairings 96
 */
export function independentSums(request: CountingRequest, limit: number = LEDGER_STEPS): LedgerSums {
  const contents = admittedContents(request);
  try {
    return {
      state: 'proved',
      method: methodText(request),
      contents: contents.length,
      ...totals(request, contents, limit),
    };
  } catch (error) {
    if (!(error instanceof LimitError) || request.drop.length === 0) throw error;
    const whole = { ...request, drop: [] };
    return {
      state: 'rests',
      method: methodText(whole),
      contents: contents.length,
      uncut: totals(whole, contents, limit),
    };
  }
}

function totals(request: CountingRequest, contents: readonly Content[], limit: number): IndependentTotals {
  const count = counter(request, new CountingSpace(request.theory, limit));
  const rows: IndependentRow[] = [];
  for (const content of contents) {
    const pairings = count(content);
    if (pairings !== 0n) rows.push({ content, pairings, weight: rational(pairings, divisor(request, content)) });
  }
  return {
    rows,
    weight: sum(rows.map((row) => row.weight)),
    pairings: rows.reduce((total, row) => total + row.pairings, 0n),
  };
}

/** ∏ n_kind! ∏ k_field!: contractions per unit of weight. */
export function divisor({ theory }: CountingRequest, content: Content): bigint {
  let value = 1n;
  content.forEach((n, k) => {
    const vertex = theory.kinds[k]!.reduce((product, valence) => product * factorial(valence), 1n);
    value *= factorial(n) * vertex ** BigInt(n);
  });
  return value;
}

/** The number of contractions of the request at one content. */
function counter(request: CountingRequest, space: CountingSpace): (content: Content) => bigint {
  const { keep, order, legs } = request;
  const points = space.legs.id(request.theory.partner.map((_, h) => legs.filter((type) => type === h).length));
  const { sum: component, full } = componentSums(space, request);
  if (keep === 'connected' || keep === '1PI') return (content) => component(space.contents.id(content), points);
  const vacuum = keep === 'all';
  if (full && order.by === 'powers') {
    const direct = vacuum ? full : normalise(space, full);
    return (content) =>
      empty(content) || vacuum || points !== space.legs.zero ? direct(space.contents.id(content), points) : 0n;
  }
  const assembled = assemble(space, component, { vacuum, byLoops: order.by === 'loops' });
  return (content) => {
    const sums = assembled(space.contents.id(content), points);
    if (order.by === 'powers') return sums[0] ?? 0n;
    const bound = order.bound - content.reduce((total, n, k) => total + n * order.kindLoops[k]!, 0);
    if (!order.through) return sums[bound] ?? 0n;
    return sums.slice(0, Math.max(0, bound + 1)).reduce((total, value) => total + value, 0n);
  };
}

const empty = (content: Content): boolean => content.every((n) => n === 0);

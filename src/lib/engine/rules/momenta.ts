import { LimitError } from '../errors.ts';
import { factorial } from '../exact/combinatorics.ts';
import type { FieldFactor, Term } from '../lagrangian/model.ts';

/** A product of scalar products of incoming momenta: sorted pairs [i, j], i ≤ j, counted from 1 in the order of the vertex's fields. */
export type MomentumMonomial = readonly (readonly [number, number])[];

/** How many assignments of identical fields give each product. */
export interface Assignments {
  readonly monomials: readonly { readonly monomial: MomentumMonomial; readonly count: bigint }[];
  /** All assignments: ∏ k_field!. The counts sum to it. */
  readonly total: bigint;
}

/** Assignments that are tried, after exchanges that change nothing are taken out. */
const MOST_ASSIGNMENTS = 1_500;

const groupKey = ({ field, conjugate }: FieldFactor): string => (conjugate ? `${field}^*` : field);

/** Positions 1… of every group of identical fields among the vertex's fields. */
function labelsByGroup(fields: readonly FieldFactor[]): Map<string, number[]> {
  const labels = new Map<string, number[]>();
  fields.forEach((field, at) => {
    labels.set(groupKey(field), [...(labels.get(groupKey(field)) ?? []), at + 1]);
  });
  return labels;
}

export const monomialText = (monomial: MomentumMonomial): string => monomial.map(([i, j]) => `p${i}.p${j}`).join('*');

const sorted = (pairs: [number, number][]): MomentumMonomial =>
  pairs.map(([i, j]): [number, number] => (i <= j ? [i, j] : [j, i])).sort((a, b) => a[0] - b[0] || a[1] - b[1]);

/** Factors under derivatives that are joined to each other, as a list of lists of positions. */
function pieces({ derivatives }: Term): number[][] {
  const found: number[][] = [];
  for (const [i, j] of derivatives) {
    const touched = found.filter((piece) => piece.includes(i) || piece.includes(j));
    const merged = [...new Set([...touched.flat(), i, j])].sort((a, b) => a - b);
    for (const piece of touched) found.splice(found.indexOf(piece), 1);
    found.push(merged);
  }
  return found;
}

/**
 * The two-factor pieces ∂φ·∂φ of one field, which may be exchanged with each other and turned round without changing anything:
 * only their ascending assignments are tried, each standing for n!·2ⁿ. Other pieces are assigned in all ways.
 */
function isPlainPair({ factors, derivatives }: Term, piece: readonly number[]): boolean {
  if (piece.length !== 2 || groupKey(factors[piece[0]!]!) !== groupKey(factors[piece[1]!]!)) return false;
  const own = derivatives.filter(([i]) => piece.includes(i));
  return own.length === 1;
}

/**
 * The sum over the assignments of identical fields' momenta to the factors of a derivative term: each product of scalar products
 * with the number of assignments that give it. Fields without derivatives contribute a factorial.
 *
 * @param fields the vertex's half-lines, whose momenta are p1, p2, …
 * @throws LimitError when more than 1 500 different assignments would have to be written out.
 */
export function assignments(term: Term, fields: readonly FieldFactor[]): Assignments {
  const labels = labelsByGroup(fields);
  const total = [...labels.values()].reduce((product, group) => product * factorial(group.length), 1n);
  const parts = pieces(term);
  const positions = [
    ...parts.filter((piece) => isPlainPair(term, piece)),
    ...parts.filter((piece) => !isPlainPair(term, piece)),
  ];
  const pairStarts = new Map(positions.filter((piece) => isPlainPair(term, piece)).map((piece) => [piece[0]!, piece]));
  const order = positions.flat();
  const free = new Map([...labels].map(([key, group]) => [key, new Set(group)]));
  const chosen = new Map<number, number>();
  const counts = new Map<string, { monomial: MomentumMonomial; count: bigint }>();
  let tried = 0;
  const note = (): void => {
    if (++tried > MOST_ASSIGNMENTS)
      throw new LimitError(
        `A vertex factor with more than ${MOST_ASSIGNMENTS} different momentum products is not written out.`,
        MOST_ASSIGNMENTS,
      );
    const monomial = sorted(term.derivatives.map(([i, j]): [number, number] => [chosen.get(i)!, chosen.get(j)!]));
    const key = monomialText(monomial);
    const known = counts.get(key);
    if (known) known.count += 1n;
    else counts.set(key, { monomial, count: 1n });
  };
  const choose = (at: number): void => {
    if (at === order.length) {
      note();
      return;
    }
    const position = order[at]!;
    const key = groupKey(term.factors[position]!);
    const start = pairStarts.get(position);
    const before = at > 0 ? order[at - 1]! : -1;
    const second = pairStarts.has(before) && pairStarts.get(before)![1] === position;
    const previousPair = at > 1 && pairStarts.has(order[at - 2]!) && start ? order[at - 2]! : -1;
    for (const label of [...free.get(key)!]) {
      if (second && label < chosen.get(before)!) continue;
      if (previousPair >= 0 && groupKey(term.factors[previousPair]!) === key && label < chosen.get(previousPair)!)
        continue;
      free.get(key)!.delete(label);
      chosen.set(position, label);
      choose(at + 1);
      free.get(key)!.add(label);
    }
  };
  choose(0);
  const tries = BigInt(Math.max(tried, 1));
  const each = total / tries;
  const monomials = [...counts.values()].map(({ monomial, count }) => ({ monomial, count: count * each }));
  monomials.sort((a, b) => (monomialText(a.monomial) < monomialText(b.monomial) ? -1 : 1));
  return { monomials, total };
}

import { equals, type Rational, sum, ZERO } from '../exact/rational.ts';
import type { Content } from '../graph/theory.ts';
import type { IndependentTotals, LedgerSums } from './independent.ts';

/** The list at one vertex content: number of classes, Σ 1/S, Σ pairings. */
export interface ListSum {
  readonly content: Content;
  readonly classes: number;
  readonly weight: Rational;
  readonly pairings: bigint;
}

export interface BalanceRow {
  readonly content: Content;
  readonly list: { readonly classes: number; readonly weight: Rational; readonly pairings: bigint };
  /** null when this cut of the list rests on the uncut one. */
  readonly independent: { readonly weight: Rational | null; readonly pairings: bigint | null };
  readonly balanced: boolean;
}

/**
 * The ledger of one expansion: each row of the list beside its independent sum.
 *
 * balanced: all rows equal; unbalanced: a defect of the program; rests: no independent sum of the cut list, whose uncut list balances
 * (rows then count as balanced, `uncut` shows both sides).
 */
export interface Balance {
  readonly state: 'balanced' | 'unbalanced' | 'rests';
  readonly weight: Rational;
  readonly independentWeight: Rational | null;
  readonly pairings: bigint;
  readonly independentPairings: bigint | null;
  readonly rows: readonly BalanceRow[];
  readonly method: string;
  readonly uncut: {
    readonly weight: Rational;
    readonly independentWeight: Rational;
    readonly classes: number;
  } | null;
}

/**
 * Compares a list, grouped by content, with its independent sums; a content that one side lacks is zero there.
 *
 * When the sums rest, `uncut` must be the list with nothing dropped; without it, or when it does not balance, the state is unbalanced:
 * nothing then proves the list. O(rows).
 */
export function balance(sums: LedgerSums, list: readonly ListSum[], uncut: readonly ListSum[] | null = null): Balance {
  const totals = {
    weight: sum(list.map((row) => row.weight)),
    pairings: list.reduce((total, row) => total + row.pairings, 0n),
    method: sums.method,
  };
  if (sums.state === 'proved') {
    const rows = compareRows(sums, list);
    return {
      ...totals,
      state: rows.every((row) => row.balanced) ? 'balanced' : 'unbalanced',
      independentWeight: sums.weight,
      independentPairings: sums.pairings,
      rows,
      uncut: null,
    };
  }
  const rests = uncut !== null && compareRows(sums.uncut, uncut).every((row) => row.balanced);
  return {
    ...totals,
    state: rests ? 'rests' : 'unbalanced',
    independentWeight: null,
    independentPairings: null,
    rows: list.map(({ content, classes, weight, pairings }) => ({
      content,
      list: { classes, weight, pairings },
      independent: { weight: null, pairings: null },
      balanced: rests,
    })),
    uncut: uncut && {
      weight: sum(uncut.map((row) => row.weight)),
      independentWeight: sums.uncut.weight,
      classes: uncut.reduce((total, row) => total + row.classes, 0),
    },
  };
}

function compareRows(sums: IndependentTotals, list: readonly ListSum[]): BalanceRow[] {
  const rows = new Map<
    string,
    { content: Content; list: BalanceRow['list']; independent: { weight: Rational; pairings: bigint } }
  >();
  for (const { content, weight, pairings } of sums.rows)
    rows.set(content.join(), {
      content,
      list: { classes: 0, weight: ZERO, pairings: 0n },
      independent: { weight, pairings },
    });
  for (const { content, classes, weight, pairings } of list) {
    const row = rows.get(content.join());
    const before = row?.list ?? { classes: 0, weight: ZERO, pairings: 0n };
    rows.set(content.join(), {
      content,
      list: {
        classes: before.classes + classes,
        weight: sum([before.weight, weight]),
        pairings: before.pairings + pairings,
      },
      independent: row?.independent ?? { weight: ZERO, pairings: 0n },
    });
  }
  return [...rows.values()].map((row) => ({
    ...row,
    balanced: equals(row.list.weight, row.independent.weight) && row.list.pairings === row.independent.pairings,
  }));
}

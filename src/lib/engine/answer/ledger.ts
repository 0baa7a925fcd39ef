import { format } from '../exact/rational.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import type { Balance } from '../ledger/balance.ts';
import { identities } from '../ledger/identities.ts';
import { type NamedTheory, orderOf } from './theory.ts';
import type { LedgerDTO } from './types.ts';

type BodyRow = Omit<LedgerDTO['rows'][number], 'order' | 'vertices'> & { readonly content: Content };

/** A ledger as it is stored with a body: JSON, rows by vertex content, no names. */
export type LedgerBody = Omit<LedgerDTO, 'rows' | 'identities'> & {
  readonly rows: readonly BodyRow[];
};

export function ledgerBody(compared: Balance): LedgerBody {
  const text = <T, R>(value: T | null, write: (value: T) => R): R | null => (value === null ? null : write(value));
  return {
    state: compared.state,
    weight: format(compared.weight),
    independentWeight: text(compared.independentWeight, format),
    pairings: `${compared.pairings}`,
    independentPairings: text(compared.independentPairings, String),
    rows: compared.rows.map(({ content, list, independent, balanced }) => ({
      content,
      list: { classes: list.classes, weight: format(list.weight), pairings: `${list.pairings}` },
      independent: { weight: text(independent.weight, format), pairings: text(independent.pairings, String) },
      balanced,
    })),
    method: compared.method,
    uncut: compared.uncut && {
      classes: compared.uncut.classes,
      weight: format(compared.uncut.weight),
      independentWeight: format(compared.uncut.independentWeight),
    },
  };
}

/** The stored ledger in the words of a model, with the low-order identities a person can check by hand. */
export function namedLedger(named: NamedTheory, request: CountingRequest, body: LedgerBody): LedgerDTO {
  return {
    ...body,
    rows: body.rows.map(({ content, ...row }) => ({
      order: orderOf(named, content),
      vertices: Object.fromEntries(
        content.map((n, kind): [string, number] => [named.kinds[kind]!.name, n]).filter(([, n]) => n > 0),
      ),
      ...row,
    })),
    identities: identities(
      request,
      named.kinds.map(({ name }) => name),
    ),
  };
}

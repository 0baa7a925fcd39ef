import type { GroupBy } from '#contract/api.ts';

/** How plates may be made, in words. */
export const GROUPS: readonly { readonly by: GroupBy; readonly label: string }[] = [
  { by: 'couplings', label: 'couplings' },
  { by: 'loops', label: 'loops' },
  { by: 'factor', label: 'factor' },
  { by: 'shape', label: 'shape' },
];

/** The question that a result page answers beside its expansion: grouping, filters, page of the table. */
export interface View {
  readonly by: GroupBy;
  readonly show: 'plates' | 'table';
  readonly find: string;
  readonly flags: Readonly<Record<Flag, Ternary>>;
  readonly sort: string;
  readonly after: string;
}

export type Ternary = 'any' | 'true' | 'false';

/** Facts that a list can be narrowed by, each with the definition that its tooltip gives. */
export const FLAGS = [
  { flag: 'onePI', label: '1PI', definition: 'keep' },
  { flag: 'selfContraction', label: 'self-contraction', definition: 'self-contraction' },
  { flag: 'tadpole', label: 'tadpole', definition: 'tadpole' },
] as const;
export type Flag = (typeof FLAGS)[number]['flag'];

export const SORTS: readonly (readonly [string, string])[] = [
  ['position', 'canonical order'],
  ['loops', 'loops, fewest first'],
  ['-loops', 'loops, most first'],
  ['factor', 'factor, smallest first'],
  ['-factor', 'factor, largest first'],
  ['shape', 'shape'],
];

const ternary = (text: string | null): Ternary => (text === 'true' || text === 'false' ? text : 'any');

/** Reads the address of a result page; what it does not know falls back to the plain view. */
export function viewOf(query: URLSearchParams): View {
  const by = GROUPS.find((group) => group.by === query.get('by'))?.by ?? 'couplings';
  const sort = SORTS.find(([name]) => name === query.get('sort'))?.[0] ?? 'position';
  return {
    by,
    show: query.get('show') === 'table' ? 'table' : 'plates',
    find: (query.get('find') ?? '').slice(0, 200),
    flags: {
      onePI: ternary(query.get('onePI')),
      selfContraction: ternary(query.get('selfContraction')),
      tadpole: ternary(query.get('tadpole')),
    },
    sort,
    after: query.get('after') ?? '',
  };
}

/** The filter part of a view as the API's query. */
export function filterQuery({ find, flags }: Pick<View, 'find' | 'flags'>): Record<string, string> {
  const query: Record<string, string> = {};
  if (find.trim() !== '') query.find = find.trim();
  for (const [flag, value] of Object.entries(flags)) if (value !== 'any') query[flag] = value;
  return query;
}

/** Whether a view narrows the list at all. */
export const isNarrowed = (view: View): boolean => Object.keys(filterQuery(view)).length > 0;

/** The address of another view of the same page. */
export function addressOf(view: View, change: Partial<View>): string {
  const next = { ...view, after: '', ...change };
  const query = new URLSearchParams(filterQuery(next));
  if (next.by !== 'couplings') query.set('by', next.by);
  if (next.show !== 'plates') query.set('show', next.show);
  if (next.sort !== 'position') query.set('sort', next.sort);
  if (next.after !== '') query.set('after', next.after);
  const text = query.toString();
  return text === '' ? '?' : `?${text}`;
}

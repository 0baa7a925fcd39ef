import { keepPreviousData, useInfiniteQuery } from '@tanstack/react-query';
import { useVirtualizer } from '@tanstack/react-virtual';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { DiagramRow } from '#contract/api.ts';
import { couplingWords } from '#features/diagram/facts.ts';
import { FLAGS, type Flag, type Ternary } from '#features/expansion/view.ts';
import { useRested } from '#features/model/hooks.ts';
import { fetchDiagrams } from './api.ts';

interface Props {
  readonly expansion: string;
  readonly growth: number;
}

const ROW_PX = 40;
const AHEAD = 30;
const REST_MS = 200;

const yes = (fact: boolean): string => (fact ? 'yes' : 'no');

interface Column {
  readonly title: string;
  /** The server's name of this order, where it has one. */
  readonly sort: string | null;
  readonly number: boolean;
  readonly width: string;
  readonly text: (row: DiagramRow) => string;
}

const COLUMNS: readonly Column[] = [
  { title: 'No.', sort: 'position', number: true, width: '4.5rem', text: (row) => String(row.position) },
  {
    title: 'Couplings',
    sort: null,
    number: false,
    width: 'minmax(7rem, 1fr)',
    text: (row) => couplingWords(row.order),
  },
  { title: 'Loops', sort: 'loops', number: true, width: '5rem', text: (row) => String(row.loops) },
  { title: 'S', sort: 'factor', number: true, width: '6rem', text: (row) => row.symmetryFactor },
  { title: 'Contractions', sort: null, number: true, width: '9rem', text: (row) => row.pairings },
  { title: '1PI', sort: null, number: false, width: '4rem', text: (row) => yes(row.onePI) },
  { title: 'Tadpole', sort: null, number: false, width: '5rem', text: (row) => yes(row.hasTadpole) },
  { title: 'In words', sort: null, number: false, width: 'minmax(14rem, 3fr)', text: (row) => row.description },
];

const TEMPLATE = COLUMNS.map(({ width }) => width).join(' ');

/** The list as a table of any length: pages are fetched as they are scrolled to; the server finds, filters and sorts. */
export default function Table({ expansion, growth }: Props) {
  const [find, setFind] = useState('');
  const [flags, setFlags] = useState<Readonly<Record<Flag, Ternary>>>({
    onePI: 'any',
    selfContraction: 'any',
    tadpole: 'any',
  });
  const [sort, setSort] = useState('position');
  const rested = useRested(find.trim(), REST_MS);
  const query: Record<string, string> = { sort };
  if (rested !== '') query.find = rested;
  for (const { flag } of FLAGS) if (flags[flag] !== 'any') query[flag] = flags[flag];
  const list = useInfiniteQuery({
    queryKey: ['table', expansion, query, growth],
    queryFn: ({ pageParam, signal }) => fetchDiagrams(expansion, query, pageParam, signal),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
    placeholderData: keepPreviousData,
    retry: false,
  });
  const rows = useMemo(() => list.data?.pages.flatMap((page) => page.items) ?? [], [list.data]);
  const total = list.data?.pages[0]?.total ?? null;
  const turn = (name: string) => setSort((old) => (old === name ? `-${name}` : name));
  return (
    <div className="explorer-table">
      <div className="explorer-filters">
        <input
          className="input input-small"
          type="search"
          aria-label="Find in the list"
          placeholder="Find: #12, 1/6, S=6, two loops, not 1PI"
          value={find}
          maxLength={200}
          onChange={(event) => setFind(event.target.value)}
        />
        {FLAGS.map(({ flag, label }) => (
          <label key={flag} className="explorer-flag">
            {label}
            <select
              className="select input-small"
              value={flags[flag]}
              onChange={(event) => setFlags((old) => ({ ...old, [flag]: event.target.value as Ternary }))}
            >
              <option value="any">any</option>
              <option value="true">only</option>
              <option value="false">without</option>
            </select>
          </label>
        ))}
        <span className="hint" role="status">
          {list.error ? list.error.message : total === null ? 'Counting' : `${total.toLocaleString('en-GB')} diagrams`}
        </span>
      </div>
      <Rows
        rows={rows}
        sort={sort}
        turn={turn}
        expansion={expansion}
        total={total}
        more={list.hasNextPage && !list.isFetchingNextPage ? list.fetchNextPage : null}
      />
    </div>
  );
}

interface RowsProps {
  readonly rows: DiagramRow[];
  readonly sort: string;
  readonly turn: (name: string) => void;
  readonly expansion: string;
  readonly total: number | null;
  readonly more: (() => unknown) | null;
}

const ariaSort = (sort: string, name: string | null): 'ascending' | 'descending' | 'none' | undefined => {
  if (name === null) return undefined;
  if (sort === name) return 'ascending';
  return sort === `-${name}` ? 'descending' : 'none';
};

function Rows({ rows, sort, turn, expansion, total, more }: RowsProps) {
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: rows.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW_PX,
    overscan: 8,
  });
  const items = virtual.getVirtualItems();
  const last = items.at(-1)?.index ?? 0;
  useEffect(() => {
    if (more && last > rows.length - AHEAD) more();
  }, [more, last, rows.length]);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: keys scroll it only when it takes the focus
    <section className="grid-table" aria-label="Diagrams" ref={scroller} tabIndex={0}>
      <table className="grid" aria-rowcount={total === null ? -1 : total + 1}>
        <thead>
          <tr className="grid-row grid-head" style={{ gridTemplateColumns: TEMPLATE }}>
            {COLUMNS.map(({ title, sort: name, number }) => (
              <th key={title} scope="col" className={number ? 'n' : ''} aria-sort={ariaSort(sort, name)}>
                {name === null ? (
                  title
                ) : (
                  <button type="button" className="link-btn" onClick={() => turn(name)}>
                    {title}
                    {sort === name ? ' ↑' : sort === `-${name}` ? ' ↓' : ''}
                  </button>
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody className="grid-body" style={{ height: virtual.getTotalSize() }}>
          {items.map((item) => (
            <tr
              key={item.key}
              aria-rowindex={item.index + 2}
              className="grid-row"
              style={{ gridTemplateColumns: TEMPLATE, transform: `translateY(${item.start}px)` }}
            >
              {COLUMNS.map(({ title, number, text }, at) => (
                <td key={title} className={number ? 'n' : ''}>
                  {at === 0 ? (
                    <a href={`/expansions/${expansion}/diagrams/${rows[item.index]!.id}`}>{text(rows[item.index]!)}</a>
                  ) : (
                    text(rows[item.index]!)
                  )}
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {rows.length === 0 && <p className="notice">No diagram fits.</p>}
    </section>
  );
}

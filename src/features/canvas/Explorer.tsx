import { QueryClient, QueryClientProvider, useQuery } from '@tanstack/react-query';
import { lazy, Suspense, useEffect, useState } from 'react';
import type { GroupBy } from '#contract/api.ts';
import { useAlive, useRested } from '#features/model/hooks.ts';
import { fetchAll } from './api.ts';
import { useGrowth } from './data.ts';

const Canvas = lazy(() => import('./Canvas.tsx'));
const Table = lazy(() => import('./Table.tsx'));

interface Props {
  readonly expansion: string;
  readonly by: GroupBy;
  readonly count: number;
}

type Show = 'canvas' | 'plates' | 'table';
const VIEWS: readonly (readonly [Show, string])[] = [
  ['canvas', 'Canvas'],
  ['plates', 'Plates'],
  ['table', 'Table'],
];
const KEPT = 'wickwork result view';
const FIND_MS = 250;
const MOST_FOUND = 500;

export default function Explorer(props: Props) {
  const [client] = useState(() => new QueryClient({ defaultOptions: { queries: { retry: 2 } } }));
  return (
    <QueryClientProvider client={client}>
      <Views {...props} />
    </QueryClientProvider>
  );
}

/** The view that was chosen last; at first the canvas, on a narrow screen the plates. */
function firstView(): Show {
  const kept = window.localStorage.getItem(KEPT);
  if (kept === 'canvas' || kept === 'plates' || kept === 'table') return kept;
  return window.matchMedia('(min-width: 48rem)').matches ? 'canvas' : 'plates';
}

function useFound(expansion: string, find: string) {
  const rested = useRested(find.trim(), FIND_MS);
  const query = useQuery({
    queryKey: ['find', expansion, rested],
    queryFn: async ({ signal }) => {
      const rows = await fetchAll(expansion, { find: rested }, MOST_FOUND, signal);
      return new Set(rows.map(({ position }) => position));
    },
    enabled: rested !== '',
    retry: false,
  });
  return { found: rested === '' ? null : (query.data ?? null), refused: query.error?.message ?? null };
}

function Views({ expansion, by, count }: Props) {
  const alive = useAlive();
  const growth = useGrowth();
  const [show, setShow] = useState<Show>('plates');
  const [find, setFind] = useState('');
  const { found, refused } = useFound(expansion, find);
  useEffect(() => setShow(firstView()), []);
  useEffect(() => {
    const plates = document.querySelector<HTMLElement>('[data-server-plates]');
    if (plates) plates.hidden = show !== 'plates';
  }, [show]);
  if (!alive) return null;
  const choose = (next: Show) => {
    setShow(next);
    window.localStorage.setItem(KEPT, next);
  };
  return (
    <div className="explorer">
      <div className="explorer-bar">
        <fieldset className="strip">
          <legend className="sr-only">Show the list as</legend>
          {VIEWS.map(([name, label]) => (
            <button key={name} type="button" aria-pressed={show === name} onClick={() => choose(name)}>
              {label}
            </button>
          ))}
        </fieldset>
        {show === 'canvas' && (
          <label className="explorer-find">
            <span className="sr-only">Find on the canvas</span>
            <input
              className="input input-small"
              type="search"
              placeholder="Find: #12, S=6, two loops"
              value={find}
              maxLength={200}
              onChange={(event) => setFind(event.target.value)}
            />
          </label>
        )}
        {show === 'canvas' && find.trim() !== '' && (
          <span className="hint" role="status">
            {refused ?? (found ? `${found.size} found` : 'Looking')}
          </span>
        )}
      </div>
      <Suspense fallback={<p className="loading">Loading</p>}>
        {show === 'canvas' && <Canvas expansion={expansion} by={by} count={count} growth={growth} found={found} />}
        {show === 'table' && <Table expansion={expansion} growth={growth} />}
      </Suspense>
    </div>
  );
}

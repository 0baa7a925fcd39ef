import type { DiagramRow, GroupBy, Page, Plate, Problem } from '#contract/api.ts';

/** Reads from the API; a refusal becomes an error with its sentence. */
export async function read<T>(path: string, signal?: AbortSignal): Promise<T> {
  const reply = await fetch(`/api/v1${path}`, { signal: signal ?? null, headers: { accept: 'application/json' } });
  if (reply.ok) return (await reply.json()) as T;
  const problem = (await reply.json().catch(() => null)) as Problem | null;
  throw new Error(problem?.error.message ?? `The server answered ${reply.status}.`);
}

export interface Plates {
  readonly items: readonly Plate[];
  readonly total: number | null;
}

export const fetchPlates = (expansion: string, by: GroupBy, signal?: AbortSignal): Promise<Plates> =>
  read(`/expansions/${expansion}/plates?by=${by}`, signal);

const PAGE = 500;

/** One page of the list. */
export function fetchDiagrams(
  expansion: string,
  query: Readonly<Record<string, string>>,
  after: string | null,
  signal?: AbortSignal,
): Promise<Page<DiagramRow>> {
  const text = new URLSearchParams({ limit: String(PAGE), ...query, ...(after ? { after } : {}) });
  return read(`/expansions/${expansion}/diagrams?${text}`, signal);
}

/** Pages one after the other until there are no more, or `most` rows. */
export async function fetchAll(
  expansion: string,
  query: Readonly<Record<string, string>>,
  most: number,
  signal?: AbortSignal,
): Promise<DiagramRow[]> {
  const rows: DiagramRow[] = [];
  for (let after: string | null = null; ; ) {
    const page: Page<DiagramRow> = await fetchDiagrams(expansion, query, after, signal);
    rows.push(...page.items);
    after = page.next;
    if (after === null || rows.length >= most) return rows;
  }
}

/** The query that picks the members of a plate. */
export const memberQuery = (by: GroupBy, key: string): Record<string, string> =>
  ({ couplings: { order: key }, loops: { loops: key }, factor: { factor: key }, shape: { shape: key } })[by];

import type { DiagramRow, ExpansionRecord, Page, Plate } from '#contract/api.ts';
import { filterQuery, isNarrowed, type View } from '#features/expansion/view.ts';
import type { DiagramFilter } from '#server/diagram-query.ts';
import { listDiagrams, platesPage } from '#server/diagrams.ts';
import { getExpansion } from '#server/expansions.ts';
import { errorOf, isAnswer } from '#server/refusal.ts';
import type { Viewer } from '#server/viewer.ts';

/** Diagrams that the server draws into the page itself; the rest comes when it is asked for. */
const DRAWN = 60;
const FIGURES = 24;
const PLATES = 40;
const ROWS = 50;

export interface ShownPlate extends Plate {
  readonly diagrams: readonly DiagramRow[];
}

/** What a result page shows of its list. */
export interface Result {
  readonly record: ExpansionRecord;
  readonly plates: readonly ShownPlate[];
  /** Groups in all; more than `plates` when there are many. */
  readonly groups: number;
  /** The narrowed list, or one page of the table. */
  readonly table: Page<DiagramRow> | null;
}

/** The expansion of an address, or null when there is none that the viewer may see. */
export function foundExpansion(viewer: Viewer, id: string | undefined): ExpansionRecord | null {
  try {
    return getExpansion(viewer, id ?? '');
  } catch (error) {
    if (isAnswer(error) && errorOf(error).code === 'not-found') return null;
    throw error;
  }
}

const GROUP_FILTER = {
  couplings: (key: string): DiagramFilter => ({ order: key }),
  loops: (key: string): DiagramFilter => ({ loops: Number(key) }),
  factor: (key: string): DiagramFilter => ({ factor: key }),
  shape: (key: string): DiagramFilter => ({ shape: key }),
} as const;

function platesOf(viewer: Viewer, id: string, { by }: View): { plates: ShownPlate[]; groups: number } {
  const { items, total } = platesPage(viewer, id, by);
  let left = DRAWN;
  const plates = items.slice(0, PLATES).map((plate) => {
    const limit = Math.min(FIGURES, plate.count, left);
    left -= limit;
    const diagrams = limit > 0 ? listDiagrams(viewer, id, { ...GROUP_FILTER[by](plate.key), limit }).items : [];
    return { ...plate, diagrams };
  });
  return { plates, groups: total };
}

const hasList = ({ state, summary, progress }: ExpansionRecord): boolean =>
  (state === 'complete' && summary?.state !== 'none') || (state === 'running' && progress.classes > 0);

/** Everything that the server puts into a result page. @throws Refusal for a filter that is none. */
export function resultOf(viewer: Viewer, record: ExpansionRecord, view: View): Result {
  const empty: Result = { record, plates: [], groups: 0, table: null };
  if (!hasList(record)) return empty;
  if (view.show === 'table' || isNarrowed(view)) {
    const filter = { ...filterQuery(view), sort: view.sort, limit: ROWS } as DiagramFilter;
    const asked = view.after === '' ? filter : { ...filter, after: view.after };
    return { ...empty, table: listDiagrams(viewer, record.id, asked) };
  }
  return { ...empty, ...platesOf(viewer, record.id, view) };
}

import { useQueries, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { DiagramRow, GroupBy } from '#contract/api.ts';
import { fetchAll, fetchPlates, memberQuery } from './api.ts';
import type { OpenPlate } from './arrange.ts';
import { sorted } from './sort.ts';

/** Diagrams that are put on the canvas at once; larger lists show their plates first and open on demand. */
export const AT_ONCE = 500;
const STEP = 200;

/** Counts up whenever a running computation has stored more diagrams (features/expansion/follow.ts says so). */
export function useGrowth(): number {
  const [growth, setGrowth] = useState(0);
  useEffect(() => {
    const grow = () => setGrowth((old) => old + 1);
    window.addEventListener('wickwork:diagrams', grow);
    return () => window.removeEventListener('wickwork:diagrams', grow);
  }, []);
  return growth;
}

export interface CanvasData {
  readonly plates: readonly OpenPlate[];
  readonly total: number;
  readonly pending: boolean;
  readonly error: string | null;
  /** Puts more diagrams of a plate on the canvas; null for a list that is there whole. */
  readonly open: ((key: string) => void) | null;
}

/** Plates with their diagrams: all of a list of up to 500, else those that were opened. */
export function useCanvasData(expansion: string, by: GroupBy, count: number, growth: number): CanvasData {
  const whole = count <= AT_ONCE;
  const [wanted, setWanted] = useState<ReadonlyMap<string, number>>(new Map());
  const plates = useQuery({
    queryKey: ['plates', expansion, by, growth],
    queryFn: ({ signal }) => fetchPlates(expansion, by, signal),
    staleTime: Number.POSITIVE_INFINITY,
    placeholderData: (old) => old,
  });
  const keys = plates.data?.items.map(({ key }) => key) ?? [];
  const list = useQuery({
    queryKey: ['diagrams', expansion, growth],
    queryFn: ({ signal }) => fetchAll(expansion, {}, AT_ONCE, signal),
    enabled: whole,
    staleTime: Number.POSITIVE_INFINITY,
    placeholderData: (old) => old,
  });
  const asked = whole ? [] : [...wanted.keys()];
  const members = useQueries({
    queries: asked.map((key) => ({
      queryKey: ['members', expansion, by, key, wanted.get(key), growth],
      queryFn: ({ signal }: { signal: AbortSignal }) =>
        fetchAll(expansion, memberQuery(by, key), wanted.get(key) ?? STEP, signal),
      staleTime: Number.POSITIVE_INFINITY,
    })),
  });
  const rowsOf = new Map<string, readonly DiagramRow[]>(
    whole && list.data && plates.data ? sorted(by, plates.data.items, list.data) : [],
  );
  asked.forEach((key, at) => {
    const rows = members[at]?.data;
    if (rows) rowsOf.set(key, rows);
  });
  const error = plates.error ?? list.error ?? members.find((member) => member.error)?.error ?? null;
  return {
    plates: (plates.data?.items ?? []).map((plate) => ({ plate, rows: rowsOf.get(plate.key) ?? [] })),
    total: plates.data?.total ?? keys.length,
    pending: plates.isPending || (whole && list.isPending) || members.some((member) => member.isLoading),
    error: error?.message ?? null,
    open: whole ? null : (key) => setWanted((old) => new Map(old).set(key, (old.get(key) ?? 0) + STEP)),
  };
}

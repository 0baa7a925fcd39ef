import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useReducer, useState } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import { fetchPreview } from './api.ts';
import { type Draft, inputOf } from './draft.ts';
import { begin, change, type History, redo, undo } from './history.ts';

/** The value as it was when it last rested for `ms`. */
export function useRested<T>(value: T, ms: number): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(value), ms);
    return () => clearTimeout(timer);
  }, [value, ms]);
  return rested;
}

/** Whether the island is alive: what needs JavaScript is hidden until then. */
export function useAlive(): boolean {
  const [alive, setAlive] = useState(false);
  useEffect(() => setAlive(true), []);
  return alive;
}

const REST_MS = 30;

/**
 * The preview of a draft: asked for 30 ms after the last change; a stale question is aborted, and its answer never shown
 * over a newer one. Until the new answer is there the old one stands.
 */
export function usePreview(draft: Draft, first: { readonly draft: Draft; readonly preview: ModelPreview }) {
  const asked = useRested(JSON.stringify(inputOf(draft)), REST_MS);
  const query = useQuery({
    queryKey: ['preview', asked],
    queryFn: ({ signal }) => fetchPreview(JSON.parse(asked), signal),
    ...(asked === JSON.stringify(inputOf(first.draft)) ? { initialData: first.preview } : {}),
    placeholderData: keepPreviousData,
    staleTime: Number.POSITIVE_INFINITY,
    gcTime: 60_000,
    retry: 1,
  });
  return {
    preview: query.data ?? first.preview,
    /** The preview belongs to the text as it stands now. */
    current: !query.isPlaceholderData && asked === JSON.stringify(inputOf(draft)),
    failed: query.error,
  };
}

type Step = { readonly to: Draft; readonly tag: string; readonly at: number } | 'undo' | 'redo';

function step(history: History<Draft>, action: Step): History<Draft> {
  if (action === 'undo') return undo(history);
  if (action === 'redo') return redo(history);
  return change(history, action.to, action.tag, action.at);
}

/** The draft with undo and redo. `edit` merges a change; edits with one tag within a second are one step. */
export function useDraft(first: Draft) {
  const [history, dispatch] = useReducer(step, first, begin);
  return {
    draft: history.present,
    canUndo: history.past.length > 0,
    canRedo: history.future.length > 0,
    edit: (part: Partial<Draft>, tag = '') => dispatch({ to: { ...history.present, ...part }, tag, at: Date.now() }),
    undo: () => dispatch('undo'),
    redo: () => dispatch('redo'),
  };
}

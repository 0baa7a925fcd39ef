import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { Estimate } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import type { ModelInput } from '#contract/request.ts';
import { ApiError, call } from '#features/model/api.ts';
import { useRested } from '#features/model/hooks.ts';
import { type Ask, queryOf, requestOf } from './ask.ts';

/** What is known of the cost of a question. */
export interface Known {
  readonly estimate: Estimate | null;
  readonly refused: ErrorObject | null;
}

const REST_MS = 250;
/** Addresses longer than this are not written: some servers between refuse them. */
const LONGEST_ADDRESS = 6000;

const fetchEstimate = async (body: string, signal: AbortSignal): Promise<Known> => {
  try {
    const estimate = await call<Estimate>('/expansions/estimate', 'POST', JSON.parse(body), signal);
    return { estimate, refused: null };
  } catch (error) {
    if (error instanceof ApiError && error.error && error.status < 500) return { estimate: null, refused: error.error };
    throw error;
  }
};

/**
 * The estimate of a question, asked for a quarter of a second after the last change; the one for an older question stands
 * until then, marked as not current. `first` is what the server put into the page.
 */
export function useEstimate(input: ModelInput, ask: Ask, first: Known & { readonly body: string }, readable: boolean) {
  const body = JSON.stringify(requestOf(input, { ...ask, title: '' }));
  const rested = useRested(body, REST_MS);
  const query = useQuery({
    queryKey: ['estimate', rested],
    queryFn: ({ signal }) => fetchEstimate(rested, signal),
    ...(rested === first.body && (first.estimate || first.refused) ? { initialData: first as Known } : {}),
    placeholderData: keepPreviousData,
    enabled: readable,
    staleTime: 30_000,
    retry: 1,
  });
  return {
    known: readable ? (query.data ?? { estimate: null, refused: null }) : { estimate: null, refused: null },
    current: body === rested && !query.isPlaceholderData && !query.isFetching,
    /** No answer came. */
    failed: query.error === null ? null : query.error.message,
  };
}

/** Keeps the question in the address, so that reloading, going back and sending the link lose nothing. @returns it */
export function useAddress(
  source: { readonly model: string; readonly revision: string } | null,
  input: ModelInput,
  ask: Ask,
) {
  const query = queryOf(ask);
  if (source) {
    query.set('model', source.model);
    query.set('revision', source.revision);
  } else if ((input.lagrangian ?? '').trim() !== '') query.set('input', JSON.stringify(input));
  const address = useRested(`/expansions/new?${query}`, REST_MS);
  useEffect(() => {
    if (address.length < LONGEST_ADDRESS) window.history.replaceState(window.history.state, '', address);
  }, [address]);
  return address;
}

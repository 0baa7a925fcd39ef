import { type Draft, inputOf } from './draft.ts';

/** Where an expansion of this draft is composed: by the id of the stored model, else with the model itself in the address. */
export function expandAddress(id: string | null, draft: Draft): string {
  return `/expansions/new?${id === null ? new URLSearchParams({ input: JSON.stringify(inputOf(draft)) }) : `model=${id}`}`;
}

import type { ExpansionRequest } from '#contract/request.ts';
import { type Prepared, prepare } from '#engine/index.ts';

const KEPT = 300;
const cache = new Map<string, Prepared>();

/** A stored request read again: names, rules and conventions to render a body with. The last few hundred are kept. */
export function preparedOf(expansionId: string, request: ExpansionRequest): Prepared {
  const known = cache.get(expansionId);
  if (known) {
    cache.delete(expansionId);
    cache.set(expansionId, known);
    return known;
  }
  const prepared = prepare(request);
  cache.set(expansionId, prepared);
  if (cache.size > KEPT) cache.delete(cache.keys().next().value!);
  return prepared;
}

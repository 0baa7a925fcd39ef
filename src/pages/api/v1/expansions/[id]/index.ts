import { endpoint, json, noContent } from '#server/endpoint.ts';
import { cancelExpansion, getExpansion, removeExpansion } from '#server/expansions.ts';

export const { GET, DELETE, ALL } = endpoint({
  GET: (call) => json(getExpansion(call.viewer, call.param('id'))),
  /** Ends a computation under way (200 with what it is now); removes one that has ended (204). */
  DELETE: (call) => {
    const id = call.param('id');
    const { state } = getExpansion(call.viewer, id);
    if (state === 'queued' || state === 'running') return json(cancelExpansion(call.viewer, id));
    removeExpansion(call.viewer, id);
    return noContent();
  },
});

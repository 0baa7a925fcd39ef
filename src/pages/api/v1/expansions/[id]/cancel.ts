import { endpoint, json } from '#server/endpoint.ts';
import { cancelExpansion } from '#server/expansions.ts';

/** Ends a computation under way; one that has ended stays as it is (409), whatever DELETE would do with it. */
export const { POST, ALL } = endpoint({ POST: (call) => json(cancelExpansion(call.viewer, call.param('id'))) });

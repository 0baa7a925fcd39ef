import { expansionRequestSchema } from '#contract/request.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { estimateExpansion } from '#server/expansions.ts';

export const { POST, ALL } = endpoint({
  POST: async (call) => json(estimateExpansion(call.viewer, await call.body(expansionRequestSchema))),
});

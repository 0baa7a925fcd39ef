import { endpoint, json } from '#server/endpoint.ts';
import { retryExpansion } from '#server/expansions.ts';

export const { POST, ALL } = endpoint({
  POST: (call) => {
    const expansion = retryExpansion(call.viewer, call.param('id'));
    return json(expansion, 202, { location: `/api/v1/expansions/${expansion.id}`, 'retry-after': '1' });
  },
});

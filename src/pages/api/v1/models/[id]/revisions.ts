import { endpoint, json } from '#server/endpoint.ts';
import { listRevisions } from '#server/models.ts';

export const { GET, ALL } = endpoint({ GET: (call) => json({ items: listRevisions(call.viewer, call.param('id')) }) });

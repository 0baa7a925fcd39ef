import { listPlates } from '#server/diagrams.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { platesQuery } from '#server/schemas.ts';

export const { GET, ALL } = endpoint({
  GET: (call) => json({ items: listPlates(call.viewer, call.param('id'), call.query(platesQuery).by) }),
});

import { platesPage } from '#server/diagrams.ts';
import { endpoint } from '#server/endpoint.ts';
import { immutable } from '#server/immutable.ts';
import { platesQuery } from '#server/schemas.ts';

export const { GET, ALL } = endpoint({
  GET: (call) => immutable(call, () => platesPage(call.viewer, call.param('id'), call.query(platesQuery).by)),
});

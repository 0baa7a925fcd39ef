import { getLedger } from '#server/diagrams.ts';
import { endpoint } from '#server/endpoint.ts';
import { immutable } from '#server/immutable.ts';

export const { GET, ALL } = endpoint({
  GET: (call) => immutable(call, () => getLedger(call.viewer, call.param('id'))),
});

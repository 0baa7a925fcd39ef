import { getDiagram } from '#server/diagrams.ts';
import { endpoint } from '#server/endpoint.ts';
import { immutable } from '#server/immutable.ts';

/** One diagram, by its bare label or its position in the list. */
export const { GET, ALL } = endpoint({
  GET: (call) => immutable(call, () => getDiagram(call.viewer, call.param('id'), call.param('label'))),
});

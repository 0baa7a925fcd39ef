import { getDiagram } from '#server/diagrams.ts';
import { endpoint, json } from '#server/endpoint.ts';

/** One diagram, by its bare label or its position in the list. */
export const { GET, ALL } = endpoint({
  GET: (call) => json(getDiagram(call.viewer, call.param('id'), call.param('label'))),
});

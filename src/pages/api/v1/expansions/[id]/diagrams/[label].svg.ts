import { diagramFile } from '#server/diagram-file.ts';
import { getDiagram } from '#server/diagrams.ts';
import { endpoint } from '#server/endpoint.ts';
import { immutable } from '#server/immutable.ts';

/** The drawing of one diagram as a file, by the same names as the diagram itself. */
export const { GET, ALL } = endpoint({
  GET: (call) => immutable(call, () => getDiagram(call.viewer, call.param('id'), call.param('label')), diagramFile),
});

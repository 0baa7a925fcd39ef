import { svgOf } from '#engine/index.ts';
import { getDiagram } from '#server/diagrams.ts';
import { endpoint } from '#server/endpoint.ts';

/** The drawing of one diagram as a file that stands by itself; 404 where the diagram's page is. */
export const { GET, ALL } = endpoint({
  GET: (call) => {
    const { drawing, position, description, symmetryFactor } = getDiagram(
      call.viewer,
      call.param('id'),
      call.param('label'),
    );
    const file = svgOf(drawing, { title: `Diagram ${position}, S = ${symmetryFactor}`, description });
    return new Response(file, {
      headers: { 'content-type': 'image/svg+xml; charset=utf-8', 'cache-control': 'private, no-cache' },
    });
  },
});

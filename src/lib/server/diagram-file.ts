import type { DiagramPageData } from '#contract/api.ts';
import { ENGINE_VERSION, svgOf } from '#engine/index.ts';

/** What a reader must know who finds the drawing alone: the diagram in words, couplings, factor, what made it. */
function descriptionOf({ description, order, symmetryFactor }: DiagramPageData): string {
  const powers = Object.entries(order).map(([coupling, power]) =>
    power === '1' ? coupling : `${coupling}^(${power})`,
  );
  return [
    description,
    `Couplings: ${powers.join(' ') || 'none'}; symmetry factor S = ${symmetryFactor}, weight 1/S`,
    `external legs labelled; made by Wickwork ${ENGINE_VERSION}`,
  ].join('. ');
}

/** The drawing of one diagram as an SVG file that stands by itself, to be stored under its bare label. */
export function diagramFile(diagram: DiagramPageData, status: number, headers: Record<string, string>): Response {
  const { drawing, position, symmetryFactor, bare } = diagram;
  const title = `Diagram ${position}, S = ${symmetryFactor}`;
  return new Response(svgOf(drawing, { title, description: descriptionOf(diagram) }), {
    status,
    headers: {
      ...headers,
      'content-type': 'image/svg+xml; charset=utf-8',
      'content-disposition': `attachment; filename="wickwork-${bare}.svg"`,
      'x-content-type-options': 'nosniff',
    },
  });
}

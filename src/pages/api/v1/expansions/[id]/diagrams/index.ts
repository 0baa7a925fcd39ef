import { z } from 'zod';
import type { DiagramFilter } from '#server/diagram-query.ts';
import { listDiagrams } from '#server/diagrams.ts';
import { endpoint, json } from '#server/endpoint.ts';

/** Values are checked by the list itself, which pages call too. */
const anyQuery = z.record(z.string(), z.string());

export const { GET, ALL } = endpoint({
  GET: (call) => {
    const page = listDiagrams(call.viewer, call.param('id'), call.query(anyQuery) as DiagramFilter);
    if (page.next === null) return json(page);
    const next = new URL(call.context.url);
    next.searchParams.set('after', page.next);
    return json(page, 200, { link: `<${next.pathname}${next.search}>; rel="next"` });
  },
});

import { downloadExpansion } from '#server/download.ts';
import { endpoint } from '#server/endpoint.ts';

/** download.json and download.csv: the whole result, streamed. */
export const { GET, ALL } = endpoint({
  GET: (call) => downloadExpansion(call.viewer, call.param('id'), call.param('format')),
});

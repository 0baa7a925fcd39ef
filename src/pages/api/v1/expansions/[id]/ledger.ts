import { getLedger } from '#server/diagrams.ts';
import { endpoint, json } from '#server/endpoint.ts';

export const { GET, ALL } = endpoint({ GET: (call) => json(getLedger(call.viewer, call.param('id'))) });

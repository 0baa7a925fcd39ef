import { endpoint } from '#server/endpoint.ts';
import { eventStream } from '#server/events.ts';

export const { GET, ALL } = endpoint({ GET: (call) => eventStream(call.viewer, call.param('id')) });

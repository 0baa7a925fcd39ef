import type { ExpansionEvent } from '#contract/api.ts';
import { getExpansion, subscribe } from './expansions.ts';
import type { Viewer } from './viewer.ts';

const BEAT_MS = 15_000;
const MAX_MS = 3_600_000;

const encode = (event: ExpansionEvent): Uint8Array =>
  new TextEncoder().encode(`event: ${event.type}\ndata: ${JSON.stringify(event)}\n\n`);

const isLast = (event: ExpansionEvent): boolean =>
  event.type === 'state' && event.state !== 'queued' && event.state !== 'running';

/**
 * Server-sent events of one expansion. The present state comes first, so that nobody misses what happened before;
 * the stream ends with the state the expansion ends in. A beat keeps proxies from closing it.
 */
export function eventStream(viewer: Viewer, id: string): Response {
  const before = getExpansion(viewer, id);
  let stop: () => void = () => {};
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      const send = (event: ExpansionEvent) => {
        controller.enqueue(encode(event));
        if (isLast(event)) end();
      };
      let open = true;
      const end = () => {
        if (!open) return;
        open = false;
        stop();
        controller.close();
      };
      const beat = setInterval(() => controller.enqueue(new TextEncoder().encode(': beat\n\n')), BEAT_MS);
      const limit = setTimeout(end, MAX_MS);
      const unsubscribe = subscribe(viewer, id, send);
      stop = () => {
        open = false;
        clearInterval(beat);
        clearTimeout(limit);
        unsubscribe?.();
      };
      send({ type: 'progress', progress: before.progress });
      send({ type: 'state', state: before.state });
    },
    cancel: () => stop(),
  });
  return new Response(body, {
    headers: {
      'content-type': 'text/event-stream; charset=utf-8',
      'cache-control': 'no-store',
      'x-accel-buffering': 'no',
    },
  });
}

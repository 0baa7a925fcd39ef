import { ENGINE_VERSION } from '#engine/index.ts';
import { type Call, json } from './endpoint.ts';
import { readable } from './expansions.ts';
import { sha256 } from './ids.ts';

/** What a part of an expansion's answer depends on, when it can no longer change. */
function tagOf(call: Call): string | null {
  const { id, state, contentHash } = readable(call.viewer, call.param('id'));
  if (state !== 'complete') return null;
  const { pathname, search } = call.context.url;
  return `"${sha256([ENGINE_VERSION, id, contentHash, pathname, search].join('\n')).slice(0, 32)}"`;
}

/**
 * Answers a part of an expansion; of a complete one with an ETag, and 304 to who has it: nothing is rendered again.
 * The right to read it is checked each time. `reply` writes what was made, as JSON unless told otherwise.
 */
export function immutable<T>(
  call: Call,
  make: () => T,
  reply: (made: T, status: number, headers: Record<string, string>) => Response = json,
): Response {
  const etag = tagOf(call);
  if (etag === null) return reply(make(), 200, {});
  const headers = { etag, 'cache-control': 'private, no-cache' };
  const known = call.context.request.headers.get('if-none-match') ?? '';
  if (known.split(',').some((entry) => entry.trim().replace(/^W\//, '') === etag))
    return new Response(null, { status: 304, headers });
  return reply(make(), 200, headers);
}

import type { APIRoute } from 'astro';
import { problem } from '#server/endpoint.ts';

/** Every other address under /api/v1. */
export const ALL: APIRoute = ({ url, locals }) => {
  const message = `There is nothing at ${url.pathname.slice(0, 200)}. The addresses of the API are listed at /docs/api.`;
  return problem({ code: 'not-found', message, line: null, column: null }, locals.requestId);
};

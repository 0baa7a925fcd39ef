import type { APIRoute } from 'astro';
import { readiness } from '#server/health.ts';

/** The process can do its work: the database takes writes and there is room on the disk. */
export const GET: APIRoute = () => {
  const state = readiness();
  return Response.json(state, { status: state.ok ? 200 : 503 });
};

import type { APIRoute } from 'astro';

/** The process answers. */
export const GET: APIRoute = () => Response.json({ ok: true });

import { randomUUID } from 'node:crypto';
import type { APIContext, MiddlewareHandler } from 'astro';
import { userOf } from '#server/accounts.ts';
import { type CookieToSet, sessionOf } from '#server/auth.ts';
import { problem, problemOf } from '#server/endpoint.ts';
import { keepHouse } from '#server/housekeeping.ts';
import { newSecret, sha256 } from '#server/ids.ts';
import { knownOrigins, mayChange } from '#server/origin.ts';
import { runtime } from '#server/runtime.ts';
import type { Viewer } from '#server/viewer.ts';

const VISITOR_SECONDS = 86_400;
const API_USES = 1_200;
const API_SECONDS = 60;

const setCookie = (context: APIContext, cookie: CookieToSet): void =>
  context.cookies.set(cookie.name, cookie.value, cookie.attributes);

function visitorOf(context: APIContext): string | null {
  const secret = context.cookies.get('visitor')?.value;
  return secret && /^[0-9a-f]{40}$/.test(secret) ? sha256(secret) : null;
}

function themeOf(context: APIContext): App.Locals['theme'] {
  const value = context.cookies.get('theme')?.value;
  return value === 'light' || value === 'dark' ? value : 'system';
}

async function viewerOf(context: APIContext, address: string): Promise<Viewer> {
  const session = await sessionOf(context.request.headers.get('cookie') ?? '');
  if (session?.cookie) setCookie(context, session.cookie);
  const visitor = session ? null : visitorOf(context);
  return { user: session && userOf(session.user), session: session?.publicId ?? null, visitor, address };
}

/** Our own server passes the address it trusts; the development server knows only the socket's. */
function addressOf(context: APIContext): string {
  if (context.locals.address !== undefined) return context.locals.address;
  try {
    return context.clientAddress;
  } catch {
    return '';
  }
}

/** A visitor cookie, so that what this browser computes can be found again for a day. */
function visitorCookie(context: APIContext, viewer: Viewer): void {
  if (viewer.user || viewer.visitor) return;
  const secret = newSecret();
  context.cookies.set('visitor', secret, {
    httpOnly: true,
    secure: runtime().config.secureCookies,
    sameSite: 'lax',
    path: '/',
    maxAge: VISITOR_SECONDS,
  });
  viewer.visitor = sha256(secret);
}

const isApi = (context: APIContext): boolean => context.url.pathname.startsWith('/api/');

function refuseCrossSite(context: APIContext, requestId: string): Response {
  const message = 'This request came from another site, so it was not carried out.';
  if (isApi(context)) return problem({ code: 'not-allowed', message, line: null, column: null }, requestId);
  return new Response(message, { status: 403, headers: { 'content-type': 'text/plain; charset=utf-8' } });
}

/** Every request: who asks, may it change anything, how often; then the page or route; then how long it may be kept. */
export const onRequest: MiddlewareHandler = async (context, next) => {
  const { locals } = context;
  locals.requestId ??= randomUUID();
  const { config, rates } = runtime();
  keepHouse();
  if (!mayChange(context.request, knownOrigins(config))) return refuseCrossSite(context, locals.requestId);
  const address = addressOf(context);
  try {
    if (isApi(context))
      rates.take(`api ${address}`, API_USES, API_SECONDS, 'Too many requests from this address. Wait a little.');
    locals.viewer = await viewerOf(context, address);
  } catch (error) {
    return problemOf(error, locals.requestId);
  }
  locals.user = locals.viewer.user;
  locals.theme = themeOf(context);
  locals.becomeVisitor = () => visitorCookie(context, locals.viewer);
  const response = await next();
  if (response.headers.get('content-type') === 'text/html')
    response.headers.set('content-type', 'text/html; charset=utf-8');
  if (!response.headers.has('cache-control'))
    response.headers.set('cache-control', locals.user || isApi(context) ? 'private, no-store' : 'private, no-cache');
  return response;
};

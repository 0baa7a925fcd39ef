import type { APIContext, APIRoute } from 'astro';
import type { z } from 'zod';
import type { Problem } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import { parseJson } from '#contract/json.ts';
import { LIMITS } from '#contract/limits.ts';
import { validate } from '#contract/validate.ts';
import { errorOf, isAnswer, Refusal, statusOf } from './refusal.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

/** One request to the API: every handler has the same shape, parse → may? → resource function → reply. */
export interface Call {
  readonly viewer: Viewer;
  readonly context: APIContext;
  /** A path parameter. */
  param(name: string): string;
  /** The query string, checked; a key given twice or unknown is an error. */
  query<Schema extends z.ZodType>(schema: Schema): z.output<Schema>;
  /** The JSON body, checked. */
  body<Schema extends z.ZodType>(schema: Schema): Promise<z.output<Schema>>;
}

export type Handler = (call: Call) => Response | Promise<Response>;
export type Method = 'GET' | 'POST' | 'PUT' | 'DELETE';

const JSON_TYPE = 'application/json; charset=utf-8';

export function json(value: unknown, status = 200, headers: Record<string, string> = {}): Response {
  return new Response(JSON.stringify(value), { status, headers: { 'content-type': JSON_TYPE, ...headers } });
}

export const noContent = (): Response => new Response(null, { status: 204 });

const TITLES: Record<number, string> = {
  400: 'Malformed request',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  405: 'Method not allowed',
  409: 'Conflict',
  413: 'Too large',
  422: 'Invalid input',
  429: 'Too many requests',
  500: 'Defect',
  503: 'Busy',
};

/** problem+json (RFC 9457) with the one error object inside. */
export function problem(error: ErrorObject, requestId: string, headers: Record<string, string> = {}): Response {
  const status = statusOf(error);
  const value: Problem = {
    type: `/docs/api#${error.code}`,
    title: TITLES[status] ?? 'Error',
    status,
    detail: error.message,
    instance: requestId,
    error,
  };
  return json(value, status, { 'content-type': 'application/problem+json; charset=utf-8', ...headers });
}

/** The answer to anything thrown; a defect goes to the log with the request's id. */
export function problemOf(error: unknown, requestId: string): Response {
  if (!isAnswer(error)) runtime().log.error({ err: error, requestId }, 'defect');
  const retry: Record<string, string> =
    error instanceof Refusal && error.retryAfter !== null ? { 'retry-after': String(error.retryAfter) } : {};
  return problem(errorOf(error), requestId, retry);
}

function queryOf(url: URL): Record<string, string> {
  const found = new Map<string, string>();
  for (const [key, value] of url.searchParams) {
    if (found.has(key)) throw new Refusal('bad-request', `The query names "${key}" twice.`);
    found.set(key, value);
  }
  return Object.fromEntries(found);
}

/** The body as text, read no further than the limit. */
export async function readText(request: Request): Promise<string> {
  const tooLarge = () =>
    new Refusal('too-large', `The request has more than ${LIMITS.bodyBytes} bytes; no more are read.`);
  if (Number(request.headers.get('content-length') ?? 0) > LIMITS.bodyBytes) throw tooLarge();
  if (!request.body) return '';
  const parts: Uint8Array[] = [];
  let size = 0;
  for await (const part of request.body as unknown as AsyncIterable<Uint8Array>) {
    size += part.byteLength;
    if (size > LIMITS.bodyBytes) throw tooLarge();
    parts.push(part);
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(parts));
  } catch {
    throw new Refusal('malformed', 'The request is not valid UTF-8.');
  }
}

async function jsonOf(request: Request): Promise<unknown> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/json\s*(;|$)/i.test(type))
    throw new Refusal('malformed', 'Send JSON, with the header Content-Type: application/json.');
  return parseJson(await readText(request));
}

const callOf = (context: APIContext): Call => ({
  viewer: context.locals.viewer,
  context,
  param: (name) => context.params[name] ?? '',
  query: (schema) => validate(schema, queryOf(context.url)),
  body: async (schema) => validate(schema, await jsonOf(context.request)),
});

/**
 * The exports of an API route from its handlers: `export const { GET, POST, ALL } = endpoint({ … })`.
 * ALL answers every other method with 405 and the list of those that work.
 */
export function endpoint<M extends Method>(handlers: Record<M, Handler>): Record<M | 'ALL', APIRoute> {
  const names = Object.keys(handlers) as M[];
  const allow = [...names, ...(names.includes('GET' as M) ? ['HEAD'] : [])].join(', ');
  const routes = {} as Record<M | 'ALL', APIRoute>;
  for (const name of names)
    routes[name] = async (context) => {
      try {
        return await handlers[name](callOf(context));
      } catch (error) {
        return problemOf(error, context.locals.requestId);
      }
    };
  routes.ALL = ({ request, locals }) => {
    const message = `${request.method} does not work here; use ${allow}.`;
    return problem({ code: 'method', message, line: null, column: null }, locals.requestId, { allow });
  };
  return routes;
}

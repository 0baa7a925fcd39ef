import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { Logger } from 'pino';
import type { Problem } from '#contract/api.ts';
import { type AnyCode, STATUS } from '#contract/errors.ts';
import { LIMITS } from '#contract/limits.ts';
import type { Config } from '../config.ts';
import { addressOf } from './address.ts';
import { compressResponse } from './compress.ts';
import { securityHeaders } from './headers.ts';
import { serveStatic, type staticFiles } from './static.ts';

/** The page and API handler, as Astro's adapter makes it in middleware mode. */
export type PageHandler = (
  request: IncomingMessage,
  response: ServerResponse,
  next: undefined,
  locals: { requestId: string; address: string },
) => Promise<void>;

export interface ServerParts {
  config: Config;
  log: Logger;
  files: ReturnType<typeof staticFiles>;
  handler: PageHandler;
}

const METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);
const URL_LENGTH = 8_192;
const HEADER_BYTES = 16_384;
const REQUEST_MS = 30_000;
const HEADERS_MS = 15_000;
const IDLE_MS = 65_000;
const CONNECTIONS = 2_000;

interface Refused {
  code: AnyCode;
  status?: number;
  message: string;
}

/** What can be refused before anything is read. */
function refusalOf(request: IncomingMessage): Refused | null {
  const { method = '', url = '', headers } = request;
  if (!METHODS.has(method)) return { code: 'method', message: `The method ${method.slice(0, 20)} is not used here.` };
  if (url.length > URL_LENGTH)
    return { code: 'too-large', status: 414, message: `The address is longer than ${URL_LENGTH} characters.` };
  if (!url.startsWith('/')) return { code: 'malformed', message: 'The address must begin with a slash.' };
  if (Number(headers['content-length'] ?? 0) > LIMITS.bodyBytes)
    return { code: 'too-large', message: `The request has more than ${LIMITS.bodyBytes} bytes; no more are read.` };
  if (headers['transfer-encoding'] !== undefined)
    return { code: 'malformed', status: 411, message: 'Send the request with a Content-Length.' };
  return null;
}

function refuse(response: ServerResponse, refused: Refused, requestId: string): void {
  const status = refused.status ?? STATUS[refused.code];
  const value: Problem = {
    type: `/docs/api#${refused.code}`,
    title: 'Refused',
    status,
    detail: refused.message,
    instance: requestId,
    error: { code: refused.code, message: refused.message, line: null, column: null },
  };
  // The body was not read, so the connection cannot be used again.
  const headers = {
    'content-type': 'application/problem+json; charset=utf-8',
    'cache-control': 'no-store',
    connection: 'close',
  };
  response.writeHead(status, headers).end(JSON.stringify(value));
}

function logWhenDone(
  log: Logger,
  request: IncomingMessage,
  response: ServerResponse,
  id: string,
  address: string,
): void {
  const started = performance.now();
  response.once('close', () => {
    const path = (request.url ?? '').split('?')[0]!.slice(0, 300);
    const milliseconds = Math.round((performance.now() - started) * 10) / 10;
    const line = { requestId: id, method: request.method, path, status: response.statusCode, milliseconds, address };
    if (response.statusCode >= 500) log.error(line, 'request');
    else log.info(line, 'request');
  });
}

/**
 * Our own server around the pages: limits, security headers, compression, request ids, one log line for each request.
 * Bodies need a length, so that nothing larger than the limit is ever read.
 */
export function makeServer({ config, log, files, handler }: ServerParts): Server {
  const fixed = Object.entries(securityHeaders(config.secureCookies));
  const server = createServer({ maxHeaderSize: HEADER_BYTES, requestTimeout: REQUEST_MS, headersTimeout: HEADERS_MS });
  server.keepAliveTimeout = IDLE_MS;
  server.maxConnections = CONNECTIONS;
  server.on('request', (request: IncomingMessage, response: ServerResponse) => {
    const requestId = randomUUID();
    const address = addressOf(request, config.trustProxy);
    for (const [name, value] of fixed) response.setHeader(name, value);
    response.setHeader('x-request-id', requestId);
    logWhenDone(log, request, response, requestId, address);
    const refused = refusalOf(request);
    if (refused) return refuse(response, refused, requestId);
    if (serveStatic(files, request, response)) return;
    compressResponse(request, response);
    handler(request, response, undefined, { requestId, address }).catch((error: unknown) => {
      log.error({ err: error, requestId }, 'defect');
      if (!response.headersSent)
        refuse(response, { code: 'defect', message: 'The program made a mistake.' }, requestId);
      else response.destroy();
    });
  });
  server.on('clientError', (_error, socket) => {
    if (socket.writable) socket.end('HTTP/1.1 400 Bad Request\r\nConnection: close\r\n\r\n');
  });
  return server;
}

/**
 * Stops a server without dropping what is under way: takes no new connections, closes idle ones, gives requests
 * `graceMs` to end, then cuts what is left (event streams never end by themselves; browsers connect again).
 */
export async function drain(server: Server, graceMs: number): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeIdleConnections();
  const cut = setTimeout(() => server.closeAllConnections(), graceMs);
  const again = setInterval(() => server.closeIdleConnections(), 100);
  await closed;
  clearTimeout(cut);
  clearInterval(again);
}

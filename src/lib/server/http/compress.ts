import type { IncomingMessage, OutgoingHttpHeaders, ServerResponse } from 'node:http';
import { constants, createBrotliCompress, createGzip } from 'node:zlib';

const TEXT = /^(text\/(?!event-stream)|application\/(json|problem\+json|javascript|xml)|image\/svg\+xml)/;
const LEAST_BYTES = 860;
/** Quality 4 of Brotli is as fast as gzip 6 and smaller. */
const BROTLI_QUALITY = 4;

export type Encoding = 'br' | 'gzip';

/** The best encoding that both sides know; null for plain. */
export function encodingFor(accept: string | string[] | undefined): Encoding | null {
  const offers = new Map(
    String(accept ?? '')
      .split(',')
      .map((entry): [string, boolean] => {
        const [name = '', ...settings] = entry.trim().toLowerCase().split(';');
        return [name.trim(), !settings.some((setting) => /^\s*q=0(\.0*)?\s*$/.test(setting))];
      }),
  );
  return offers.get('br') ? 'br' : offers.get('gzip') ? 'gzip' : null;
}

const compressor = (encoding: Encoding) =>
  encoding === 'br'
    ? createBrotliCompress({ params: { [constants.BROTLI_PARAM_QUALITY]: BROTLI_QUALITY } })
    : createGzip({ level: 6 });

const compressible = (headers: OutgoingHttpHeaders, status: number): boolean =>
  status !== 204 &&
  status !== 304 &&
  headers['content-encoding'] === undefined &&
  TEXT.test(String(headers['content-type'] ?? '')) &&
  Number(headers['content-length'] ?? LEAST_BYTES) >= LEAST_BYTES;

/**
 * Compresses what a handler writes, when the asker accepts it and the type is text. Event streams stay as they are:
 * a compressor would hold their lines back. Call it before the handler; the handler calls writeHead(status, headers).
 */
export function compressResponse(request: IncomingMessage, response: ServerResponse): void {
  const encoding = encodingFor(request.headers['accept-encoding']);
  if (!encoding || request.method === 'HEAD') return;
  const writeHead = response.writeHead.bind(response);
  const write = response.write.bind(response);
  const end = response.end.bind(response);
  let stream: ReturnType<typeof compressor> | null = null;

  response.writeHead = ((status: number, ...rest: unknown[]) => {
    const given = (rest.at(-1) ?? {}) as OutgoingHttpHeaders;
    const headers: OutgoingHttpHeaders = {};
    for (const [name, value] of Object.entries(given)) headers[name.toLowerCase()] = value;
    if (compressible({ ...response.getHeaders(), ...headers }, status)) {
      delete headers['content-length'];
      response.removeHeader('content-length');
      headers['content-encoding'] = encoding;
      headers.vary = [headers.vary, 'Accept-Encoding'].filter(Boolean).join(', ');
      const made = compressor(encoding);
      made.on('data', (part: Buffer) => {
        if (!write(part)) {
          made.pause();
          response.once('drain', () => made.resume());
        }
      });
      made.on('end', () => end());
      // The asker is gone: what is left to compress is not needed.
      response.on('close', () => made.destroy());
      stream = made;
    }
    return writeHead(status, headers);
  }) as ServerResponse['writeHead'];

  response.write = ((part: Buffer | string, ...rest: []) => {
    if (!response.headersSent && !stream) response.writeHead(response.statusCode);
    return stream ? stream.write(part) : write(part, ...rest);
  }) as ServerResponse['write'];

  response.end = ((part?: Buffer | string, ...rest: []) => {
    if (!response.headersSent && !stream) response.writeHead(response.statusCode);
    if (!stream) return end(part, ...rest);
    if (typeof part === 'string' || Buffer.isBuffer(part)) stream.end(part);
    else stream.end();
    return response;
  }) as ServerResponse['end'];
}

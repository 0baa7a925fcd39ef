import { createHash } from 'node:crypto';
import { createReadStream, existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import type { IncomingMessage, ServerResponse } from 'node:http';
import { extname, join, relative, sep } from 'node:path';
import { encodingFor } from './compress.ts';

const TYPES: Record<string, string> = {
  '.css': 'text/css; charset=utf-8',
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.otf': 'font/otf',
  '.png': 'image/png',
  '.svg': 'image/svg+xml; charset=utf-8',
  '.txt': 'text/plain; charset=utf-8',
  '.webmanifest': 'application/manifest+json; charset=utf-8',
  '.woff2': 'font/woff2',
};
const ENDINGS = { br: '.br', gzip: '.gz' } as const;

interface StaticFile {
  path: string;
  type: string;
  etag: string;
  cache: string;
  encodings: Set<keyof typeof ENDINGS>;
}

/** Every file of the built client by its address. Only these can be asked for: no path is ever made from a request. */
export function staticFiles(root: string): Map<string, StaticFile> {
  const files = new Map<string, StaticFile>();
  if (!existsSync(root)) return files;
  for (const entry of readdirSync(root, { recursive: true, encoding: 'utf8' })) {
    const path = join(root, entry);
    const type = TYPES[extname(entry)];
    if (!type || statSync(path).isDirectory()) continue;
    const address = `/${relative(root, path).split(sep).join('/')}`;
    files.set(address, {
      path,
      type,
      etag: `"${createHash('sha256').update(readFileSync(path)).digest('hex').slice(0, 20)}"`,
      // Names under _astro carry a hash of the content.
      cache: address.startsWith('/_astro/') ? 'public, max-age=31536000, immutable' : 'public, max-age=3600',
      encodings: new Set((['br', 'gzip'] as const).filter((name) => existsSync(path + ENDINGS[name]))),
    });
  }
  return files;
}

/** Answers a request for a file of the client. @returns false when it is none. */
export function serveStatic(
  files: ReadonlyMap<string, StaticFile>,
  request: IncomingMessage,
  response: ServerResponse,
): boolean {
  if (request.method !== 'GET' && request.method !== 'HEAD') return false;
  const file = files.get((request.url ?? '').split('?')[0]!);
  if (!file) return false;
  const headers: Record<string, string> = { etag: file.etag, 'cache-control': file.cache, vary: 'Accept-Encoding' };
  if (request.headers['if-none-match'] === file.etag) {
    response.writeHead(304, headers).end();
    return true;
  }
  const wanted = encodingFor(request.headers['accept-encoding']);
  const encoding = wanted && file.encodings.has(wanted) ? wanted : null;
  const path = encoding ? file.path + ENDINGS[encoding] : file.path;
  headers['content-type'] = file.type;
  headers['content-length'] = String(statSync(path).size);
  if (encoding) headers['content-encoding'] = encoding;
  response.writeHead(200, headers);
  if (request.method === 'HEAD') response.end();
  else createReadStream(path).pipe(response);
  return true;
}

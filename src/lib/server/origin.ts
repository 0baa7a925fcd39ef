import type { Config } from './config.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Origins whose pages may send forms: the configured one; without it, this server under its local names. */
export function knownOrigins(config: Config): Set<string> {
  if (config.origin) return new Set([config.origin]);
  const hosts = ['localhost', '127.0.0.1', '[::1]', config.host.includes(':') ? `[${config.host}]` : config.host];
  return new Set(hosts.map((host) => new URL(`http://${host}:${config.port}`).origin));
}

/**
 * Whether a request may change something (against cross-site request forgery).
 *
 * Browsers say where a request comes from: Sec-Fetch-Site must be same-origin or none; without it, Origin must be one of ours.
 * A request with neither is a script's; it is let through only when it carries no cookie, so it can use nobody's session.
 */
export function mayChange(request: Request, origins: ReadonlySet<string>): boolean {
  if (SAFE.has(request.method)) return true;
  const site = request.headers.get('sec-fetch-site');
  if (site !== null) return site === 'same-origin' || site === 'none';
  const origin = request.headers.get('origin');
  if (origin !== null) return origins.has(origin);
  return !request.headers.has('cookie');
}

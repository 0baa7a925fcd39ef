import type { IncomingMessage } from 'node:http';

/**
 * The address a request came from. X-Forwarded-For is a list that anybody can start; only the entries our own proxies
 * appended are true: the last one for one trusted proxy, the last but one for two.
 */
export function addressOf(request: IncomingMessage, trustedProxies: number): string {
  const peer = request.socket.remoteAddress ?? '';
  if (trustedProxies === 0) return peer;
  const forwarded = String(request.headers['x-forwarded-for'] ?? '')
    .split(',')
    .map((entry) => entry.trim())
    .filter(Boolean);
  return forwarded[forwarded.length - trustedProxies] ?? peer;
}

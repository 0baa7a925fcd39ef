import { createHash, randomBytes } from 'node:crypto';

const ALPHABET = '0123456789abcdefghjkmnpqrstvwxyz';

/** A random public id: 24 characters that cannot be guessed (120 bits) or misread. */
export function newId(): string {
  let bits = 0n;
  for (const byte of randomBytes(15)) bits = (bits << 8n) | BigInt(byte);
  let id = '';
  for (let at = 0; at < 24; at++, bits >>= 5n) id += ALPHABET[Number(bits & 31n)];
  return id;
}

/** A secret for a cookie or token: 160 bits, hexadecimal. */
export const newSecret = (): string => randomBytes(20).toString('hex');

export const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');

/** JSON with the keys of every object in order: equal values give equal text. */
export function stableJson(value: unknown): string {
  return JSON.stringify(value, (_key, inner: unknown) =>
    inner !== null && typeof inner === 'object' && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)))
      : inner,
  );
}

export const now = (): string => new Date().toISOString();

/** SHA-256 of ASCII text, for labels: pure TypeScript because the engine also runs where no cryptography library is at hand. */

const K = new Uint32Array(64);
const START = new Uint32Array(8);

/** First 32 bits of the fractional parts of cube and square roots of the first primes, as FIPS 180-4 defines the constants. */
function fillConstants(): void {
  const fraction = (value: number): number => Math.floor((value - Math.floor(value)) * 2 ** 32) >>> 0;
  for (let candidate = 2, found = 0; found < 64; candidate++) {
    let prime = true;
    for (let d = 2; d * d <= candidate; d++) if (candidate % d === 0) prime = false;
    if (!prime) continue;
    if (found < 8) START[found] = fraction(Math.sqrt(candidate));
    K[found++] = fraction(Math.cbrt(candidate));
  }
}
fillConstants();

const rotate = (x: number, n: number): number => (x >>> n) | (x << (32 - n));
const W = new Uint32Array(64);

function block(state: Uint32Array, bytes: Uint8Array, offset: number): void {
  for (let t = 0; t < 16; t++) {
    const i = offset + 4 * t;
    W[t] = (bytes[i]! << 24) | (bytes[i + 1]! << 16) | (bytes[i + 2]! << 8) | bytes[i + 3]!;
  }
  for (let t = 16; t < 64; t++) {
    const a = W[t - 15]!;
    const b = W[t - 2]!;
    const s0 = rotate(a, 7) ^ rotate(a, 18) ^ (a >>> 3);
    const s1 = rotate(b, 17) ^ rotate(b, 19) ^ (b >>> 10);
    W[t] = W[t - 16]! + s0 + W[t - 7]! + s1;
  }
  let [a, b, c, d, e, f, g, h] = state as unknown as [number, number, number, number, number, number, number, number];
  for (let t = 0; t < 64; t++) {
    const s1 = rotate(e, 6) ^ rotate(e, 11) ^ rotate(e, 25);
    const t1 = (h + s1 + ((e & f) ^ (~e & g)) + K[t]! + W[t]!) | 0;
    const s0 = rotate(a, 2) ^ rotate(a, 13) ^ rotate(a, 22);
    const t2 = (s0 + ((a & b) ^ (a & c) ^ (b & c))) | 0;
    [h, g, f, e, d, c, b, a] = [g, f, e, (d + t1) | 0, c, b, a, (t1 + t2) | 0];
  }
  [a, b, c, d, e, f, g, h].forEach((value, i) => {
    state[i] = state[i]! + value;
  });
}

/** The 32 bytes of SHA-256. O(length). @see FIPS 180-4. @throws RangeError for characters beyond ASCII. */
export function sha256(text: string): Uint8Array {
  const length = text.length;
  const bytes = new Uint8Array(((length + 8) >> 6) * 64 + 64);
  for (let i = 0; i < length; i++) {
    const code = text.charCodeAt(i);
    if (code > 127) throw new RangeError('ASCII text expected');
    bytes[i] = code;
  }
  bytes[length] = 0x80;
  new DataView(bytes.buffer).setUint32(bytes.length - 4, length * 8);
  const state = Uint32Array.from(START);
  for (let offset = 0; offset < bytes.length; offset += 64) block(state, bytes, offset);
  const out = new Uint8Array(32);
  state.forEach((word, i) => {
    new DataView(out.buffer).setUint32(4 * i, word);
  });
  return out;
}

const ALPHABET = 'abcdefghjkmnpqrstvwxyz0123456789';

/** The first 5·count bits of SHA-256 as `count` characters without look-alikes (no i, l, o, u). URL-safe. */
export function digest(text: string, count: number): string {
  const bytes = sha256(text);
  let out = '';
  let bits = 0;
  let value = 0;
  for (let i = 0; out.length < count; i++) {
    value = ((value << 8) | bytes[i]!) & 0xffff;
    bits += 8;
    while (bits >= 5 && out.length < count) {
      bits -= 5;
      out += ALPHABET[(value >> bits) & 31];
    }
  }
  return out;
}

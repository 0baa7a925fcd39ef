import { Refusal } from './refusal.ts';

/** An opaque place in a keyset-paged list: the sort key of the last row seen. */
export const writeCursor = (key: readonly (string | number)[]): string =>
  Buffer.from(JSON.stringify(key)).toString('base64url');

/** @throws Refusal bad-request when the text was not made by writeCursor. */
export function readCursor(text: string | null): string[] | null {
  if (text === null || text === '') return null;
  try {
    const key: unknown = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
    if (
      Array.isArray(key) &&
      key.length > 0 &&
      key.length <= 4 &&
      key.every((part) => /^(string|number)$/.test(typeof part))
    )
      return key.map(String);
  } catch {
    // Falls through to the refusal: anything unreadable is the same mistake.
  }
  throw new Refusal('bad-request', 'The value of "after" is not one that an earlier page gave as "next".');
}

import { type ErrorObject, Refusal } from './errors.ts';
import { LIMITS } from './limits.ts';

const refuse = (code: ErrorObject['code'], message: string, line: number | null = null, column: number | null = null) =>
  new Refusal({ code, message, line, column });

/** Line and column (1-based) of an offset in a text. */
function placeOf(text: string, offset: number): { line: number; column: number } {
  const before = text.slice(0, offset);
  return { line: before.split('\n').length, column: offset - before.lastIndexOf('\n') };
}

/** Nesting and key names of a parsed value, checked without recursion: the value may be as deep as the text is long. */
function checkShape(root: unknown): void {
  let level: unknown[] = [root];
  for (let depth = 0; level.length > 0; depth++) {
    if (depth > LIMITS.jsonDepth)
      throw refuse('malformed', `The JSON is nested deeper than ${LIMITS.jsonDepth} levels; no request needs that.`);
    const next: unknown[] = [];
    for (const value of level) {
      if (typeof value !== 'object' || value === null) continue;
      if (Object.hasOwn(value, '__proto__'))
        throw refuse('bad-request', 'A key is called "__proto__", which no request has. A name begins with a letter.');
      next.push(...Object.values(value).filter((child) => typeof child === 'object' && child !== null));
    }
    level = next;
  }
}

/**
 * Reads JSON at the boundary. O(length).
 *
 * @throws Refusal too-large over LIMITS.bodyBytes; malformed with line and column; bad-request for the key `__proto__`,
 * which schema libraries drop without a word.
 */
export function parseJson(text: string): unknown {
  if (text.length > LIMITS.bodyBytes)
    throw refuse('too-large', `The request has ${text.length} characters; at most ${LIMITS.bodyBytes} are read.`);
  let value: unknown;
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ''));
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    const position = /at position (\d+)/.exec(reason);
    const place = placeOf(text, position ? Number(position[1]) : text.length);
    throw refuse(
      'malformed',
      `This is not JSON: ${reason.replace(/ in JSON at position.*$/, '')}.`,
      place.line,
      place.column,
    );
  }
  checkShape(value);
  return value;
}

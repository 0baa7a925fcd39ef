/**
 * A page of this site to go on to, from a query or a form; anything else is the start page.
 *
 * A browser takes `//host`, `/\host` and control characters inside a path as another site: those are refused.
 */
export function safeNext(asked: unknown, otherwise = '/'): string {
  if (typeof asked !== 'string' || asked.length > 2000) return otherwise;
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must not pass
  return /^\/(?![/\\])[^\u0000-\u001f\u007f\\]*$/.test(asked) ? asked : otherwise;
}

import type { z } from 'zod';
import { Refusal } from './errors.ts';

interface Issue {
  readonly code?: string | undefined;
  readonly path: readonly PropertyKey[];
  readonly message: string;
  readonly keys?: readonly string[] | undefined;
  readonly errors?: readonly (readonly Issue[])[] | undefined;
}

const where = (path: readonly PropertyKey[]): string =>
  path.length === 0 ? 'the request' : `"${path.map(String).join('.').slice(0, 80)}"`;

/** The most telling sentence of a validation failure: in a union, that of the branch that went furthest. */
function sentence(issue: Issue): string {
  if (issue.code === 'unrecognized_keys') {
    const keys = (issue.keys ?? []).slice(0, 3).map((key) => `"${key.slice(0, 40)}"`);
    return `Unknown ${keys.length === 1 ? 'key' : 'keys'} ${keys.join(', ')} in ${where(issue.path)}.`;
  }
  if (issue.code === 'invalid_union' && issue.errors) {
    const furthest = issue.errors
      .flat()
      .filter((inner) => inner.code !== 'unrecognized_keys')
      .sort((a, b) => b.path.length - a.path.length)[0];
    if (furthest) return sentence({ ...furthest, path: [...issue.path, ...furthest.path] });
  }
  return `In ${where(issue.path)}: ${issue.message.slice(0, 300)}.`;
}

/**
 * Reads a value by its schema at the boundary.
 *
 * @throws Refusal limit for what is longer or larger than a bound, bad-request for anything else; the sentence names the key and what was expected.
 */
export function validate<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  const issue = result.error.issues[0] as Issue;
  const code = issue.code === 'too_big' ? 'limit' : 'bad-request';
  throw new Refusal({ code, message: sentence(issue), line: null, column: null });
}

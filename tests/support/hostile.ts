import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';

/** A text as the corpus writes it: plain, or pieces with how often each is repeated. */
type Text = string | { readonly repeat: readonly (readonly [piece: string, times: number])[] };

interface Entry {
  readonly name: string;
  /** A whole request, or … */
  readonly request?: unknown;
  /** … a text that is given to the program as it stands. */
  readonly raw?: Text;
  readonly exit: 2 | 3;
  readonly code: string;
}

/** One broken or hostile input and how it must be refused. */
export interface HostileCase {
  readonly name: string;
  /** The text that is fed to the program. */
  readonly body: string;
  /** The request, null where the body is no JSON. */
  readonly request: Readonly<Record<string, unknown>> | null;
  readonly exit: 2 | 3;
  readonly code: string;
}

const file = resolve(import.meta.dirname, '../reference/hostile.json');

const isRepeated = (value: object): value is Exclude<Text, string> => 'repeat' in value && Array.isArray(value.repeat);

/** A value with every {"repeat": [[text, times], …]} in it written out. */
function expanded(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(expanded);
  if (typeof value !== 'object' || value === null) return value;
  if (isRepeated(value)) return value.repeat.map(([piece, times]) => piece.repeat(times)).join('');
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [key, expanded(inner)]));
}

function caseOf({ name, request, raw, exit, code }: Entry): HostileCase {
  if (raw !== undefined) return { name, body: String(expanded(raw)), request: null, exit, code };
  const whole = expanded(request);
  const isObject = typeof whole === 'object' && whole !== null && !Array.isArray(whole);
  return {
    name,
    body: JSON.stringify(whole),
    request: isObject ? (whole as Record<string, unknown>) : null,
    exit,
    code,
  };
}

/** Every entry of the corpus of hostile and broken inputs. */
export const hostileCases = (): HostileCase[] => (JSON.parse(readFileSync(file, 'utf8')) as Entry[]).map(caseOf);

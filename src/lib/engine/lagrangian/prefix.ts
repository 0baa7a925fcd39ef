import type { Source } from './source.ts';
import type { Token } from './tokens.ts';

const isMark = (token: Token | undefined, ...marks: readonly string[]): boolean =>
  token?.kind === 'mark' && marks.includes(token.mark);

/** Whether the tokens before an equals sign are a name, perhaps with arguments in brackets: L, L(φ, ∂φ), L[φ]. */
function isLeftSide(tokens: readonly Token[], equals: number): boolean {
  if (tokens[0]?.kind !== 'name') return false;
  return equals === 1 || (isMark(tokens[1], '(', '[') && isMark(tokens[equals - 1], ')', ']'));
}

/** Position after a prefix "L =", "\mathcal{L}(\phi) :=" …; 0 where there is none. @throws InputError for any other equals sign. */
export function afterPrefix(source: Source, tokens: readonly Token[]): number {
  const equals = tokens.findIndex((token) => isMark(token, '='));
  if (equals < 0) return 0;
  const [first] = tokens;
  const span = tokens[equals]!;
  if (first?.kind !== 'name' || !isLeftSide(tokens, equals))
    throw source.fault('syntax', 'An equals sign may stand only after a name at the start, as in "L = …".', span);
  if (/^(L|Lagrangian)(_|$)/.test(first.name)) return equals + 1;
  const message = /^[VU](_|$)/.test(first.name)
    ? 'A potential enters the Lagrangian with a minus sign: write "L = … − V" with V spelt out.'
    : `"${first.name} = …" is not a Lagrangian; write "L = …".`;
  throw source.fault('syntax', message, { start: first.start, end: span.end });
}

/** Drops punctuation that ends the formula. */
export function withoutTrailing(tokens: readonly Token[]): Token[] {
  let length = tokens.length - 1;
  while (length > 0) {
    const last = tokens[length - 1]!;
    if (last.kind !== 'mark' || !['.', ',', ';'].includes(last.mark)) break;
    length--;
  }
  return [...tokens.slice(0, length), tokens.at(-1)!];
}

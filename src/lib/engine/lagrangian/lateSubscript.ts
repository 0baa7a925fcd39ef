import type { Cursor } from './cursor.ts';
import type { Token } from './tokens.ts';

const isMark = (token: Token | undefined, ...marks: readonly string[]): boolean =>
  token?.kind === 'mark' && marks.includes(token.mark);

/** Position of the name under the power that the last tokens spell (φ³, φ^3, φ^*, φ^{3}), or −1. */
function raisedName(tokens: readonly Token[]): number {
  const last = tokens.length - 1;
  if (tokens[last]?.kind === 'superscript' || isMark(tokens[last], '†')) {
    if (tokens[last - 1]?.kind === 'name') return last - 1;
  }
  let caret = last - 1;
  if (isMark(tokens[last], '}')) while (caret > 0 && last - caret < 8 && !isMark(tokens[caret], '^')) caret--;
  return isMark(tokens[caret], '^') && tokens[caret - 1]?.kind === 'name' ? caret - 1 : -1;
}

/** Reads a subscript that follows a power, as in \phi^2_1, into the name below it. False where there is none to read. */
export function readLateSubscript(cursor: Cursor, tokens: Token[]): boolean {
  if (cursor.peek() !== '_') return false;
  const at = raisedName(tokens);
  const token = tokens[at];
  if (token?.kind !== 'name' || token.name.includes('_')) return false;
  const subscript = cursor.subscript();
  if (subscript === null) return false;
  tokens[at] = { ...token, name: `${token.name}_${subscript}` };
  return true;
}

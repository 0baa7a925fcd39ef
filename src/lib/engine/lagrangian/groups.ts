import type { Node } from './ast.ts';
import type { Parser } from './parser.ts';
import type { Token } from './tokens.ts';

const CLOSING: ReadonlyMap<string, string> = new Map([
  ['(', ')'],
  ['[', ']'],
  ['{', '}'],
]);

export const opensGroup = (token: Token): boolean => token.kind === 'mark' && CLOSING.has(token.mark);

/** Whether an operand can begin at the current token (a bar counts only where it cannot close an open one). */
export function startsOperand(parser: Parser): boolean {
  const { token } = parser;
  switch (token.kind) {
    case 'mark':
      return opensGroup(token) || (token.mark === '|' && !parser.closesBar());
    case 'superscript':
    case 'over':
    case 'hc':
    case 'end':
      return false;
    default:
      return true;
  }
}

/** Takes the closing mark; answers where it ends. */
export function closed(parser: Parser, open: Token, mark: string): number {
  if (parser.at(mark)) return parser.take().end;
  const { token } = parser;
  if (token.kind === 'end')
    throw parser.fault(`This ${mark === '|' ? 'bar' : 'bracket'} is not closed: ${mark} is missing.`, open);
  throw parser.expected(`${mark} or the next term`);
}

/** A bracketed sum; `{a \over b}` is a fraction. */
export function readGroup(parser: Parser): Node {
  const open = parser.take();
  const mark = open.kind === 'mark' ? open.mark : '';
  const close = CLOSING.get(mark)!;
  return parser.nested(open, () => {
    if (parser.at(close)) throw parser.fault('These brackets are empty.', { start: open.start, end: parser.token.end });
    let node = parser.sum();
    if (parser.token.kind === 'over') {
      parser.take();
      const below = parser.sum();
      node = { is: 'fraction', above: node, below, start: node.start, end: below.end };
    }
    return { is: 'group', open: mark, node, start: open.start, end: closed(parser, open, close) };
  });
}

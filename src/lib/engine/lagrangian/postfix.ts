import type { Node } from './ast.ts';
import { readGroup } from './groups.ts';
import { refuseRaisedName } from './indices.ts';
import type { Parser } from './parser.ts';
import type { Token } from './tokens.ts';

const isStar = (token: Token): boolean => token.kind === 'mark' && (token.mark === '*' || token.mark === '†');

/** ^*, ^\dagger, ^{*2}, ^{2}, ^{1/2}, ^-1, ^(1/2): what is raised to the right of a base. */
function raise(parser: Parser, base: Node): Node {
  if (isStar(parser.token)) return conjugated(parser, base);
  if (parser.at('{')) return raiseBraced(parser, base);
  const exponent = parser.nested(parser.token, () => readExponent(parser, base));
  return { is: 'power', base, exponent, start: base.start, end: exponent.end };
}

function conjugated(parser: Parser, base: Node): Node {
  const { end } = parser.take();
  if (parser.token.kind === 'number' && !parser.token.gap)
    throw parser.fault(
      `It is not clear whether ${parser.source.quote(parser.token)} is a power here; write (phi^*)^2 or phi^{*2}.`,
      { start: base.start, end: parser.token.end },
    );
  if (base.is === 'conjugate') return { ...base.node, start: base.start, end };
  return { is: 'conjugate', node: base, start: base.start, end };
}

function raiseBraced(parser: Parser, base: Node): Node {
  const { token: open, next } = parser;
  if (next.kind === 'name') refuseRaisedName(parser, base, next);
  let starred = isStar(next);
  if (!starred) {
    parser.take();
    const node = parser.nested(open, () => parser.sum());
    starred = isStar(parser.token);
    if (starred) parser.take();
    const end = closeBrace(parser);
    const power: Node = { is: 'power', base, exponent: node, start: base.start, end };
    return starred ? { is: 'conjugate', node: power, start: base.start, end } : power;
  }
  parser.take();
  parser.take();
  if (parser.at('}')) return { is: 'conjugate', node: base, start: base.start, end: closeBrace(parser) };
  const exponent = parser.nested(open, () => parser.sum());
  const end = closeBrace(parser);
  const inner: Node = { is: 'conjugate', node: base, start: base.start, end };
  return { is: 'power', base: inner, exponent, start: base.start, end };
}

function closeBrace(parser: Parser): number {
  if (!parser.at('}')) throw parser.expected('} to close the power');
  return parser.take().end;
}

/** An unbraced exponent: a signed number, perhaps with ! or a further power (2^3^2 = 2^9), or brackets. */
function readExponent(parser: Parser, base: Node): Node {
  const { token } = parser;
  const { start } = token;
  if (parser.at('-') || parser.at('+')) {
    parser.take();
    const node = readExponent(parser, base);
    return token.kind === 'mark' && token.mark === '-' ? { is: 'negative', node, start, end: node.end } : node;
  }
  let node: Node;
  if (parser.at('(') || parser.at('[')) node = readGroup(parser);
  else if (token.kind === 'number') {
    parser.take();
    node = { is: 'number', value: token.value, start, end: token.end };
  } else if (token.kind === 'frac' || token.kind === 'sqrt') throw parser.fault('Put the power in braces.', token);
  else if (token.kind === 'name') refuseRaisedName(parser, base, token);
  else throw parser.expected('a number as the power');
  node = factorials(parser, node);
  if (!parser.at('^') && !parser.at('**')) return node;
  parser.take();
  const exponent = parser.nested(parser.token, () => readExponent(parser, node));
  return { is: 'power', base: node, exponent, start, end: exponent.end };
}

function factorials(parser: Parser, base: Node): Node {
  if (!parser.at('!')) return base;
  const first = parser.take();
  const doubled = parser.at('!') && parser.token.start === first.end;
  const { end } = doubled ? parser.take() : first;
  if (parser.at('!')) throw parser.fault('Only n! and n!! are defined.', { start: first.start, end: parser.token.end });
  return { is: 'factorial', step: doubled ? 2 : 1, node: base, start: base.start, end };
}

/** The powers, factorials and conjugates that follow an operand. */
export function readPostfix(parser: Parser, operand: Node): Node {
  let node = operand;
  for (;;) {
    const { token } = parser;
    if (token.kind === 'superscript') {
      parser.take();
      const exponent: Node = { is: 'number', value: token.value, start: token.start, end: token.end };
      node = { is: 'power', base: node, exponent, start: node.start, end: token.end };
    } else if (parser.at('^') || parser.at('**')) {
      const doubled = parser.at('**');
      parser.take();
      if (doubled && isStar(parser.token)) throw parser.expected('a number as the power');
      node = raise(parser, node);
    } else if (parser.at('†')) node = conjugated(parser, node);
    else if (parser.at('!')) node = factorials(parser, node);
    else return node;
  }
}

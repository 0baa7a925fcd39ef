import type { InputError } from '../errors.ts';
import { ONE } from '../exact/rational.ts';
import type { Node } from './ast.ts';
import { BOUNDS } from './bounds.ts';
import { closed, opensGroup, readGroup, startsOperand } from './groups.ts';
import { readIndex, refuseRaisedName } from './indices.ts';
import type { Parser } from './parser.ts';
import type { Token } from './tokens.ts';

/** The argument of a command: a group, or one symbol or digit. */
function readArgument(parser: Parser, what: string): Node {
  if (parser.at('{') || parser.at('(')) return readGroup(parser);
  const digit = parser.splitDigit();
  if (digit) return digit;
  if (!startsOperand(parser)) throw parser.expected(what);
  return parser.nested(parser.token, () => readAtom(parser));
}

function readRoot(parser: Parser): Node {
  const { start } = parser.take();
  let degree = 2;
  if (parser.at('[')) {
    parser.take();
    const token = parser.take();
    if (token.kind !== 'number' || !/^[2-9]$/.test(token.digits))
      throw parser.fault('The degree of a root must be a number from 2 to 9.', token);
    degree = Number(token.digits);
    if (!parser.accept(']')) throw parser.expected('] after the degree of the root');
  }
  const node = readArgument(parser, 'what to take the root of');
  return { is: 'root', degree, node, start, end: node.end };
}

function readModulus(parser: Parser): Node {
  const open = parser.take();
  return parser.nested(open, () =>
    parser.barred(() => {
      const node = parser.sum();
      return { is: 'modulus', node, start: open.start, end: closed(parser, open, '|') };
    }),
  );
}

/** The power of a ∂ or □ itself: the 2 of ∂²; 1 where there is none. */
function readCount(parser: Parser): number {
  const start = parser.token.start;
  let token: Token | null = null;
  if (parser.token.kind === 'superscript') token = parser.take();
  else if (parser.at('^') || parser.at('**')) {
    parser.take();
    const braced = parser.accept('{');
    token = parser.take();
    if (token.kind !== 'number') throw parser.fault('The power of a derivative must be a whole number.', token);
    if (braced && !parser.accept('}')) throw parser.expected('}');
  }
  if (token === null) return 1;
  const value = token.kind === 'number' || token.kind === 'superscript' ? token.value : ONE;
  if (value.den !== 1n || value.num < 1n)
    throw parser.fault('The power of a derivative must be a whole number from 1.', { start, end: token.end });
  const most = 2 * BOUNDS.derivativePairs;
  if (value.num > BigInt(most))
    throw parser.source.limit(`At most ${most} derivatives are read.`, most, null, { start, end: token.end });
  return Number(value.num);
}

function refusePower(parser: Parser, start: number, end: number): never {
  const piece = parser.source.quote({ start, end });
  throw parser.fault(
    `It is not clear whether the power belongs to the field or to its derivative; write (${piece})^2 or ${piece} with the power inside brackets.`,
    { start, end: parser.token.end },
    `(${piece})`,
  );
}

const opensBrace = (token: Token): boolean => token.kind === 'mark' && token.mark === '{';

function refuseReserved(parser: Parser): void {
  const { token } = parser;
  if (token.kind === 'pi') throw parser.fault('"pi" is the number π; a field needs another name, such as pi_0.');
  if (token.kind === 'imaginary') throw parser.fault('This is the imaginary unit; a field needs another name.');
}

/** The operand of ∂: one name, its conjugate, a bracketed expression, or another derivative. No power: ∂φ² is ambiguous. */
function readOperand(parser: Parser, start: number): Node {
  refuseReserved(parser);
  let node = readAtom(parser);
  for (;;) {
    const raised = parser.at('^');
    if (!parser.at('†') && !(raised && (isConjugateMark(parser.next) || opensBrace(parser.next)))) break;
    const { end } = node;
    parser.accept('^');
    const braced = parser.accept('{');
    if (!isConjugateMark(parser.token)) refusePower(parser, start, end);
    parser.take();
    if (braced && !parser.accept('}')) refusePower(parser, start, end);
    node = { is: 'conjugate', node, start: node.start, end: parser.previous!.end };
  }
  if (parser.at('^') && parser.next.kind === 'name') refuseRaisedName(parser, node, parser.next);
  if (parser.at('^') || parser.at('**') || parser.token.kind === 'superscript') refusePower(parser, start, node.end);
  return node;
}

const isConjugateMark = (token: Token): boolean => token.kind === 'mark' && (token.mark === '*' || token.mark === '†');

/** Takes the second half of an operator ∂_μ∂^μ that waits for its operand; leaves the cursor alone where there is none. */
function closesBox(parser: Parser, index: string): boolean {
  const { token } = parser;
  if (token.kind !== 'derivative') return false;
  parser.take();
  const partner = token.index ?? readIndex(parser);
  if (partner === index && !startsOperand(parser)) return true;
  parser.back(token);
  return false;
}

function readDerivative(parser: Parser): Node {
  const token = parser.take();
  const { start } = token;
  let index = token.kind === 'derivative' ? token.index : null;
  let count = 1;
  if (token.kind === 'box') count = 2 * readCount(parser);
  else if (index === null) {
    index = readIndex(parser);
    if (index === null) count = readCount(parser);
  } else if (parser.at('^') || parser.token.kind === 'superscript')
    throw parser.fault('A derivative with an index takes no power; write the second one out.', parser.token);
  const { end } = parser.previous!;
  if (index !== null && closesBox(parser, index)) return { is: 'operator', count: 1, start, end: parser.previous!.end };
  if (startsOperand(parser) && parser.token.kind !== 'number') {
    const node = parser.nested(token, () => readOperand(parser, start));
    return { is: 'derivative', index, count, node, start, end: node.end };
  }
  if (index === null && count % 2 === 0) return { is: 'operator', count: count / 2, start, end };
  throw derivativeOfNothing(parser, token);
}

/** "d" where no field follows: often meant as a name. */
function derivativeOfNothing(parser: Parser, operator: Token): InputError {
  if (parser.source.quote(operator) !== 'd') return parser.expected('the field that this derivative acts on');
  return parser.fault(
    '"d" is the sign of a derivative, and no field follows it here; a parameter needs another name.',
    operator,
  );
}

/** One operand without its powers. @throws InputError where none can begin. */
export function readAtom(parser: Parser): Node {
  const { token } = parser;
  const { start, end } = token;
  switch (token.kind) {
    case 'number':
      parser.take();
      return { is: 'number', value: token.value, start, end };
    case 'name':
      parser.take();
      return { is: 'name', name: token.name, start, end };
    case 'imaginary':
    case 'pi':
      parser.take();
      return { is: token.kind, start, end };
    case 'derivative':
    case 'box':
      return readDerivative(parser);
    case 'sqrt':
      return readRoot(parser);
    case 'conj': {
      parser.take();
      const node = readArgument(parser, 'what to conjugate');
      return { is: 'conjugate', node, start, end: node.end };
    }
    case 'frac': {
      parser.take();
      const above = readArgument(parser, 'the numerator');
      const below = readArgument(parser, 'the denominator');
      return { is: 'fraction', above, below, start, end: below.end };
    }
    case 'function':
      throw parser.source.fault(
        'unsupported',
        `${token.name} is not polynomial; expand it in powers of the field first.`,
        token,
      );
    default:
      return readOpening(parser);
  }
}

function readOpening(parser: Parser): Node {
  if (opensGroup(parser.token)) return readGroup(parser);
  if (parser.at('|')) return readModulus(parser);
  const { previous } = parser;
  if (previous?.kind === 'mark' && previous.mark === '*')
    throw parser.fault(
      'Expected a factor after this *; the conjugate of a field is written phi^*.',
      { start: previous.start, end: previous.end },
      '^*',
    );
  if (parser.at('/') || parser.at('*')) throw parser.expected('a factor before this sign');
  throw parser.expected('a field, a parameter or a number');
}

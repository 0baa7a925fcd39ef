import type { Node } from './ast.ts';
import type { Parser } from './parser.ts';
import { LORENTZ } from './symbols.ts';
import type { Token } from './tokens.ts';

/** A raised name: an index at a ∂, anything else is refused. Leaves the cursor unmoved and answers null where there is none. */
export function readIndex(parser: Parser): string | null {
  if (!parser.at('^')) return null;
  const { next } = parser;
  if (next.kind === 'name') {
    parser.take();
    parser.take();
    return next.name;
  }
  if (next.kind !== 'mark' || next.mark !== '{') return null;
  const { token: caret } = parser;
  parser.take();
  parser.take();
  const name = parser.token;
  if (name.kind === 'name' && parser.next.kind === 'mark' && parser.next.mark === '}') {
    parser.take();
    parser.take();
    return name.name;
  }
  if (name.kind === 'number') {
    parser.back(caret);
    return null;
  }
  throw parser.expected('one index or a whole number');
}

/** What a raised name means at something that is not a ∂. */
export function refuseRaisedName(parser: Parser, base: Node, token: Token & { kind: 'name' }): never {
  const span = { start: base.start, end: token.end };
  const what = parser.source.quote(base);
  if (LORENTZ.has(token.name))
    throw parser.source.fault(
      'unsupported',
      `"${what}" carries a space-time index; only scalar fields are read (no gauge fields, no fermions).`,
      span,
    );
  if (token.name === 'T')
    throw parser.source.fault('unsupported', 'Multiplets are not read yet: write the components as fields.', span);
  throw parser.source.fault(
    'unsupported',
    `The power of "${what}" is the name "${token.name}"; powers are numbers, and components of a multiplet are written phi_1, phi_2.`,
    span,
  );
}

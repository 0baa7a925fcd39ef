import { InputError, LimitError } from '../errors.ts';
import { rational } from '../exact/rational.ts';
import type { FactorNode, Node, Summand } from './ast.ts';
import { readAtom } from './atoms.ts';
import { BOUNDS } from './bounds.ts';
import { startsOperand } from './groups.ts';
import type { Span } from './model.ts';
import { readPostfix } from './postfix.ts';
import { afterPrefix, withoutTrailing } from './prefix.ts';
import { scan } from './scanner.ts';
import { Source } from './source.ts';
import { describe, type Token } from './tokens.ts';

/** A Lagrangian as typed: its summands in order. */
export interface Parsed {
  readonly source: Source;
  readonly items: readonly Summand[];
  /** Why reading stopped; the items before it are good. */
  readonly error: InputError | LimitError | null;
}

/**
 * Recursive descent over the tokens of a Lagrangian.
 *
 * sum := [sign] product (sign product)*;  product := factor ((× | ÷ | nothing) factor)*, left to right;
 * factor := derivative | atom with postfixes. Linear in the tokens; the depth of recursion is bounded by BOUNDS.nesting.
 */
export class Parser {
  private position = 0;
  private depth = 0;
  private readonly openBars: number[] = [];

  constructor(
    readonly source: Source,
    private readonly tokens: readonly Token[],
  ) {}

  get token(): Token {
    return this.tokens[this.position]!;
  }

  get next(): Token {
    return this.tokens[Math.min(this.position + 1, this.tokens.length - 1)]!;
  }

  get previous(): Token | null {
    return this.tokens[this.position - 1] ?? null;
  }

  take(): Token {
    const token = this.token;
    if (token.kind !== 'end') this.position++;
    return token;
  }

  /** Puts the cursor back on a token that has been taken. */
  back(token: Token): void {
    while (this.position > 0 && this.tokens[this.position] !== token) this.position--;
  }

  at(mark: string): boolean {
    return this.token.kind === 'mark' && this.token.mark === mark;
  }

  accept(mark: string): boolean {
    if (!this.at(mark)) return false;
    this.position++;
    return true;
  }

  fault(message: string, span: Span = this.token, suggestion: string | null = null): InputError {
    return this.source.fault('syntax', message, span, suggestion);
  }

  expected(what: string): InputError {
    return this.fault(`Expected ${what}, found ${describe(this.token, this.source.text)}.`);
  }

  /** Runs `read` one level deeper. @throws LimitError beyond BOUNDS.nesting. */
  nested<T>(at: Span, read: () => T): T {
    if (this.depth >= BOUNDS.nesting)
      throw this.source.limit(
        `Brackets are nested deeper than ${BOUNDS.nesting} levels, the most that are read.`,
        BOUNDS.nesting,
        null,
        at,
      );
    this.depth++;
    try {
      return read();
    } finally {
      this.depth--;
    }
  }

  /** A bar opens where an operand may stand, and closes the innermost open one at the same depth of brackets. */
  closesBar(): boolean {
    return this.at('|') && this.openBars.at(-1) === this.depth;
  }

  barred<T>(read: () => T): T {
    this.openBars.push(this.depth);
    try {
      return read();
    } finally {
      this.openBars.pop();
    }
  }

  /** Reads the first digit of a number token alone, as in \frac12. */
  splitDigit(): Node | null {
    const token = this.token;
    if (token.kind !== 'number' || token.digits.length < 2) return null;
    const first = token.digits[0]!;
    const rest = token.digits.slice(1);
    (this.tokens as Token[])[this.position] = {
      ...token,
      start: token.start + 1,
      digits: rest,
      value: rational(BigInt(rest)),
      gap: false,
    };
    return { is: 'number', value: rational(BigInt(first)), start: token.start, end: token.start + 1 };
  }

  private sign(): 1 | -1 | null {
    let sign: 1 | -1 | null = null;
    for (;;) {
      if (this.accept('+')) sign = sign ?? 1;
      else if (this.accept('-')) sign = (sign ?? 1) === 1 ? -1 : 1;
      else return sign;
    }
  }

  /** Reads summands until something that is neither a sign nor an operand; each finished one is handed to `done`. */
  summands(done: (item: Summand) => void): void {
    let first = true;
    for (;;) {
      const start = this.token.start;
      const sign = this.sign();
      if (sign === null && !first) return;
      if (this.token.kind === 'hc') {
        const end = this.take().end;
        if (sign === -1 || first)
          throw this.fault('"h.c." adds the conjugate of what stands before it; write "+ h.c.".', { start, end });
        done({ sign: 1, node: 'hc', start, end });
      } else {
        const node = this.product();
        done({ sign: sign ?? 1, node, start, end: node.end });
      }
      first = false;
    }
  }

  sum(): Node {
    const start = this.token.start;
    const items: Summand[] = [];
    this.summands((item) => items.push(item));
    const only = items[0]!;
    if (items.length === 1 && only.sign === 1 && only.node !== 'hc') return only.node;
    return { is: 'sum', items, start, end: items.at(-1)!.end };
  }

  private product(): Node {
    const first = this.factor();
    const factors: FactorNode[] = [{ by: '*', juxtaposed: false, node: first }];
    for (;;) {
      const mark = this.at('*') ? '*' : this.at('/') ? '/' : null;
      if (mark !== null) this.take();
      else if (!startsOperand(this)) break;
      else this.refuseTwoNumbers();
      const node = mark === null ? this.factor() : this.signedFactor();
      factors.push({ by: mark ?? '*', juxtaposed: mark === null, node });
    }
    if (factors.length === 1) return first;
    return { is: 'product', factors, start: first.start, end: factors.at(-1)!.node.end };
  }

  private refuseTwoNumbers(): void {
    if (this.token.kind === 'number' && this.previous?.kind === 'number')
      throw this.fault('Two numbers stand side by side; write * between them.', {
        start: this.previous.start,
        end: this.token.end,
      });
  }

  private signedFactor(): Node {
    const start = this.token.start;
    const sign = this.sign();
    const node = this.factor();
    return sign === -1 ? { is: 'negative', node, start, end: node.end } : node;
  }

  private factor(): Node {
    const atom = readAtom(this);
    return readPostfix(this, atom);
  }
}

function unexpected(parser: Parser): InputError {
  const { token } = parser;
  if (token.kind === 'mark' && [')', ']', '}'].includes(token.mark))
    return parser.fault(`This closing ${token.mark} has no partner that opens.`);
  if (token.kind === 'hc') return parser.fault('Write a plus sign before "h.c.".', token, '+ h.c.');
  if (token.kind === 'mark' && token.mark === ',')
    return parser.fault('A comma has no meaning here; decimals are written with a point.', token);
  return parser.expected('a sign, a factor or the end');
}

/** Reads a text; on an error keeps the summands that were complete before it. Never throws for any text. */
export function parse(text: string, called: string | null = null): Parsed {
  const source = new Source(text, called);
  const items: Summand[] = [];
  try {
    const all = scan(source);
    const from = afterPrefix(source, all);
    const tokens = withoutTrailing(all.slice(from));
    if (tokens.length === 1) throw source.fault('syntax', 'There is no Lagrangian yet: the text is empty.', tokens[0]!);
    const parser = new Parser(source, tokens);
    parser.summands((item) => items.push(item));
    if (parser.token.kind !== 'end') {
      items.pop();
      throw unexpected(parser);
    }
    return { source, items, error: null };
  } catch (error) {
    if (!(error instanceof InputError || error instanceof LimitError)) throw error;
    return { source, items, error };
  }
}

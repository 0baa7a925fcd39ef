import type { InputError } from '../errors.ts';
import { BOUNDS } from './bounds.ts';
import { meaningOf } from './commands.ts';
import type { Source } from './source.ts';
import { greekName, isNamedCommand, plainCharacter, subscriptDigit, VARIANTS } from './symbols.ts';
import { isSkipped } from './tokens.ts';

export const isLetter = (c: string): boolean => /^[A-Za-z]$/.test(c);
export const isDigit = (c: string): boolean => c >= '0' && c <= '9' && c.length === 1;

/** A position in the text and the reading of what spells a name there. */
export class Cursor {
  readonly text: string;
  at = 0;

  constructor(readonly source: Source) {
    this.text = source.text;
  }

  /** The character at an offset, mathematical alphabets reduced to plain letters; '' at the end. */
  peek(offset = this.at): string {
    const code = this.text.codePointAt(offset);
    return code === undefined ? '' : plainCharacter(String.fromCodePoint(code));
  }

  advance(): void {
    this.at += this.text.codePointAt(this.at)! > 0xffff ? 2 : 1;
  }

  fault(code: 'syntax' | 'unsupported', message: string, start: number): InputError {
    return this.source.fault(code, message, { start, end: Math.max(this.at, start + 1) });
  }

  skipBlanks(): void {
    while (isSkipped(this.peek())) this.advance();
  }

  digits(): string {
    let digits = '';
    for (; isDigit(this.peek()); this.advance()) digits += this.peek();
    return digits;
  }

  /** The name of the LaTeX command at the cursor, without its backslash. */
  commandName(): string {
    this.at++;
    const start = this.at;
    while (/[A-Za-z]/.test(this.text[this.at] ?? '')) this.at++;
    if (this.at === start && this.at < this.text.length) this.advance();
    return this.text.slice(start, this.at);
  }

  /** The subscript at the cursor as plain text, or null: _h, _{hs}, _\phi, ₁; several in a row are joined by "_". */
  subscript(): string | null {
    let sub: string | null = null;
    for (;;) {
      let piece = '';
      for (; subscriptDigit(this.peek()) >= 0; this.advance()) piece += subscriptDigit(this.peek());
      if (piece === '') {
        const from = this.at;
        this.skipBlanks();
        if (this.peek() !== '_') {
          this.at = from;
          return sub;
        }
        this.advance();
        piece = this.subscriptBody();
      }
      sub = sub === null ? piece : `${sub}_${piece}`;
    }
  }

  private subscriptBody(): string {
    const start = this.at;
    this.skipBlanks();
    const c = this.peek();
    if (c === '{') return this.spelling('A subscript');
    let body = '';
    if (c === '\\') {
      body = this.spelledCommand();
      if (body === '') return this.subscriptBody();
    } else if (greekName(c) !== null) {
      body = greekName(c)!;
      this.advance();
    } else if (isDigit(c)) body = this.digits();
    else for (; isLetter(this.peek()) || isDigit(this.peek()); this.advance()) body += this.peek();
    if (body === '') throw this.fault('syntax', 'A subscript must be letters or digits.', start);
    return body;
  }

  /** Text in braces that spells one name: letters, digits, Greek; fonts and spaces inside are skipped. */
  spelling(what: string): string {
    const start = this.at;
    let depth = 0;
    let body = '';
    do {
      const c = this.peek();
      if (c === '') throw this.fault('syntax', `${what} is not closed: a brace } is missing.`, start);
      if (c === '\\') {
        body += this.spelledCommand();
        continue;
      }
      this.advance();
      if (c === '{') depth++;
      else if (c === '}') depth--;
      else if (isLetter(c) || isDigit(c) || c === '_' || c === '.') body += c;
      else if (greekName(c) !== null) body += greekName(c);
      else if (!isSkipped(c)) throw this.fault('syntax', `${what} must be letters or digits, not "${c}".`, this.at - 1);
      if (body.length > BOUNDS.nameLength)
        throw this.source.limit(
          `${what} has more than ${BOUNDS.nameLength} characters, the most that are read.`,
          BOUNDS.nameLength,
          null,
          { start, end: this.at },
        );
    } while (depth > 0);
    if (body === '') throw this.fault('syntax', `${what} is empty.`, start);
    return body;
  }

  private spelledCommand(): string {
    const start = this.at;
    const name = this.commandName();
    if (name === '_') return '_';
    const variant = VARIANTS.get(name) ?? name;
    if (isNamedCommand(variant)) return variant;
    const meaning = meaningOf(name);
    if (meaning?.is === 'skip' || meaning?.is === 'spelling') return '';
    throw this.fault('syntax', `"\\${name}" cannot stand in a name.`, start);
  }
}

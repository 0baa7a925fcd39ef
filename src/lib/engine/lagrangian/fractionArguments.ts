import type { Token } from './tokens.ts';

interface Pending {
  /** Arguments still to come. */
  left: number;
  /** Brackets open inside the argument being read; 0 between arguments. */
  depth: number;
}

/**
 * Follows the arguments of \frac while a text is scanned: without braces each is one letter or digit, so that \frac c2 is c/2
 * although c2 is one name elsewhere.
 */
export class FractionArguments {
  private readonly stack: Pending[] = [];

  /** Whether an argument begins here. */
  get takesOneLetter(): boolean {
    return this.stack.at(-1)?.depth === 0;
  }

  note(token: Token): void {
    const top = this.stack.at(-1);
    if (top) this.advance(top, token);
    if (token.kind === 'frac') this.stack.push({ left: 2, depth: 0 });
  }

  private advance(top: Pending, token: Token): void {
    const mark = token.kind === 'mark' ? token.mark : '';
    if (mark === '{' || mark === '(') top.depth++;
    else if (top.depth > 0 && (mark === '}' || mark === ')')) {
      top.depth--;
      if (top.depth === 0) top.left--;
    } else if (top.depth === 0) top.left -= token.kind === 'number' ? Math.max(1, token.digits.length) : 1;
    if (top.left <= 0) this.stack.splice(this.stack.indexOf(top), 1);
  }
}

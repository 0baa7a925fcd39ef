import type { Rational } from '../exact/rational.ts';
import type { Span } from './model.ts';

/**
 * Words of the Lagrangian language. `mark` covers brackets and operators, spelt in one way whatever was typed:
 * + - * / ** ^ ! ( ) [ ] { } | = , . ; and † for a conjugate.
 */
export type Token = Span & {
  /** White space stands before it. */
  readonly gap: boolean;
} & (
    | { readonly kind: 'number'; readonly value: Rational; readonly digits: string }
    | { readonly kind: 'superscript'; readonly value: Rational }
    | { readonly kind: 'name'; readonly name: string }
    | { readonly kind: 'derivative'; readonly index: string | null }
    | { readonly kind: 'box' | 'imaginary' | 'pi' | 'sqrt' | 'conj' | 'frac' | 'over' | 'hc' | 'end' }
    | { readonly kind: 'function'; readonly name: string }
    | { readonly kind: 'mark'; readonly mark: string }
  );

export type TokenKind = Token['kind'];

/** Characters that stand for a mark. */
export const MARKS: ReadonlyMap<string, string> = new Map([
  ...[...'+-*/^!()[]{}|=,.;'].map((c): [string, string] => [c, c]),
  ...[...'−–—‒﹣－'].map((c): [string, string] => [c, '-']),
  ...[...'×·⋅∙•∗'].map((c): [string, string] => [c, '*']),
  ...[...'÷∕⁄'].map((c): [string, string] => [c, '/']),
  ['＋', '+'],
  ['∣', '|'],
  ['†', '†'],
  ['≡', '='],
]);

/** White space, zero-width characters, alignment marks and formula delimiters: skipped. */
export const isSkipped = (c: string): boolean => /[\s\u00ad\u200b-\u200f\u2060-\u2064\ufeff&~$]/u.test(c);

/** Names that stand for functions the language does not have: the interaction is a polynomial. */
export const FUNCTIONS: ReadonlySet<string> = new Set(
  'sin cos tan cot sinh cosh tanh exp log ln det Tr tr Re Im sum int prod lim'.split(' '),
);

/** A token by what it is, for sentences. */
export function describe(token: Token, text: string): string {
  if (token.kind === 'end') return 'the end of the text';
  return `"${text.slice(token.start, token.end).trim().slice(0, 30)}"`;
}

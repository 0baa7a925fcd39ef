import type { InputError } from '../errors.ts';
import { rational } from '../exact/rational.ts';
import { BOUNDS } from './bounds.ts';
import { ENVIRONMENTS, knownCommands, type Meaning, meaningOf } from './commands.ts';
import { Cursor, isDigit, isLetter } from './cursor.ts';
import { FractionArguments } from './fractionArguments.ts';
import { readLateSubscript } from './lateSubscript.ts';
import { nearest } from './nearest.ts';
import { readNumeral, readRaised } from './numerals.ts';
import type { Source } from './source.ts';
import { FRACTIONS, GREEK, greekName, LORENTZ, superscriptDigit } from './symbols.ts';
import { FUNCTIONS, isSkipped, MARKS, type Token } from './tokens.ts';

type WithoutPlace<T> = T extends Token ? Omit<T, 'start' | 'end' | 'gap'> : never;
/** A token before it is given its place; null where what was read is skipped. */
type Word = WithoutPlace<Token> | null;

/**
 * Splits a Lagrangian into tokens: plain text, Unicode and LaTeX in any mixture.
 *
 * One pass, a constant number of looks at each character. Names are whole identifiers in plain text (`lambda`, `m_h`, `k3`);
 * a Greek character or a LaTeX command is a name by itself; a subscript belongs to its name.
 * @throws InputError syntax, unsupported; LimitError over the bounds of length, tokens, digits and names.
 */
export function scan(source: Source): Token[] {
  const { length } = source.text;
  if (length > BOUNDS.lagrangianLength)
    throw source.limit(
      `The text has ${length} characters; at most ${BOUNDS.lagrangianLength} are read.`,
      BOUNDS.lagrangianLength,
      length,
      { start: BOUNDS.lagrangianLength, end: BOUNDS.lagrangianLength + 1 },
    );
  const cursor = new Cursor(source);
  const tokens: Token[] = [];
  const fractions = new FractionArguments();
  let gap = false;
  while (cursor.at < length) {
    if (readLateSubscript(cursor, tokens)) continue;
    const start = cursor.at;
    const last = tokens.at(-1);
    const word = readWord(cursor, last?.kind === 'mark' && last.mark === '^', fractions.takesOneLetter);
    if (word === null) {
      gap = true;
      continue;
    }
    if (tokens.length >= BOUNDS.tokens)
      throw source.limit(
        `The text has more than ${BOUNDS.tokens} words and signs, the most that are read.`,
        BOUNDS.tokens,
        null,
        { start, end: cursor.at },
      );
    const token: Token = { ...word, start, end: cursor.at, gap };
    tokens.push(token);
    fractions.note(token);
    gap = false;
  }
  return [...tokens, { kind: 'end', start: length, end: length, gap }];
}

function readWord(cursor: Cursor, afterCaret: boolean, oneLetter: boolean): Word {
  const start = cursor.at;
  const c = cursor.peek();
  if (c === '%') return skipComment(cursor);
  if (isDigit(c) || (c === '.' && isDigit(cursor.peek(start + 1)))) return { kind: 'number', ...readNumeral(cursor) };
  if (afterCaret && daggerWord(cursor)) return { kind: 'mark', mark: '†' };
  if (isLetter(c)) return hermitianConjugate(cursor) ? { kind: 'hc' } : identifier(cursor, oneLetter);
  if (c === '\\') return command(cursor);
  cursor.advance();
  if (isSkipped(c)) return null;
  const greek = greekName(c);
  if (greek !== null) return named(cursor, greek, start);
  if (superscriptDigit(c) >= 0 || c === '⁻') return { kind: 'superscript', value: readRaised(cursor, c, start) };
  return symbol(cursor, c, start, afterCaret);
}

function skipComment(cursor: Cursor): null {
  const end = cursor.text.indexOf('\n', cursor.at);
  cursor.at = end < 0 ? cursor.text.length : end;
  return null;
}

const REFUSED_SYMBOLS: ReadonlyMap<string, string> = new Map([
  ["'", 'A prime is not part of a name; use a subscript instead.'],
  ['′', 'A prime is not part of a name; use a subscript instead.'],
  ['…', 'Dots leave terms unsaid; write every term.'],
  ['∇', 'Write derivatives as d or ∂; ∇ is not read.'],
  ['±', 'A sign must be + or −, not ±.'],
  ['_', 'A subscript must follow a name.'],
]);

function symbol(cursor: Cursor, c: string, start: number, afterCaret: boolean): Word {
  const fraction = FRACTIONS.get(c);
  if (fraction) return { kind: 'number', value: rational(...fraction), digits: '' };
  const mark = MARKS.get(c);
  if (c === '*' && cursor.peek() === '*' && !afterCaret) {
    cursor.advance();
    return { kind: 'mark', mark: '**' };
  }
  if (mark !== undefined) return { kind: 'mark', mark };
  if (c === ':' && cursor.peek() === '=') return null;
  if (c === '∂') return { kind: 'derivative', index: cursor.subscript() };
  if (c === '□' || c === '◻') return { kind: 'box' };
  if (c === '√') return { kind: 'sqrt' };
  if (c === 'ℒ') return named(cursor, 'L', start);
  const code = c.codePointAt(0)!.toString(16).toUpperCase().padStart(4, '0');
  const message = REFUSED_SYMBOLS.get(c) ?? `The character "${c}" (U+${code}) has no meaning in a Lagrangian.`;
  throw cursor.fault('syntax', message, start);
}

/** "h.c." or "c.c." at the cursor, in any case and with or without the last point. */
function hermitianConjugate(cursor: Cursor): boolean {
  const match = /^[hc]\.\s?c\b\.?/i.exec(cursor.text.slice(cursor.at, cursor.at + 6));
  if (match) cursor.at += match[0].length;
  return match !== null;
}

/** "phi^dagger" in plain text. */
function daggerWord(cursor: Cursor): boolean {
  const match = /^(dagger|dag)(?![A-Za-z0-9])/.exec(cursor.text.slice(cursor.at, cursor.at + 7));
  if (match) cursor.at += match[0].length;
  return match !== null;
}

/** A whole identifier; where LaTeX takes one letter, one letter or a Greek name. */
function identifier(cursor: Cursor, oneLetter: boolean): Word {
  const start = cursor.at;
  let name = '';
  while (isLetter(cursor.peek()) || (name !== '' && isDigit(cursor.peek()))) {
    name += cursor.peek();
    cursor.advance();
  }
  if (oneLetter && !GREEK.has(name)) {
    cursor.at = start;
    cursor.advance();
    name = name[0]!;
  }
  return named(cursor, name, start);
}

/** A name whose base has been read: takes its subscript and recognises the reserved words. */
function named(cursor: Cursor, base: string, start: number): Word {
  const sub = cursor.subscript();
  if (base === 'd' || base === 'partial') {
    if (sub === null || LORENTZ.has(sub) || sub.length === 1) return { kind: 'derivative', index: sub };
  }
  if (sub !== null) return { kind: 'name', name: checkedName(cursor, `${base}_${sub}`, start) };
  if (base === 'i' || base === 'I') return { kind: 'imaginary' };
  if (base === 'pi' || base === 'sqrt' || base === 'conj') return { kind: base };
  if (FUNCTIONS.has(base)) return { kind: 'function', name: base };
  return { kind: 'name', name: checkedName(cursor, base, start) };
}

function checkedName(cursor: Cursor, name: string, start: number): string {
  if (name.length <= BOUNDS.nameLength) return name;
  throw cursor.source.limit(
    `This name has ${name.length} characters; at most ${BOUNDS.nameLength} are read.`,
    BOUNDS.nameLength,
    name.length,
    { start, end: cursor.at },
  );
}

function command(cursor: Cursor): Word {
  const start = cursor.at;
  const name = cursor.commandName();
  const meaning = meaningOf(name);
  if (meaning === null) throw unknownCommand(cursor, name, start);
  return meant(cursor, meaning, name, start);
}

function unknownCommand(cursor: Cursor, name: string, start: number): InputError {
  const close = nearest(name, knownCommands());
  const shown = name.length > 30 ? `${name.slice(0, 29)}…` : name;
  const hint = close === null ? 'expected a field, a parameter or a sign' : `\\${close} is`;
  const message = `The command \\${shown} is not known here; ${hint}.`;
  return cursor.source.fault('syntax', message, { start, end: cursor.at }, close === null ? null : `\\${close}`);
}

function meant(cursor: Cursor, meaning: Meaning, name: string, start: number): Word {
  switch (meaning.is) {
    case 'name':
      return named(cursor, meaning.name, start);
    case 'mark':
      return { kind: 'mark', mark: meaning.mark };
    case 'word':
      return meaning.kind === 'derivative' ? { kind: 'derivative', index: cursor.subscript() } : { kind: meaning.kind };
    case 'skip':
      return name === '\\' ? skipLineBreak(cursor) : null;
    case 'skip-argument':
      return skipArgument(cursor, name, start);
    case 'spelling':
      return spelled(cursor, start);
    case 'refused':
      throw cursor.fault('unsupported', meaning.message, start);
  }
}

/** The space after a line break: \\[4pt]. */
function skipLineBreak(cursor: Cursor): null {
  const match = /^\s*\[\s*-?[\d.]+\s*(pt|em|ex|mm|cm|in)\s*\]/.exec(cursor.text.slice(cursor.at, cursor.at + 24));
  if (match) cursor.at += match[0].length;
  return null;
}

/** \mathrm{dm}, \text{h.c.}, \mathcal L. */
function spelled(cursor: Cursor, start: number): Word {
  cursor.skipBlanks();
  if (cursor.peek() !== '{') {
    const letter = cursor.peek();
    if (!isLetter(letter)) throw cursor.fault('syntax', 'A name must follow here.', start);
    cursor.advance();
    return named(cursor, letter, start);
  }
  const body = cursor.spelling('A name');
  if (/^[hc]\.c\.?$/i.test(body)) return { kind: 'hc' };
  if (body.includes('.')) throw cursor.fault('syntax', 'A name is letters and digits.', start);
  if (!/^[A-Za-z]/.test(body)) throw cursor.fault('syntax', 'A name begins with a letter.', start);
  return named(cursor, body, start);
}

function skipArgument(cursor: Cursor, name: string, start: number): null {
  const match = /^\s*\{([^{}]{0,60})\}(\{[^{}]{0,20}\})?/.exec(cursor.text.slice(cursor.at, cursor.at + 120));
  if (!match) throw cursor.fault('syntax', `\\${name} needs an argument in braces.`, start);
  const wraps = name === 'begin' || name === 'end';
  cursor.at += wraps ? match[0].length : match[0].length - (match[2]?.length ?? 0);
  const environment = match[1]!.trim();
  if (wraps && !ENVIRONMENTS.has(environment))
    throw cursor.fault('syntax', `The environment "${environment}" is not one that holds a formula.`, start);
  return null;
}

import { type Rational, rational } from '../exact/rational.ts';
import { BOUNDS } from './bounds.ts';
import { type Cursor, isDigit } from './cursor.ts';
import { superscriptDigit } from './symbols.ts';

/** The exponent of e notation: 0 where there is none, null where it is too long to be a number here. */
function readExponent(cursor: Cursor): number | null {
  const { text } = cursor;
  if (!/[eE]/.test(text[cursor.at] ?? '')) return 0;
  const sign = /[+-]/.test(text[cursor.at + 1] ?? '') ? 1 : 0;
  if (!isDigit(text[cursor.at + 1 + sign] ?? '')) return 0;
  const negative = text[cursor.at + 1] === '-';
  cursor.at += 1 + sign;
  const digits = cursor.digits();
  if (digits.length > 4) return null;
  return negative ? -Number(digits) : Number(digits);
}

/**
 * A number at the cursor. A decimal is an exact fraction: 0.25 = 1/4, 1.5e-2 = 3/200.
 * `digits` is the numeral as typed when it is a plain whole number. @throws LimitError over BOUNDS.digits.
 */
export function readNumeral(cursor: Cursor): { value: Rational; digits: string } {
  const start = cursor.at;
  const whole = cursor.digits();
  let fraction = '';
  if (cursor.text[cursor.at] === '.' && isDigit(cursor.peek(cursor.at + 1))) {
    cursor.at++;
    fraction = cursor.digits();
  }
  const exponent = readExponent(cursor);
  const span = { start, end: cursor.at };
  const length = whole.length + fraction.length;
  if (length > BOUNDS.digits)
    throw cursor.source.limit(
      `This number has ${length} digits; at most ${BOUNDS.digits} are read.`,
      BOUNDS.digits,
      length,
      span,
    );
  if (exponent === null || Math.abs(exponent) > BOUNDS.digits)
    throw cursor.source.limit(
      `This power of ten is out of range; exponents from −${BOUNDS.digits} to ${BOUNDS.digits} are read.`,
      BOUNDS.digits,
      exponent,
      span,
    );
  const shift = exponent - fraction.length;
  const digits = BigInt(whole + fraction);
  const value = shift >= 0 ? rational(digits * 10n ** BigInt(shift)) : rational(digits, 10n ** BigInt(-shift));
  return { value, digits: fraction === '' && exponent === 0 ? whole : '' };
}

/** A raised number whose first character has been read: ², ⁻¹. @throws LimitError for a very long one. */
export function readRaised(cursor: Cursor, first: string, start: number): Rational {
  const negative = first === '⁻';
  let digits = negative ? '' : String(superscriptDigit(first));
  for (; superscriptDigit(cursor.peek()) >= 0; cursor.advance()) digits += superscriptDigit(cursor.peek());
  if (digits === '') throw cursor.fault('syntax', 'A raised minus needs a raised number after it.', start);
  if (digits.length > 4)
    throw cursor.source.limit(`Powers up to ${BOUNDS.power} are read.`, BOUNDS.power, null, { start, end: cursor.at });
  return rational(negative ? -BigInt(digits) : BigInt(digits));
}

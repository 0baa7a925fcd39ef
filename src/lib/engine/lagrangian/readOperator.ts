import type { FieldFactor } from './model.ts';
import { readName } from './names.ts';

/** No spelling of one operator is longer; anything beyond is not read. */
const LONGEST = 200;

/**
 * Reads one field operator in any spelling of the language ("phi", "φ^*", "\phi^\dagger", "conj(phi)") to its canonical ASCII name.
 * Null when the text is not one operator. Never throws; linear in a text of at most 200 characters.
 */
export function readOperator(text: string): FieldFactor | null {
  return text.length <= LONGEST ? readName(text) : null;
}

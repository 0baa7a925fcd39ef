import type { ErrorObject } from '#contract/errors.ts';

/** The part of the form that a refusal concerns. */
export type Place = 'model' | 'legs' | 'order' | 'title' | 'whole';

const OF_ORDER = new Set(['wrong-order', 'infinite-order', 'unknown-name']);
const OF_MODEL = new Set(['syntax', 'not-hermitian', 'wrong-sign', 'no-kinetic-term', 'unsupported']);

/** Where a refusal is shown: a place in the Lagrangian, then the code, then the key that the sentence names decide. */
export function placeOf({ code, line, message }: Pick<ErrorObject, 'code' | 'line' | 'message'>): Place {
  if (line !== null || OF_MODEL.has(code)) return 'model';
  if (code === 'wrong-legs') return 'legs';
  if (OF_ORDER.has(code)) return 'order';
  const [, key] = /"(legs|order|title|lagrangian|model|fields|parameters|conventions)\b/.exec(message) ?? [];
  if (key === 'legs' || key === 'order' || key === 'title') return key;
  if (key !== undefined) return 'model';
  return code === 'limit' ? 'order' : 'whole';
}

/** A refusal of the contract for a number that was typed wrongly, in words of the form. */
export function sentenceOf(error: ErrorObject): string {
  if (error.code !== 'bad-request') return error.message;
  const place = placeOf(error);
  if (place === 'order') return 'An order is a whole number from 0, or for a power an exact fraction such as 1/2.';
  if (place === 'legs') return 'A correlator has at most 12 legs, each the name of a field.';
  return error.message;
}

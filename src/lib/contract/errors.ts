import type { ErrorCode } from '#engine/errors.ts';

/** Codes of refusals that arise above the engine. */
export type BoundaryCode =
  | 'malformed'
  | 'not-signed-in'
  | 'not-allowed'
  | 'not-found'
  | 'method'
  | 'conflict'
  | 'too-large'
  | 'rate'
  | 'busy'
  | 'interrupted'
  | 'defect';

export type AnyCode = ErrorCode | BoundaryCode;

/** The one error object: command line, HTTP (as the `error` member of problem+json) and stored failures. */
export interface ErrorObject {
  code: AnyCode;
  message: string;
  line: number | null;
  column: number | null;
  /** Length of the offending span in characters, where there is one. */
  length?: number;
  suggestion?: string;
  /** Form errors: one sentence per field. */
  fields?: Record<string, string>;
}

/** HTTP status of each code: 400 malformed, 401, 403, 404, 409, 413, 422 invalid input, 429 rate. */
export const STATUS: Record<AnyCode, number> = {
  syntax: 422,
  'unknown-name': 422,
  unsupported: 422,
  'not-hermitian': 422,
  'wrong-sign': 422,
  'wrong-legs': 422,
  'wrong-order': 422,
  'infinite-order': 422,
  'no-kinetic-term': 422,
  'bad-request': 422,
  limit: 422,
  malformed: 400,
  'not-signed-in': 401,
  'not-allowed': 403,
  'not-found': 404,
  method: 405,
  conflict: 409,
  'too-large': 413,
  rate: 429,
  busy: 503,
  interrupted: 503,
  defect: 500,
};

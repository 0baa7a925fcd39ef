import { type ErrorCode, InputError, LimitError } from '#engine/errors.ts';

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

/** A refusal that arises above the engine, carrying the one error object. */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  constructor(readonly error: ErrorObject) {
    super(error.message);
  }
}

/** The error object of anything thrown, or null when it is a defect of the program. */
export function errorObject(thrown: unknown): ErrorObject | null {
  if (thrown instanceof Refusal) return thrown.error;
  if (!(thrown instanceof InputError || thrown instanceof LimitError)) return null;
  const { code, message, place } = thrown;
  const suggestion = thrown instanceof InputError ? thrown.suggestion : null;
  return {
    code,
    message,
    line: place?.line ?? null,
    column: place?.column ?? null,
    ...(place ? { length: place.length } : {}),
    ...(suggestion === null ? {} : { suggestion }),
  };
}

/** The command line's exit code: 2 bad input, 3 over a limit, 1 a defect. */
export const exitCode = (error: ErrorObject | null): 1 | 2 | 3 =>
  error === null ? 1 : error.code === 'limit' || error.code === 'too-large' ? 3 : 2;

import { type AnyCode, type ErrorObject, STATUS } from '#contract/errors.ts';

/**
 * A request that is answered with a sentence instead of a result: everything above the engine that is not a defect.
 * Pages catch it with `errorOf`; the API turns it into problem+json.
 */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  constructor(
    readonly code: AnyCode,
    message: string,
    readonly detail: Partial<ErrorObject> = {},
    /** Seconds after which it makes sense to ask again. */
    readonly retryAfter: number | null = null,
  ) {
    super(message);
  }
}

export const notFound = (what: string): Refusal =>
  new Refusal('not-found', `There is no ${what} here that you may see.`);

const DEFECT = 'The program made a mistake. It has been written to the log; please report the request id.';

interface EngineError {
  name: string;
  code: ErrorObject['code'];
  message: string;
  place?: { line: number; column: number; length: number } | null;
  suggestion?: string | null;
}

/** By name, not by class: a bundle may hold its own copy of the engine. */
const isEngineError = (error: unknown): error is EngineError =>
  error instanceof Error && (error.name === 'InputError' || error.name === 'LimitError');

/** Whether an error is an answer (refusal, bad input, limit) and not a defect of the program. */
export const isAnswer = (error: unknown): boolean => error instanceof Refusal || isEngineError(error);

/** The one error object of any error; a defect is named as such and tells nothing of its inside. */
export function errorOf(error: unknown): ErrorObject {
  if (error instanceof Refusal)
    return { code: error.code, message: error.message, line: null, column: null, ...error.detail };
  if (!isEngineError(error)) return { code: 'defect', message: DEFECT, line: null, column: null };
  const { code, message, place, suggestion } = error;
  return {
    code,
    message,
    line: place?.line ?? null,
    column: place?.column ?? null,
    ...(place ? { length: place.length } : {}),
    ...(suggestion ? { suggestion } : {}),
  };
}

export const statusOf = (error: ErrorObject): number => STATUS[error.code];

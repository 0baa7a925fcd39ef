import { type AnyCode, Refusal as AnyRefusal, type ErrorObject, errorObject, STATUS } from '#contract/errors.ts';

/**
 * A request that is answered with a sentence instead of a result: everything above the engine that is not a defect.
 * Pages catch it with `errorOf`; the API turns it into problem+json.
 */
export class Refusal extends AnyRefusal {
  constructor(
    readonly code: AnyCode,
    message: string,
    detail: Partial<ErrorObject> = {},
    /** Seconds after which it makes sense to ask again. */
    readonly retryAfter: number | null = null,
  ) {
    super({ code, message, line: null, column: null, ...detail });
  }
}

export const notFound = (what: string): Refusal =>
  new Refusal('not-found', `There is no such ${what} here, or it is not yours to see.`);

const DEFECT: ErrorObject = {
  code: 'defect',
  message: 'The program made a mistake. It has been written to the log; please report the request id.',
  line: null,
  column: null,
};

/** Whether an error is an answer (refusal, bad input, limit) and not a defect of the program. */
export const isAnswer = (error: unknown): boolean => errorObject(error) !== null;

/** The one error object of anything thrown; a defect is named as such and tells nothing of its inside. */
export const errorOf = (error: unknown): ErrorObject => errorObject(error) ?? DEFECT;

export const statusOf = (error: ErrorObject): number => STATUS[error.code];

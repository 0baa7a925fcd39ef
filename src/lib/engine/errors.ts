/** What can be wrong with an input. The one vocabulary of error codes; HTTP and the command line carry the same words. */
export type ErrorCode =
  | 'syntax'
  | 'unknown-name'
  | 'unsupported'
  | 'not-hermitian'
  | 'wrong-sign'
  | 'wrong-legs'
  | 'wrong-order'
  | 'infinite-order'
  | 'no-kinetic-term'
  | 'bad-request'
  | 'limit';

/** Where in the text an error stands: 1-based line and column of its first character, length in characters. */
export interface TextPlace {
  readonly line: number;
  readonly column: number;
  readonly length: number;
}

/** The input is wrong: says what, where and what was expected. Anything that is not an InputError or LimitError is a defect. */
export class InputError extends Error {
  override readonly name = 'InputError';
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly place: TextPlace | null = null,
    /** What was probably meant, ready to replace the offending span. */
    readonly suggestion: string | null = null,
  ) {
    super(message);
  }
}

/** The input is understood but larger than a stated bound. */
export class LimitError extends Error {
  override readonly name = 'LimitError';
  readonly code: ErrorCode = 'limit';
  constructor(
    message: string,
    readonly limit: number,
    readonly needed: number | null = null,
    readonly place: TextPlace | null = null,
  ) {
    super(message);
  }
}

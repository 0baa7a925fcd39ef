import { type ErrorCode, InputError, LimitError, type TextPlace } from '../errors.ts';
import type { Span } from './model.ts';

/** A text to read, with the places of its errors. */
export class Source {
  constructor(
    readonly text: string,
    /** What the message calls the text when it is not the Lagrangian itself, e.g. "the coefficient of term 2". */
    readonly called: string | null = null,
    /** False for a model that was not given as a text: its errors have no place. */
    private readonly hasPlaces = true,
  ) {}

  place({ start, end }: Span): TextPlace | null {
    if (!this.hasPlaces) return null;
    const before = this.text.slice(0, start);
    const line = before.split('\n').length;
    return { line, column: start - before.lastIndexOf('\n'), length: Math.max(1, end - start) };
  }

  private say(message: string): string {
    return this.called === null ? message : `In ${this.called}: ${message}`;
  }

  /** The error to throw for a span of this text. */
  fault(code: ErrorCode, message: string, span: Span, suggestion: string | null = null): InputError {
    return new InputError(code, this.say(message), this.place(span), suggestion);
  }

  limit(message: string, limit: number, needed: number | null, span: Span): LimitError {
    return new LimitError(this.say(message), limit, needed, this.place(span));
  }

  /** The piece of text under a span, shortened for use in a sentence. */
  quote({ start, end }: Span): string {
    const piece = this.text.slice(start, end).replace(/\s+/g, ' ').trim();
    return piece.length > 40 ? `${piece.slice(0, 37)}…` : piece;
  }
}

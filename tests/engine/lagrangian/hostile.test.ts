import { describe, expect, it } from 'vitest';
import { expansionRequestSchema } from '#contract/request.ts';
import { InputError, LimitError } from '#engine/errors.ts';
import type { ModelSource } from '#engine/lagrangian/input.ts';
import { previewModel, readModel } from '#engine/lagrangian/read.ts';
import { hostileCases } from '../../support/hostile.ts';

/** Codes that the reader of Lagrangians gives; the others belong to the request around it. */
const OF_THE_TEXT = new Set(['syntax', 'unsupported', 'not-hermitian', 'wrong-sign', 'no-kinetic-term', 'limit']);

const texts = hostileCases().flatMap(({ name, request, code }) => {
  const text = request?.lagrangian;
  if (typeof text !== 'string' || !expansionRequestSchema.safeParse(request).success) return [];
  return [{ name, text, code, request: request as ModelSource }];
});

function thrown(source: ModelSource): unknown {
  try {
    readModel(source);
    return null;
  } catch (error) {
    return error;
  }
}

const refused = texts.filter(({ code, request }) => OF_THE_TEXT.has(code) && thrown(request) !== null);

describe('hostile Lagrangians', () => {
  it('most of the corpus is refused by the reader itself', () => {
    expect(refused.length).toBeGreaterThan(280);
  });

  it.each(refused)('$name', ({ request, text, code }) => {
    const error = thrown(request);
    expect(error instanceof InputError || error instanceof LimitError).toBe(true);
    const { code: got, place, message } = error as InputError | LimitError;
    expect(got).toBe(code);
    expect(message).toMatch(/[.?]$/);
    expect(message.length).toBeLessThan(400);
    if (message.includes('is declared as a multiplet')) return;
    const lines = text.split('\n');
    expect(place).not.toBeNull();
    expect(place!.line).toBeLessThanOrEqual(lines.length);
    expect(place!.column).toBeLessThanOrEqual((lines[place!.line - 1] ?? '').length + 1);
    expect(place!.length).toBeGreaterThan(0);
  });

  it.each(texts)('preview of $name never throws', ({ text }) => {
    const { model, error } = previewModel({ lagrangian: text });
    expect((model === null) !== (error === null)).toBe(true);
  });
});

import { describe, expect, it } from 'vitest';
import { type ErrorObject, errorObject, exitCode } from '#contract/errors.ts';
import { parseJson } from '#contract/json.ts';
import { expansionRequestSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { prepare } from '#engine/index.ts';
import { type HostileCase, hostileCases } from '../support/hostile.ts';
import { run } from './run.ts';

const cases = hostileCases();

/** What the command does before it starts to list diagrams, in this process. */
function refusal({ body }: HostileCase): ErrorObject | null {
  try {
    prepare(validate(expansionRequestSchema, parseJson(body)));
    return null;
  } catch (error) {
    return errorObject(error);
  }
}

describe('the corpus of hostile and broken requests', () => {
  it('has more than two hundred entries', () => expect(cases.length).toBeGreaterThan(200));
  it.each(cases)('$name', (entry) => {
    const error = refusal(entry);
    expect(error).not.toBeNull();
    expect([error!.code, exitCode(error)]).toEqual([entry.code, entry.exit]);
    expect(error!.message.length).toBeGreaterThan(10);
    expect(error!.message.length).toBeLessThan(600);
  });
});

describe('the same on the command line', () => {
  it.each(cases.filter((_, at) => at % 20 === 0))('$name', ({ body, exit, code }) => {
    const ran = run('expand', body);
    expect([ran.exit, ran.out]).toEqual([exit, '']);
    expect(JSON.parse(ran.err).error.code).toBe(code);
  });
});

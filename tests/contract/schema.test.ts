import { describe, expect, it } from 'vitest';
import { errorObject } from '#contract/errors.ts';
import { expansionRequestSchema } from '#contract/request.ts';
import type { DiagramDTO, ExpansionResult } from '#contract/result.ts';
import {
  diagramAnswerSchema,
  diagramSchema,
  errorSchema,
  expansionResultSchema,
  ledgerSchema,
} from '#contract/resultSchema.ts';
import { validate } from '#contract/validate.ts';
import { ledgerBody } from '#engine/answer/ledger.ts';
import { answerDiagram, expansionHead, prepare, renderDiagram, renderLedger, runExpansion } from '#engine/index.ts';
import { balance } from '#engine/ledger/balance.ts';
import { independentSums } from '#engine/ledger/independent.ts';
import { openApi } from '#server/openapi.ts';
import { contractSchema } from '#server/schema-document.ts';

const PHI4 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
const PORTAL = '1/2 (d h)^2 - 1/2 m^2 h^2 + 1/2 (d s)^2 - 1/2 M^2 s^2 - lambda/4! h^4 - rho/4 h^2 s^2 - sigma/4! s^4';
const requests: [string, object][] = [
  ['one field', { lagrangian: PHI4, legs: ['phi', 'phi'], order: { lambda: 2 } }],
  [
    'disconnected, legs joined',
    { lagrangian: PHI4, legs: ['phi', 'phi'], order: { lambda: 1 }, keep: 'all', through: true },
  ],
  [
    'charged',
    {
      lagrangian: '(d phi^*)(d phi) - m^2 phi^* phi - lambda/4 (phi^* phi)^2',
      legs: ['phi', 'phi^*'],
      order: { loops: 2 },
    },
  ],
  ['portal', { lagrangian: PORTAL, legs: ['h', 'h', 's', 's'], order: { rho: 2 }, keep: '1PI' }],
  [
    'fractional and negative powers',
    { lagrangian: '1/2 (d phi)^2 - 1/f^2 phi^4', legs: ['phi', 'phi'], order: { f: -2 } },
  ],
  ['derivative coupling', { lagrangian: '1/2 (d phi)^2 + b/2 phi (d phi)^2', legs: ['phi', 'phi'], order: { b: 2 } }],
  ['none', { lagrangian: PHI4, legs: ['phi'], order: { lambda: 1 } }],
  [
    'dropped',
    { lagrangian: PHI4, legs: [], order: { total: 3 }, through: true, drop: ['self-contractions', 'scaleless'] },
  ],
];

const prepared4 = (more: object) =>
  prepare(validate(expansionRequestSchema, { lagrangian: PHI4, legs: ['phi', 'phi'], order: { lambda: 6 }, ...more }));

function resultOf(request: object): ExpansionResult {
  const prepared = prepare(validate(expansionRequestSchema, request));
  const run = runExpansion(prepared);
  const diagrams: DiagramDTO[] = [];
  let step = run.next();
  for (; !step.done; step = run.next()) diagrams.push(renderDiagram(prepared, step.value));
  return { ...expansionHead(prepared, step.value), diagrams };
}

describe('the result contract', () => {
  it.each(requests)('holds for what is computed: %s', (_, request) => {
    // Through JSON, as everybody receives it.
    const result = JSON.parse(JSON.stringify(resultOf(request)));
    expect(expansionResultSchema.safeParse(result).error).toBeUndefined();
    expect(expansionResultSchema.safeParse({ ...result, more: 1 }).success).toBe(false);
    const { ledger: _ledger, ...less } = result;
    expect(expansionResultSchema.safeParse(less).success).toBe(false);
  });
  it.each([
    ['one key more in a diagram', { more: 1 }, false],
    ['a factor as a number', { symmetryFactor: 6 }, false],
    ['a weight that is no fraction', { weight: '0.5' }, false],
    ['a leg with a wrong key', { legs: [{ id: 1, field: 'phi', vertex: 1, label: 'x' }] }, false],
    ['nothing changed', {}, true],
  ])('is strict inside: %s', (_, change, valid) => {
    const [diagram] = resultOf(requests[0]![1]).diagrams;
    expect(diagramSchema.safeParse({ ...diagram, ...change }).success).toBe(valid);
  });
  it.each(['id', 'bare', 'lines', 'shape', 'onePI'] as const)('needs %s of every diagram', (key) => {
    const { [key]: _, ...less } = resultOf(requests[0]![1]).diagrams[0]!;
    expect(diagramSchema.safeParse(less).success).toBe(false);
  });
  it('holds for a ledger that rests on the uncut list', () => {
    const prepared = prepared4({ keep: '1PI', drop: ['scaleless'] });
    const { request } = prepared.canonical;
    // 900 multiplications are enough for the uncut sums and too few for the cut ones; the list is the sums themselves.
    const limited = independentSums(request, 900);
    if (limited.state !== 'rests') throw new Error(`the sums are ${limited.state}`);
    const uncut = limited.uncut.rows.map((row) => ({ ...row, classes: 1 }));
    const ledger = renderLedger(prepared, ledgerBody(balance(limited, uncut, uncut)));
    expect(ledger.state).toBe('rests');
    expect(ledgerSchema.safeParse(JSON.parse(JSON.stringify(ledger))).error).toBeUndefined();
  });
  it('holds for refusals, with and without a place', () => {
    for (const ask of [
      () => prepared4({ lagrangian: '1/2 (d phi)^2 - lambda phi^' }),
      () => prepared4({ legs: ['psi'] }),
      () => prepared4({ more: 1 }),
    ]) {
      let thrown: unknown = null;
      try {
        ask();
      } catch (error) {
        thrown = error;
      }
      const error = JSON.parse(JSON.stringify(errorObject(thrown)));
      expect(errorSchema.safeParse(error).error).toBeUndefined();
      expect(errorSchema.safeParse({ ...error, code: 'no-such-code' }).success).toBe(false);
    }
  });
  it('holds for a single diagram with its working', () => {
    const answer = answerDiagram({
      lines: [
        [1, 2],
        [1, 2],
        [1, 2],
      ],
      legs: [1, 2],
      lagrangian: PHI4,
      with: [],
    });
    expect(diagramAnswerSchema.safeParse(JSON.parse(JSON.stringify(answer))).error).toBeUndefined();
  });
  it('is served as JSON Schema', () => {
    const { $defs } = contractSchema() as { $defs: Record<string, { type?: string; additionalProperties?: boolean }> };
    expect(Object.keys($defs)).toEqual([
      'ExpansionRequest',
      'DiagramRequest',
      'ExpansionResult',
      'DiagramAnswer',
      'Error',
    ]);
    expect($defs.ExpansionResult).toMatchObject({ type: 'object', additionalProperties: false });
  });
  it('is what the OpenAPI document refers to', () => {
    const document = openApi() as { components: { schemas: Record<string, unknown> } };
    const references = [...JSON.stringify(document).matchAll(/"#\/components\/schemas\/(\w+)"/g)].map(
      ([, name]) => name!,
    );
    expect(new Set(references)).toEqual(new Set(Object.keys(document.components.schemas)));
    expect(document.components.schemas.Ledger).toMatchObject({ additionalProperties: false });
  });
});

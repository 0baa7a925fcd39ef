import { describe, expect, it } from 'vitest';
import { expansionRequestSchema } from '#contract/request.ts';
import { diagramAnswerSchema, expansionResultSchema } from '#contract/resultSchema.ts';
import { validate } from '#contract/validate.ts';
import { answerDiagram, expansionHead, prepare, renderDiagram, runExpansion } from '#engine/index.ts';
import { contractSchema } from '#server/schema-document.ts';

const PHI4 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
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
  ['derivative coupling', { lagrangian: '1/2 (d phi)^2 + b/2 phi (d phi)^2', legs: ['phi', 'phi'], order: { b: 2 } }],
  ['none', { lagrangian: PHI4, legs: ['phi'], order: { lambda: 1 } }],
  [
    'dropped',
    { lagrangian: PHI4, legs: [], order: { total: 3 }, through: true, drop: ['self-contractions', 'scaleless'] },
  ],
];

function resultOf(request: object): unknown {
  const prepared = prepare(validate(expansionRequestSchema, request));
  const run = runExpansion(prepared);
  const diagrams = [];
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
    expect(Object.keys($defs)).toEqual(['ExpansionRequest', 'DiagramRequest', 'ExpansionResult', 'DiagramAnswer']);
    expect($defs.ExpansionResult).toMatchObject({ type: 'object', additionalProperties: false });
  });
});

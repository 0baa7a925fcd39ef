import { z } from 'zod';
import { diagramRequestSchema, expansionRequestSchema } from '#contract/request.ts';
import { diagramAnswerSchema, errorSchema, expansionResultSchema } from '#contract/resultSchema.ts';

let made: object | null = null;

const input = (schema: z.ZodType): object => z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' });

/** The contract as JSON Schema: requests and results of the command line, the API and downloads. */
export function contractSchema(): object {
  made ??= {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    title: 'Wickwork: requests and results',
    $defs: {
      ExpansionRequest: input(expansionRequestSchema),
      DiagramRequest: input(diagramRequestSchema),
      ExpansionResult: z.toJSONSchema(expansionResultSchema),
      DiagramAnswer: z.toJSONSchema(diagramAnswerSchema),
      Error: z.toJSONSchema(errorSchema),
    },
  };
  return made;
}

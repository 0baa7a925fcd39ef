import { z } from 'zod';
import { diagramRequestSchema, expansionRequestSchema, modelSchema } from '#contract/request.ts';
import { diagramAnswerSchema, errorSchema, ledgerSchema } from '#contract/resultSchema.ts';
import { diagramQuerySchema } from './diagram-query.ts';
import { changeModelBody, expansionsQuery, newExpansionBody, newModelBody, pageQuery, platesQuery } from './schemas.ts';

interface Operation {
  summary: string;
  body?: z.ZodType;
  query?: z.ZodObject;
  status: number;
  /** Media type of the answer, where it is not JSON. */
  type?: string;
  /** Schema of a JSON answer, by its name under components. */
  answer?: keyof typeof COMPONENTS;
}

/** Answers that are the result contract itself; wrong and extra keys are excluded here too. */
const COMPONENTS = {
  DiagramAnswer: diagramAnswerSchema,
  Ledger: ledgerSchema,
  Problem: z.strictObject({
    type: z.string(),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    instance: z.string().exactOptional(),
    error: errorSchema,
  }),
} as const;

type Method = 'get' | 'post' | 'put' | 'delete';

const PATHS: Record<string, Partial<Record<Method, Operation>>> = {
  '/models': {
    get: { summary: 'Models you may see, last changed first', query: pageQuery, status: 200 },
    post: { summary: 'Store a model', body: newModelBody, status: 201 },
  },
  '/models/preview': {
    post: {
      summary: 'Read a model: normal form, rules, checks; errors are part of the answer',
      body: modelSchema,
      status: 200,
    },
  },
  '/models/{id}': {
    get: { summary: 'One model', status: 200 },
    put: { summary: 'Change a model; a changed input makes a revision', body: changeModelBody, status: 200 },
    delete: { summary: 'Take a model away', status: 204 },
  },
  '/models/{id}/revisions': { get: { summary: 'All revisions of a model', status: 200 } },
  '/expansions': {
    get: { summary: 'Expansions you may see, newest first', query: expansionsQuery, status: 200 },
    post: {
      summary: 'Ask for an expansion: 200 when it is stored, 202 when it is computed',
      body: newExpansionBody,
      status: 202,
    },
  },
  '/expansions/estimate': {
    post: { summary: 'What an expansion would cost', body: expansionRequestSchema, status: 200 },
  },
  '/expansions/{id}': {
    get: { summary: 'One expansion with its summary and ledger', status: 200 },
    delete: { summary: 'End a computation (200), or remove an expansion that has ended (204)', status: 200 },
  },
  '/expansions/{id}/cancel': {
    post: { summary: 'End a computation under way; 409 when it has ended', status: 200 },
  },
  '/expansions/{id}/retry': {
    post: { summary: 'Start a failed, cancelled or interrupted expansion again', status: 202 },
  },
  '/expansions/{id}/diagrams': {
    get: { summary: 'Its diagrams, a page at a time', query: diagramQuerySchema, status: 200 },
  },
  '/expansions/{id}/diagrams/{label}': {
    get: { summary: 'One diagram by label or position, with its working', status: 200 },
  },
  '/expansions/{id}/diagrams/{label}.svg': {
    get: { summary: 'The drawing of one diagram as a file', status: 200, type: 'image/svg+xml' },
  },
  '/expansions/{id}/plates': { get: { summary: 'Groups of its diagrams', query: platesQuery, status: 200 } },
  '/expansions/{id}/ledger': {
    get: { summary: 'The proof that the list is complete', status: 200, answer: 'Ledger' },
  },
  '/expansions/{id}/events': {
    get: { summary: 'Progress and state as server-sent events', status: 200, type: 'text/event-stream' },
  },
  '/expansions/{id}/download.json': { get: { summary: 'The whole result as JSON', status: 200 } },
  '/expansions/{id}/download.csv': { get: { summary: 'The whole result as CSV', status: 200, type: 'text/csv' } },
  '/diagram': {
    post: {
      summary: 'One diagram made elsewhere: label, factor, working',
      body: diagramRequestSchema,
      status: 200,
      answer: 'DiagramAnswer',
    },
  },
  '/schema.json': { get: { summary: 'Requests and results as JSON Schema', status: 200 } },
};

const schemaOf = (schema: z.ZodType): object => {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' });
  return rest;
};

const reference = (name: keyof typeof COMPONENTS): object => ({ schema: { $ref: `#/components/schemas/${name}` } });

function queryParameters(schema: z.ZodObject | undefined): object[] {
  if (!schema) return [];
  return Object.entries(schema.shape).map(([name, field]) => ({
    name,
    in: 'query',
    required: false,
    schema: schemaOf(field as z.ZodType),
  }));
}

function operation(path: string, { summary, body, query, status, type, answer }: Operation): object {
  const inPath = [...path.matchAll(/\{(\w+)\}/g)].map((match) => ({
    name: match[1],
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  const content = { [type ?? 'application/json']: answer ? reference(answer) : {} };
  return {
    summary,
    parameters: [...inPath, ...queryParameters(query)],
    ...(body ? { requestBody: { required: true, content: { 'application/json': { schema: schemaOf(body) } } } } : {}),
    responses: {
      [status]: { description: 'Done', ...(status === 204 ? {} : { content }) },
      default: {
        description: 'Refused: problem+json whose member "error" is { code, message, line, column }',
        content: { 'application/problem+json': reference('Problem') },
      },
    },
  };
}

let made: object | null = null;

/** The OpenAPI 3.1 document, from the same schemas that check the requests. */
export function openApi(): object {
  made ??= {
    openapi: '3.1.0',
    info: { title: 'Wickwork', version: '1' },
    servers: [{ url: '/api/v1' }],
    paths: Object.fromEntries(
      Object.entries(PATHS).map(([path, operations]) => [
        path,
        Object.fromEntries(Object.entries(operations).map(([method, value]) => [method, operation(path, value)])),
      ]),
    ),
    components: {
      schemas: Object.fromEntries(Object.entries(COMPONENTS).map(([name, schema]) => [name, schemaOf(schema)])),
    },
  };
  return made;
}

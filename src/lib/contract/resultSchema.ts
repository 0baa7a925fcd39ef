import { z } from 'zod';
import { type AnyCode, type ErrorObject, STATUS } from './errors.ts';
import type { DiagramAnswer, ExpansionResult } from './result.ts';

/**
 * The result contract as schemas: what the command line prints, the API answers and downloads hold. Served as JSON Schema; the
 * types of result.ts are checked against them below, in both directions.
 */
const rational = z.string().regex(/^-?\d+(\/[1-9]\d*)?$/);
const integer = z.string().regex(/^-?\d+$/);
const powers = z.record(z.string(), rational);
const origin = z.strictObject({
  text: z.string(),
  latex: z.string(),
  start: z.number().int().nullable(),
  end: z.number().int().nullable(),
});

export const summarySchema = z.strictObject({
  state: z.enum(['complete', 'none', 'cut']),
  classes: z.number().int().min(0),
  weight: rational,
  pairings: integer,
  excluded: z.array(z.string()),
});

const ledgerRow = z.strictObject({
  order: powers,
  vertices: z.record(z.string(), z.number().int()),
  list: z.strictObject({ classes: z.number().int(), weight: rational, pairings: integer }),
  independent: z.strictObject({ weight: rational.nullable(), pairings: integer.nullable() }),
  balanced: z.boolean(),
});

export const ledgerSchema = z.strictObject({
  state: z.enum(['balanced', 'unbalanced', 'rests']),
  weight: rational,
  independentWeight: rational.nullable(),
  pairings: integer,
  independentPairings: integer.nullable(),
  rows: z.array(ledgerRow),
  method: z.string(),
  uncut: z.strictObject({ weight: rational, independentWeight: rational, classes: z.number().int() }).nullable(),
  identities: z.array(z.strictObject({ left: z.string(), right: z.string(), holds: z.boolean(), text: z.string() })),
});

export const rulesSchema = z.strictObject({
  propagators: z.array(
    z.strictObject({
      field: z.string(),
      kind: z.enum(['real', 'complex']),
      factor: z.string(),
      latex: z.string(),
      massSquared: z.string(),
      terms: z.array(origin),
    }),
  ),
  vertices: z.array(
    z.strictObject({
      fields: z.array(z.string()),
      coupling: z.string(),
      factor: z.string(),
      latex: z.string(),
      permutations: z.array(z.string()),
      terms: z.array(origin),
    }),
  ),
});

export const conventionRecordSchema = z.strictObject({
  signature: z.enum(['+---', '-+++', 'euclidean']),
  dimension: z.string(),
  weight: z.string(),
  metric: z.string(),
  fourier: z.string(),
  couplings: z.string(),
  generating: z.string(),
  selfEnergy: z.string(),
  vertexFunction: z.string(),
  scheme: z.string(),
});

const diagramShape = {
  id: z.string(),
  bare: z.string(),
  vertices: z.array(z.strictObject({ id: z.number().int(), kind: z.string() })),
  legs: z.array(
    z.strictObject({
      id: z.number().int(),
      field: z.string(),
      vertex: z.number().int().nullable(),
      joinedTo: z.number().int().exactOptional(),
    }),
  ),
  lines: z.array(z.strictObject({ from: z.number().int(), to: z.number().int(), field: z.string() })),
  order: powers,
  loops: z.number().int(),
  symmetryFactor: integer,
  weight: rational,
  pairings: integer,
  connected: z.boolean(),
  onePI: z.boolean(),
  hasSelfContraction: z.boolean(),
  hasTadpole: z.boolean(),
  shape: z.string(),
} as const;

export const diagramSchema = z.strictObject(diagramShape);

const step = z.strictObject({ text: z.string(), latex: z.string(), factor: integer });
const moves = z.array(z.tuple([z.number().int(), z.number().int()]));

export const workingSchema = z.strictObject({
  contractions: z.strictObject({ steps: z.array(step), total: integer, divisor: integer, weight: rational }),
  automorphisms: z.strictObject({
    order: integer,
    generators: z.array(z.strictObject({ words: z.string(), cycles: z.string(), vertices: moves, lines: moves })),
    steps: z.array(step),
  }),
  agree: z.boolean(),
  coefficient: z.strictObject({
    coupling: z.string(),
    weight: rational,
    phases: z.string(),
    whole: z.string(),
    latex: z.string(),
  }),
  description: z.string(),
});

export const diagramAnswerSchema = z.strictObject({ ...diagramShape, working: workingSchema });

export const engineStampSchema = z.strictObject({ name: z.literal('Wickwork'), version: z.string() });

export const expansionResultSchema = z.strictObject({
  summary: summarySchema,
  ledger: ledgerSchema,
  rules: rulesSchema,
  conventions: conventionRecordSchema,
  engine: engineStampSchema,
  diagrams: z.array(diagramSchema),
});

/** Why something was refused: on standard error of the command line as `{ error }`, over HTTP inside a problem document. */
export const errorSchema = z.strictObject({
  code: z.enum(Object.keys(STATUS) as [AnyCode, ...AnyCode[]]),
  message: z.string(),
  line: z.number().int().min(1).nullable(),
  column: z.number().int().min(1).nullable(),
  length: z.number().int().min(0).exactOptional(),
  suggestion: z.string().exactOptional(),
  fields: z.record(z.string(), z.string()).exactOptional(),
});

/** Fails to compile when a schema and its type part ways, in either direction; the result holds all parts but the working. */
type Same<Schema extends z.ZodType, Type> =
  z.output<Schema> extends Type ? (Type extends z.input<Schema> ? true : never) : never;
true satisfies Same<typeof expansionResultSchema, ExpansionResult>;
true satisfies Same<typeof diagramAnswerSchema, DiagramAnswer>;
true satisfies Same<typeof errorSchema, ErrorObject>;

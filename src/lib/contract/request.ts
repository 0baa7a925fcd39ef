import { z } from 'zod';
import { LIMITS } from './limits.ts';

/**
 * The request contract (one for the command line, the HTTP API, stored expansions and downloads).
 * Unknown keys are errors at every level.
 */
const name = z.string().min(1).max(LIMITS.nameLength);

export const keepValues = ['all', 'normalised', 'connected', '1PI'] as const;
export const dropValues = ['self-contractions', 'tadpoles', 'scaleless'] as const;
export const signatureValues = ['+---', '-+++', 'euclidean'] as const;

const fieldOverride = z.strictObject({
  kind: z.enum(['real', 'complex']).optional(),
  multiplet: z.union([z.string().max(LIMITS.nameLength), z.number().int().positive()]).optional(),
});

const rationalText = z.string().regex(/^-?\d{1,12}(\/[1-9]\d{0,11})?$/, 'an exact number such as "2" or "-1/2"');
const power = z.union([z.number().int().min(-1000).max(1000), rationalText]);

const parameterOverride = z.strictObject({
  kind: z.enum(['real', 'complex']).optional(),
  weight: power.optional(),
  loops: z.number().int().min(0).max(20).optional(),
  vertex: z.boolean().optional(),
});

export const conventionsSchema = z.strictObject({
  signature: z.enum(signatureValues).default('+---'),
  dimension: z.string().min(1).max(24).default('4'),
});

const modelTerm = z.strictObject({
  coefficient: z.string().min(1).max(2000),
  fields: z.array(name).max(LIMITS.fieldDegree * 2),
  /** Contracted derivative pairs [i, j] of 1-based positions in `fields`; [i, i] is a d'Alembertian. */
  derivatives: z
    .array(z.tuple([z.number().int().min(1), z.number().int().min(1)]))
    .max(64)
    .default([]),
});

const modelShape = {
  lagrangian: z
    .string()
    .max(LIMITS.lagrangianLength * 4)
    .optional(),
  model: z.strictObject({ terms: z.array(modelTerm).max(LIMITS.terms) }).optional(),
  fields: z.record(name, fieldOverride).default({}),
  parameters: z.record(name, parameterOverride).default({}),
  mixing: z.enum(['vertex', 'diagonalise']).default('vertex'),
  conventions: conventionsSchema.default({ signature: '+---', dimension: '4' }),
} as const;

const oneSource = (value: { lagrangian?: string | undefined; model?: unknown }) =>
  (value.lagrangian === undefined) !== (value.model === undefined);
const oneSourceMessage = 'give either "lagrangian" or "model", exactly one of them';

/** A model alone: what the editor previews and what a model revision stores. */
export const modelSchema = z.strictObject(modelShape).refine(oneSource, oneSourceMessage);
export type ModelInput = z.output<typeof modelSchema>;

export const orderSchema = z.union([
  z.strictObject({ total: power }),
  z.strictObject({ loops: z.number().int().min(0).max(60) }),
  z.record(name, power),
]);

export const expansionRequestSchema = z
  .strictObject({
    ...modelShape,
    legs: z.array(name).max(LIMITS.legs).default([]),
    order: orderSchema,
    through: z.boolean().default(false),
    keep: z.enum(keepValues).default('connected'),
    drop: z.array(z.enum(dropValues)).max(3).default([]),
    with: z
      .array(z.enum(['integral']))
      .max(1)
      .default([]),
  })
  .refine(oneSource, oneSourceMessage);
export type ExpansionRequest = z.output<typeof expansionRequestSchema>;

/** One diagram made elsewhere: vertices are 1…n, legs[k] is the vertex of leg k. */
export const diagramRequestSchema = z.strictObject({
  lines: z.array(z.tuple([z.number().int().min(1), z.number().int().min(1)])).max(LIMITS.diagramLines),
  legs: z.array(z.number().int().min(1)).max(LIMITS.legs).default([]),
  fields: z.strictObject({ lines: z.array(name), legs: z.array(name) }).optional(),
  kinds: z.array(name).optional(),
  lagrangian: z
    .string()
    .max(LIMITS.lagrangianLength * 4)
    .optional(),
  model: z.union([z.string(), z.strictObject({ terms: z.array(modelTerm) })]).optional(),
  conventions: conventionsSchema.optional(),
  with: z
    .array(z.enum(['integral']))
    .max(1)
    .default([]),
});
export type DiagramRequest = z.output<typeof diagramRequestSchema>;

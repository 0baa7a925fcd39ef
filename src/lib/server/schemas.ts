import { z } from 'zod';
import { expansionRequestSchema, modelSchema } from '#contract/request.ts';

/** Bodies and queries of the API that are not the engine's own contract. Unknown keys are errors. */
const title = z.string().trim().min(1).max(200);
const description = z.string().max(4_000);
const id = z.string().regex(/^[0-9a-z]{24}$/, 'an id of 24 characters');

export const noQuery = z.strictObject({});

export const pageQuery = z.strictObject({
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});

export const expansionsQuery = z.strictObject({
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(30),
  model: id.optional(),
  state: z.enum(['active', 'ended']).optional(),
  mine: z.enum(['true', 'false']).optional(),
});

export const newModelBody = z.strictObject({ title, description: description.optional(), input: modelSchema });

export const changeModelBody = z.strictObject({
  title: title.optional(),
  description: description.optional(),
  input: modelSchema.optional(),
  /** The revision the change was made on; without it the change is made on the newest. */
  revision: z.number().int().min(1).optional(),
});

export const newExpansionBody = z.strictObject({
  request: expansionRequestSchema,
  title: title.optional(),
  modelId: id.nullish(),
});

export const platesQuery = z.strictObject({
  by: z.enum(['couplings', 'loops', 'factor', 'shape']).default('couplings'),
});

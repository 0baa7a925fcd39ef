import { modelSchema } from '#contract/request.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { previewModel } from '#server/preview.ts';

export const { POST, ALL } = endpoint({ POST: async (call) => json(previewModel(await call.body(modelSchema))) });

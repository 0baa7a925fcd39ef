import { endpoint, json } from '#server/endpoint.ts';
import { createModel, listModels } from '#server/models.ts';
import { newModelBody, pageQuery } from '#server/schemas.ts';

export const { GET, POST, ALL } = endpoint({
  GET: (call) => json(listModels(call.viewer, call.query(pageQuery))),
  POST: async (call) => {
    const model = createModel(call.viewer, await call.body(newModelBody));
    return json(model, 201, { location: `/api/v1/models/${model.id}` });
  },
});

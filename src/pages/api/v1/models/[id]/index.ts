import { endpoint, json, noContent } from '#server/endpoint.ts';
import { deleteModel, getModel, updateModel } from '#server/models.ts';
import { changeModelBody } from '#server/schemas.ts';

export const { GET, PUT, DELETE, ALL } = endpoint({
  GET: (call) => json(getModel(call.viewer, call.param('id'))),
  PUT: async (call) => {
    const { revision, ...change } = await call.body(changeModelBody);
    return json(updateModel(call.viewer, call.param('id'), change, revision ?? null));
  },
  DELETE: (call) => {
    deleteModel(call.viewer, call.param('id'));
    return noContent();
  },
});

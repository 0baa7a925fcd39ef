import { diagramRequestSchema } from '#contract/request.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { answerDiagram } from '#engine/index.ts';

/** The `diagram` command over HTTP: one diagram made elsewhere, answered with its working. */
export const { POST, ALL } = endpoint({
  POST: async (call) => json(answerDiagram(await call.body(diagramRequestSchema))),
});

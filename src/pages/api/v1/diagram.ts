import { diagramRequestSchema } from '#contract/request.ts';
import { answerDiagram } from '#engine/index.ts';
import { endpoint, json } from '#server/endpoint.ts';

/** The `diagram` command over HTTP: one diagram made elsewhere, answered with its working. */
export const { POST, ALL } = endpoint({
  POST: async (call) => json(answerDiagram(await call.body(diagramRequestSchema))),
});

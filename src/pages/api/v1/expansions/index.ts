import { LIMITS } from '#contract/limits.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { createExpansion, listExpansions } from '#server/expansions.ts';
import { runtime } from '#server/runtime.ts';
import { expansionsQuery, newExpansionBody } from '#server/schemas.ts';

const ENDED = ['complete', 'failed', 'cancelled', 'interrupted', 'unbalanced'] as const;
const ACTIVE = ['queued', 'running'] as const;

export const { GET, POST, ALL } = endpoint({
  GET: (call) => {
    const { model, state, mine, ...page } = call.query(expansionsQuery);
    const states = state === 'active' ? ACTIVE : state === 'ended' ? ENDED : undefined;
    return json(listExpansions(call.viewer, { ...page, modelId: model, states, mine: mine === 'true' }));
  },
  POST: async (call) => {
    const asked = await call.body(newExpansionBody);
    const { viewer } = call;
    if (!viewer.user) {
      call.context.locals.becomeVisitor();
      runtime().rates.take(
        `visitor runs ${viewer.address}`,
        LIMITS.visitor.perHour,
        3_600,
        `Visitors run at most ${LIMITS.visitor.perHour} expansions an hour from one address. Sign up to run more.`,
      );
    }
    const { expansion } = createExpansion(viewer, asked);
    const done = expansion.state === 'complete' || expansion.state === 'unbalanced';
    const headers = { location: `/api/v1/expansions/${expansion.id}`, ...(done ? {} : { 'retry-after': '1' }) };
    return json(expansion, done ? 200 : 202, headers);
  },
});

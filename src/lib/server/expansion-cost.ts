import { and, eq, isNull } from 'drizzle-orm';
import type { Estimate } from '#contract/api.ts';
import type { ExpansionRequest } from '#contract/request.ts';
import { expansions } from '#db/schema.ts';
import { ENGINE_VERSION, estimate, type Prepared, prepare } from '#engine/index.ts';
import { sha256 } from './ids.ts';
import { allowanceOf, may } from './policy.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

/** Milliseconds an estimate may think: the server answers others meanwhile only after it. */
export const ESTIMATE_MS = 20;

/** Identity of a result: the request without names, and the engine that computed it. */
export const contentHashOf = (prepared: Prepared): string => sha256(prepared.canonicalKey);

/** What an expansion would cost and whether the viewer may run it. @throws InputError, LimitError for a wrong request. */
export function estimateExpansion(viewer: Viewer, request: ExpansionRequest): Estimate {
  const prepared = prepare(request);
  const expected = estimate(prepared, ESTIMATE_MS);
  const stored = storedFor(viewer, contentHashOf(prepared));
  const reason = stored ? null : refusalReason(viewer, expected);
  return { ...expected, allowed: reason === null, reason, stored };
}

/** Why an estimate is above what the viewer may run, or null. */
export function refusalReason(viewer: Viewer, expected: { classes: number; seconds: number }): string | null {
  const allowance = allowanceOf(viewer);
  const whose = viewer.user ? 'one expansion' : 'a visitor';
  const remedy = viewer.user
    ? 'Ask for a lower order, or keep or drop more.'
    : 'Sign up to run larger ones, or ask for a lower order.';
  if (expected.classes > allowance.classes)
    return `About ${Math.round(expected.classes)} diagrams are expected; the limit for ${whose} is ${allowance.classes}. ${remedy}`;
  if (expected.seconds > allowance.seconds)
    return `About ${Math.ceil(expected.seconds)} s are expected; the limit for ${whose} is ${allowance.seconds} s. ${remedy}`;
  return null;
}

/** A complete expansion with this content that the viewer may see. */
function storedFor(viewer: Viewer, contentHash: string): string | null {
  const rows = runtime()
    .db.select()
    .from(expansions)
    .where(
      and(
        eq(expansions.contentHash, contentHash),
        eq(expansions.engineVersion, ENGINE_VERSION),
        eq(expansions.state, 'complete'),
        isNull(expansions.deletedAt),
      ),
    )
    .limit(50)
    .all();
  return rows.find((row) => may(viewer, 'read', row))?.id ?? null;
}

import type { ModelRecord } from '#contract/api.ts';
import { getModel } from '#server/models.ts';
import { errorOf, isAnswer } from '#server/refusal.ts';
import type { Viewer } from '#server/viewer.ts';

/** The model of an address, or null when there is none that the viewer may see. */
export function foundModel(viewer: Viewer, id: string | undefined): ModelRecord | null {
  try {
    return getModel(viewer, id ?? '');
  } catch (error) {
    if (isAnswer(error) && errorOf(error).code === 'not-found') return null;
    throw error;
  }
}

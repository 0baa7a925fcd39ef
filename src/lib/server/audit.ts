import { auditEvents } from '#db/schema.ts';
import { now } from './ids.ts';
import { runtime } from './runtime.ts';
import type { Viewer } from './viewer.ts';

/** Writes down who did what. The table refuses changes; `detail` never holds a secret. */
export function audit(viewer: Viewer, action: string, object: string, detail: Record<string, unknown> = {}): void {
  const actor = viewer.user?.id ?? (viewer.visitor ? 'visitor' : 'nobody');
  runtime()
    .db.insert(auditEvents)
    .values({
      at: now(),
      actor,
      action,
      object,
      address: viewer.address,
      requestId: '',
      detail: JSON.stringify(detail),
    })
    .run();
}

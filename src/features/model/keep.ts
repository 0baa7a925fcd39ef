import { useEffect, useState } from 'react';
import { type Draft, sameDraft } from './draft.ts';

/** A draft on this device: survives a closed tab and a crash. */
export interface Kept {
  readonly draft: Draft;
  /** The revision it was made on; 0 for a new model. */
  readonly revision: number;
  readonly at: number;
}

const keyOf = (id: string | null): string => `wickwork.draft.${id ?? 'new'}`;

export function readKept(id: string | null): Kept | null {
  try {
    const kept = JSON.parse(localStorage.getItem(keyOf(id)) ?? 'null') as Kept | null;
    return kept && typeof kept.draft?.lagrangian === 'string' ? kept : null;
  } catch {
    return null;
  }
}

export function forgetKept(id: string | null): void {
  try {
    localStorage.removeItem(keyOf(id));
  } catch {
    // Storage may be switched off; then nothing was kept either.
  }
}

function writeKept(id: string | null, kept: Kept): void {
  try {
    localStorage.setItem(keyOf(id), JSON.stringify(kept));
  } catch {
    // Full or switched off: saving to the server still works.
  }
}

/**
 * Keeps the draft on this device a quarter of a second after each change. Returns the draft found at the start when it
 * differs from what the server holds, to be offered, not imposed.
 */
export function useKept(id: string | null, revision: number, draft: Draft, saved: Draft) {
  const [found, setFound] = useState<Kept | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: only at the start; later this device's draft is the one on the screen
  useEffect(() => {
    const kept = readKept(id);
    if (kept && !sameDraft(kept.draft, saved)) setFound(kept);
  }, []);
  useEffect(() => {
    if (sameDraft(draft, saved)) return;
    const timer = setTimeout(() => writeKept(id, { draft, revision, at: Date.now() }), 250);
    return () => clearTimeout(timer);
  }, [id, revision, draft, saved]);
  return {
    found,
    dismiss: () => {
      setFound(null);
      forgetKept(id);
    },
    accept: () => setFound(null),
  };
}

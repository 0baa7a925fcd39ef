import type { Facts } from '../graph/facts.ts';
import type { Drop, Keep } from '../graph/theory.ts';

/** Whether a diagram belongs to what is kept. */
export function passesKeep(facts: Facts, keep: Keep): boolean {
  if (keep === '1PI') return facts.onePI;
  if (keep === 'connected') return facts.connected;
  return keep === 'all' || facts.noVacuumPart;
}

/** Whether a diagram survives every filter of `drop`. */
export const passesDrop = (facts: Facts, drop: readonly Drop[]): boolean =>
  !(
    (drop.includes('self-contractions') && facts.hasSelfContraction) ||
    (drop.includes('tadpoles') && facts.hasTadpole) ||
    (drop.includes('scaleless') && facts.isScaleless)
  );

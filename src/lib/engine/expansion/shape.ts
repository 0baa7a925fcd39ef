import { digest } from '../exact/sha256.ts';
import { shapeId } from '../graph/canonical.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { CountingRequest } from '../graph/theory.ts';

/** Whether two external points carry the same operator: only then can a shape have more than one labelled member. */
const exchangeable = (legs: readonly number[]): boolean => new Set(legs).size < legs.length;

/**
 * Label of a diagram's shape: equal exactly for the diagrams of one list that are equal up to exchange of external legs of one
 * field. Fields and kinds are told apart by their place in the request, so the label is good within a list.
 *
 * `own` tells a diagram from all others of the list, which settles its shape when no two legs can be exchanged.
 * One labelling search otherwise.
 */
export function shapeLabel(diagram: Diagram, { theory, legs }: CountingRequest, own: string): string {
  if (!exchangeable(legs)) return `s${digest(own, 20)}`;
  const fields = theory.partner.map((_, type) => String(type));
  const couplings = theory.kinds.map((_, kind) => String(kind));
  return shapeId(diagram, theory, legs, { fields, couplings });
}

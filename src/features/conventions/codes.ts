import type { AnyCode } from '#contract/errors.ts';

/** What each error code means; the type of a problem document points at its anchor on the page of the API. */
export const CODES: Readonly<Record<AnyCode, string>> = {
  syntax: 'The Lagrangian cannot be read at the place given.',
  'unknown-name': 'A name that the model does not have.',
  unsupported: 'Understood, but outside what the program computes: fermions, gauge fields, multiplets, integrals.',
  'not-hermitian': 'The Lagrangian is not real; its hermitian conjugate is missing.',
  'wrong-sign': 'A kinetic term whose sign does not fit the chosen signature.',
  'wrong-legs': 'A leg that is no field of the model, or more legs than the limit.',
  'wrong-order': 'An order that names no coupling of the model, or no exact number.',
  'infinite-order': 'The order does not bound the number of vertices; the message names the kind of vertex.',
  'no-kinetic-term': 'No field has a kinetic term.',
  'bad-request': 'The request has an unknown key or a value of the wrong kind.',
  limit: 'Understood, but larger than a stated limit.',
  malformed: 'The body is not JSON.',
  'not-signed-in': 'Sign in first.',
  'not-allowed': 'You may see this but not change it, or the request came from another site.',
  'not-found': 'Nothing there, or not yours to see.',
  method: 'The address exists but not for this method.',
  conflict: 'It was changed since you read it, or is in another state.',
  'too-large': 'The body is larger than the limit.',
  rate: 'Too many requests; the header Retry-After says when to try again.',
  busy: 'The server has no room for it now.',
  interrupted: 'The computation was interrupted and did not finish.',
  defect: 'A mistake of the program; it is in the log under the id of the request.',
};

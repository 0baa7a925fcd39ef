/** Roles of a group; each includes the former. */
export const ROLES = ['reader', 'checker', 'author', 'lead'] as const;
export type Role = (typeof ROLES)[number];

/** A signed-in person as pages and the API may show them to themselves. */
export interface SessionUser {
  id: string;
  email: string;
  name: string;
  /** An account of the demo seed: its password is public, so it cannot be changed. */
  demo: boolean;
  /** The personal workspace: new models and expansions belong to it. */
  workspace: string;
}

/** Who asks: every service function takes one, and policy.ts decides with it. */
export interface Viewer {
  user: SessionUser | null;
  /** Public id of the current session's row (never the cookie's value). */
  session: string | null;
  /** Hashed visitor cookie of a signed-out browser; null before the first visitor run. */
  visitor: string | null;
  /** Address of the peer, or the forwarded one when TRUST_PROXY says so: used for limits and audit only. */
  address: string;
}

/** Nobody: what a script or test passes to see only public things. */
export const NOBODY: Viewer = { user: null, session: null, visitor: null, address: '' };

import type { ErrorObject } from './errors.ts';
import type { ExpansionRequest } from './request.ts';

/** What crosses between the server and the child process that computes one expansion. */
export interface JobTask {
  request: ExpansionRequest;
  /** The child ends itself with a limit error beyond this many classes. */
  maxClasses: number;
  /** A job that misbehaves on purpose; only the tests of the server's limits set it. */
  misbehave: Misbehaviour | null;
}

export type Misbehaviour = 'hog' | 'buffers' | 'spin' | 'crash' | 'slow';
export const MISBEHAVIOURS: readonly Misbehaviour[] = ['hog', 'buffers', 'spin', 'crash', 'slow'];

/** One diagram free of names, as it is stored. */
export interface StoredDiagram {
  position: number;
  body: string;
  label: string;
  loops: number;
  symmetryFactor: string;
  weight: string;
  pairings: string;
  order: string;
  shape: string;
  flags: number;
  /** Layout of the drawing, for the first diagrams of a list. */
  picture: string | null;
}

/** Child → server. The child waits when too many chunks are unacknowledged. */
export type JobMessage =
  | { kind: 'chunk'; sequence: number; rows: StoredDiagram[] }
  | { kind: 'progress'; classes: number; phase: string };

/** Server → child: the chunk is on disk. */
export interface JobAcknowledgement {
  kind: 'stored';
  sequence: number;
}

/** Summary and ledger are JSON text, free of names. */
export type JobEnd =
  | { ok: true; classes: number; balanced: boolean; summary: string; ledger: string }
  | { ok: false; error: ErrorObject };

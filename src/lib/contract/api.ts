import type { DrawingDTO, Picture } from '#engine/drawing/types.ts';
import type { ErrorObject } from './errors.ts';
import type { ExpansionRequest, ModelInput } from './request.ts';
import type { ConventionRecord, DiagramDTO, EngineStamp, LedgerDTO, RulesDTO, Summary, WorkingDTO } from './result.ts';

/** What crosses HTTP under /api/v1. Lists are keyset-paged: pass `next` back as `after`. */
export interface Page<T> {
  items: T[];
  next: string | null;
  total: number | null;
}

export interface Problem {
  type: string;
  title: string;
  status: number;
  detail: string;
  instance?: string;
  error: ErrorObject;
}

/** POST /api/v1/models/preview: what the editor shows while one types. Always 200 for text: errors are part of the answer. */
export interface ModelPreview {
  ok: boolean;
  error: ErrorObject | null;
  /** The Lagrangian read so far (the good part when there is an error), typeset: LaTeX and MathML. */
  latex: string;
  mathml: string;
  /** Normal form that parses back to the same model. */
  normalText: string;
  normalLatex: string;
  fields: {
    name: string;
    latex: string;
    mathml: string;
    kind: 'real' | 'complex';
    mass: string;
    dimension: string;
    inferred: boolean;
  }[];
  parameters: {
    name: string;
    latex: string;
    mathml: string;
    role: 'coupling' | 'propagator' | 'both';
    dimension: string;
    renormalisability: string;
    weight: string;
    loops: number;
  }[];
  rules: RulesDTO & { mathml: { propagators: string[]; vertices: string[] } };
  checks: { code: string; title: string; verdict: 'good' | 'note' | 'caution' | 'bad'; text: string }[];
  notes: { code: string; message: string; start: number | null; end: number | null }[];
}

/** POST/GET /api/v1/models, GET/PUT/DELETE /api/v1/models/{id} */
export interface ModelRecord {
  id: string;
  title: string;
  description: string;
  input: ModelInput;
  revision: number;
  createdAt: string;
  updatedAt: string;
  owner: string | null;
  contentHash: string;
  mine: boolean;
}

/** POST /api/v1/expansions/estimate */
export interface Estimate {
  classes: number;
  /** exact: counted; estimate: extrapolated from the ledger's sum. */
  quality: 'exact' | 'estimate';
  weight: string;
  seconds: number;
  bytes: number;
  allowed: boolean;
  reason: string | null;
  /** Why the correlator vanishes at every order by a symmetry of the model, or null. */
  vanishes: string | null;
  /** A stored expansion with the same content, if there is one the asker may see. */
  stored: string | null;
}

export type ExpansionState = 'queued' | 'running' | 'complete' | 'failed' | 'cancelled' | 'interrupted' | 'unbalanced';

/** GET /api/v1/expansions/{id}; POST /api/v1/expansions answers 202 (or 200 when stored) with it and a Location. */
export interface ExpansionRecord {
  id: string;
  title: string;
  request: ExpansionRequest;
  modelId: string | null;
  state: ExpansionState;
  progress: { classes: number; estimated: number | null; fraction: number | null; phase: string };
  summary: Summary | null;
  ledger: LedgerDTO | null;
  rules: RulesDTO;
  conventions: ConventionRecord;
  engine: EngineStamp;
  error: ErrorObject | null;
  contentHash: string;
  createdAt: string;
  finishedAt: string | null;
  milliseconds: number | null;
  /** Set when the stored body was computed for a model equal up to names. */
  reusedFrom: string | null;
  mine: boolean;
}

export type GroupBy = 'couplings' | 'loops' | 'factor' | 'shape';

/** GET /api/v1/expansions/{id}/plates?by= : groups with counts, first drawings. */
export interface Plate {
  key: string;
  title: string;
  titleLatex: string;
  count: number;
  /** Position (1-based) of the first member in the list. */
  first: number;
  weight: string;
}

/** One row of GET /api/v1/expansions/{id}/diagrams?after=&limit=&sort=&find=&loops=&factor=&order=&shape=&onePI=… */
export interface DiagramRow extends DiagramDTO {
  /** 1-based position in the canonical list. */
  position: number;
  /** Server-drawn picture: one path string per line style, see DrawingDTO. */
  drawing: DrawingDTO;
  description: string;
}

export type { DrawingDTO, Picture };

/** GET /api/v1/expansions/{id}/diagrams/{label} */
export interface DiagramPageData extends DiagramRow {
  working: WorkingDTO;
  /** The drawing part by part, so that vertices and lines can be numbered and marked. */
  picture: Picture;
  rulesUsed: RulesDTO;
  previous: string | null;
  next: string | null;
}

/** Server-sent events of GET /api/v1/expansions/{id}/events */
export type ExpansionEvent =
  | { type: 'progress'; progress: ExpansionRecord['progress'] }
  | { type: 'state'; state: ExpansionState }
  | { type: 'diagrams'; from: number; to: number };

/**
 * The result contract: plain JSON types, one home for the command line, the HTTP API, stored expansions and downloads.
 * Rationals are strings in lowest terms, integers bare; weight, symmetryFactor and pairings are strings.
 */

import type { ConventionRecord, RulesDTO } from '../rules/types.ts';

export type { ConventionRecord, PropagatorRuleDTO, RuleOrigin, RulesDTO, VertexRuleDTO } from '../rules/types.ts';

export type State = 'complete' | 'none' | 'cut';

export interface Summary {
  state: State;
  classes: number;
  weight: string;
  pairings: string;
  /** Couplings of the kinds that the order excludes (powers not named are 0). */
  excluded: string[];
}

export interface LedgerRow {
  /** Vertex content in words of the model, e.g. { "lambda": "2" }. */
  order: Record<string, string>;
  /** Vertices of each kind, by name. */
  vertices: Record<string, number>;
  list: { classes: number; weight: string; pairings: string };
  independent: { weight: string | null; pairings: string | null };
  balanced: boolean;
}

export interface LedgerDTO {
  /** balanced: equal; unbalanced: a defect; rests: this cut rests on the balanced uncut list. */
  state: 'balanced' | 'unbalanced' | 'rests';
  /** Σ 1/S over the list. */
  weight: string;
  /** The same from the zero-dimensional integral (null when state is rests). */
  independentWeight: string | null;
  pairings: string;
  independentPairings: string | null;
  rows: LedgerRow[];
  method: string;
  /** When a drop filter has no closed form: the balanced uncut sum this list is cut from. */
  uncut: { weight: string; independentWeight: string; classes: number } | null;
  identities: { left: string; right: string; holds: boolean; text: string }[];
}

export interface DiagramDTO {
  id: string;
  bare: string;
  vertices: { id: number; kind: string }[];
  legs: { id: number; field: string; vertex: number | null; joinedTo?: number }[];
  lines: { from: number; to: number; field: string }[];
  order: Record<string, string>;
  loops: number;
  symmetryFactor: string;
  weight: string;
  pairings: string;
  connected: boolean;
  onePI: boolean;
  hasSelfContraction: boolean;
  hasTadpole: boolean;
  shape: string;
}

export interface WorkingStep {
  text: string;
  latex: string;
  factor: string;
}

/** The account of one factor by two routes, and the whole coefficient split. */
export interface WorkingDTO {
  contractions: { steps: WorkingStep[]; total: string; divisor: string; weight: string };
  automorphisms: {
    order: string;
    generators: { words: string; cycles: string; vertices: [number, number][]; lines: [number, number][] }[];
    steps: WorkingStep[];
  };
  agree: boolean;
  coefficient: { coupling: string; weight: string; phases: string; whole: string; latex: string };
  description: string;
}

export interface DiagramAnswer extends DiagramDTO {
  working: WorkingDTO;
}

export interface EngineStamp {
  name: 'Wickwork';
  version: string;
}

export interface ExpansionResult {
  summary: Summary;
  ledger: LedgerDTO;
  rules: RulesDTO;
  conventions: ConventionRecord;
  engine: EngineStamp;
  diagrams: DiagramDTO[];
}

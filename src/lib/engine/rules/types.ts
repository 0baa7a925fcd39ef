/** A term of the Lagrangian that a rule came from. */
export interface RuleOrigin {
  text: string;
  latex: string;
  start: number | null;
  end: number | null;
}

export interface VertexRuleDTO {
  fields: string[];
  coupling: string;
  /** Plain text: "-I*lambda", "-I*b*p1.p2 - I*b*p1.p3 - I*b*p2.p3"; p1, p2 … are the incoming momenta in the order of `fields`. */
  factor: string;
  latex: string;
  /** Each group of permutations of identical fields' momenta as its own line (derivative vertices). */
  permutations: string[];
  terms: RuleOrigin[];
}

export interface PropagatorRuleDTO {
  field: string;
  kind: 'real' | 'complex';
  factor: string;
  latex: string;
  massSquared: string;
  terms: RuleOrigin[];
}

export interface RulesDTO {
  propagators: PropagatorRuleDTO[];
  vertices: VertexRuleDTO[];
}

/** Defining equations, not names. */
export interface ConventionRecord {
  signature: '+---' | '-+++' | 'euclidean';
  dimension: string;
  weight: string;
  metric: string;
  fourier: string;
  couplings: string;
  generating: string;
  selfEnergy: string;
  vertexFunction: string;
  scheme: string;
}

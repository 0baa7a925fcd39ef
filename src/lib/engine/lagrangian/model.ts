import type { ExactNumber } from '../exact/number.ts';
import type { Rational } from '../exact/rational.ts';

/** Offsets (UTF-16 code units, end exclusive) into the Lagrangian text as typed. */
export interface Span {
  readonly start: number;
  readonly end: number;
}

export type Signature = '+---' | '-+++' | 'euclidean';

/** Weight e^{iS} (Minkowski) or e^{−S} (Euclidean), metric, and the space-time dimension as typed ("4", "4-2eps"). */
export interface Conventions {
  readonly signature: Signature;
  readonly dimension: string;
}

/** name is the one canonical ASCII spelling ("phi", "m_h"); latex is how it is typeset ("\\phi", "m_{h}"). */
export interface Field {
  readonly name: string;
  readonly latex: string;
  readonly kind: 'real' | 'complex';
}

/** A symbol that is not a field. Weight and loops are what the order of a diagram counts (physics: "order"). */
export interface Parameter {
  readonly name: string;
  readonly latex: string;
  readonly complex: boolean;
  /** null: its weight is the power with which it stands; otherwise the weight the user set (0: a constant). */
  readonly weight: Rational | null;
  /** Loop order ℓ carried by each power of it (a counterterm has ℓ ≥ 1). */
  readonly loops: number;
  /** Marked by the user: quadratic monomials with it are two-point vertices. */
  readonly vertex: boolean;
  readonly role: 'coupling' | 'propagator' | 'both';
}

/** A field or its conjugate at a vertex: one half-line. */
export interface FieldFactor {
  readonly field: string;
  readonly conjugate: boolean;
}

/** Parameter powers: canonical parameter name → exponent (negative, fractional allowed, never 0). Sorted by name. A complex parameter's conjugate is "name^*". */
export type Monomial = ReadonlyMap<string, Rational>;

/** One monomial of the normal form: number · parameters · ∏ fields with contracted derivatives. */
export interface Term {
  readonly number: ExactNumber;
  readonly parameters: Monomial;
  readonly factors: readonly FieldFactor[];
  /** Each pair [i, j], i ≤ j, is one contracted pair of derivatives ∂_μ…∂^μ on factors i and j; [i, i] is □ on factor i. */
  readonly derivatives: readonly (readonly [number, number])[];
  /** Where it stands in the text; null for terms that were given structured or arose from expansion of a product. */
  readonly span: Span | null;
}

/** Quadratic part of one field: kinetic normalisation Z (coefficient of ½(∂φ)² or ∂φ*∂φ) and mass² as terms. */
export interface Propagator {
  readonly field: string;
  /** Normalised so that the quadratic Lagrangian is Z·½(∂φ)² − ½M²φ² (complex: Z ∂φ*∂φ − M² φ*φ), sign conventions removed. */
  readonly kinetic: readonly CoefficientTerm[];
  readonly massSquared: readonly CoefficientTerm[];
  readonly terms: readonly Term[];
}

export interface CoefficientTerm {
  readonly number: ExactNumber;
  readonly parameters: Monomial;
}

/** All interaction terms with one coupling monomial and one multiset of fields: one vertex factor. */
export interface VertexKind {
  /** Coupling monomial as text, e.g. "lambda", "g^2*v"; "1" when there is none. */
  readonly coupling: string;
  readonly couplingLatex: string;
  readonly parameters: Monomial;
  /** Half-lines in canonical order, e.g. phi phi phi^* phi^*. */
  readonly fields: readonly FieldFactor[];
  readonly terms: readonly Term[];
  /** Loop order of the kind: Σ over its parameters of power × loops. */
  readonly loops: number;
}

export interface Note {
  readonly code: string;
  readonly message: string;
  readonly span: Span | null;
}

/** A Lagrangian in normal form. Plain data: it can be copied between processes with structured clone. */
export interface Model {
  readonly fields: readonly Field[];
  readonly parameters: readonly Parameter[];
  readonly propagators: readonly Propagator[];
  readonly kinds: readonly VertexKind[];
  readonly conventions: Conventions;
  readonly notes: readonly Note[];
}

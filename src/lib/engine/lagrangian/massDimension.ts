import { format, isZero, type Rational, rational, sign } from '../exact/rational.ts';
import { parameterBase } from './kinds.ts';
import { LinearSystem } from './linearSystem.ts';
import type { Model, Term, VertexKind } from './model.ts';
import { addLinear, type Linear, linear, linearText, readDimension, scaleLinear, subtractLinear } from './spacetime.ts';
import { termsOf } from './terms.ts';

export type Renormalisability = 'super-renormalisable' | 'just renormalisable' | 'non-renormalisable';

/** Mass dimension of one coupling monomial, as exact text ("2 - d…" becomes "2eps"), and what it means by power counting. */
export interface CouplingDimension {
  readonly name: string;
  readonly dimension: string;
  readonly renormalisability: Renormalisability;
}

/** Mass dimension of every scalar field with a canonical kinetic term: (d − 2)/2. */
export const fieldDimension = (model: Model): Linear =>
  scaleLinear(addLinear(readDimension(model.conventions.dimension), linear(rational(-2))), rational(1, 2));

/** Mass dimension that the coefficient of a term must have: d − (number of fields)·(d − 2)/2 − (number of derivatives). */
export function coefficientDimension(model: Model, { factors, derivatives }: Term): Linear {
  const fields = scaleLinear(fieldDimension(model), rational(factors.length));
  const rest = subtractLinear(readDimension(model.conventions.dimension), fields);
  return addLinear(rest, linear(rational(-2 * derivatives.length)));
}

/** Power counting by the sign of the coupling's dimension as ε → 0 (S. Weinberg, Phys. Rev. 118 (1960) 838). */
function renormalisabilityOf({ constant }: Linear): Renormalisability {
  if (isZero(constant)) return 'just renormalisable';
  return sign(constant) > 0 ? 'super-renormalisable' : 'non-renormalisable';
}

/** The least dimension among the terms of a kind: that of the term with the most derivatives. */
function kindDimension(model: Model, { terms }: VertexKind): Linear {
  const steepest = terms.reduce((a, b) => (b.derivatives.length > a.derivatives.length ? b : a));
  return coefficientDimension(model, steepest);
}

/** The mass dimension of the coupling of every kind of vertex, in the order of the kinds. */
export const couplingDimensions = (model: Model): CouplingDimension[] =>
  model.kinds.map((kind) => {
    const dimension = kindDimension(model, kind);
    return {
      name: kind.coupling,
      dimension: linearText(dimension),
      renormalisability: renormalisabilityOf(dimension),
    };
  });

/** Mass dimensions of the parameters one by one. */
export interface ParameterDimensions {
  /** Parameter → dimension; null where the terms fix only a product it stands in. */
  readonly known: ReadonlyMap<string, Linear | null>;
  /** A term whose coefficient would need another dimension than the rest of the Lagrangian gives its parameters. */
  readonly clash: Term | null;
}

function powersOf(term: Term): Map<string, Rational> {
  const powers = new Map<string, Rational>();
  for (const [name, power] of term.parameters) {
    const base = parameterBase(name);
    const known = powers.get(base);
    powers.set(base, known ? rational(known.num * power.den + power.num * known.den, known.den * power.den) : power);
  }
  return powers;
}

/**
 * Solves "coefficient of each term has the dimension it needs" for the parameters. Numbers carry none, fields are canonical.
 * Work is bounded; what is not reached stays null.
 */
export function parameterDimensions(model: Model): ParameterDimensions {
  const system = new LinearSystem();
  const seen = new Set<string>();
  let clash: Term | null = null;
  for (const term of termsOf(model)) {
    const powers = powersOf(term);
    const value = coefficientDimension(model, term);
    const key = `${[...powers].map(([name, power]) => `${name}:${format(power)}`).join(' ')} = ${linearText(value)}`;
    if (seen.has(key)) continue;
    seen.add(key);
    if (!system.add(powers, value)) clash ??= term;
  }
  const solved = system.solution();
  return { known: new Map(model.parameters.map(({ name }) => [name, solved.get(name) ?? null])), clash };
}

/** The mass dimension of one parameter as text, or null when the Lagrangian does not fix it. */
export function parameterDimension(model: Model, name: string): string | null {
  const value = parameterDimensions(model).known.get(name);
  return value ? linearText(value) : null;
}

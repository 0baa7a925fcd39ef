import { format, type Rational, rational } from '../exact/rational.ts';
import { describe } from '../expansion/describe.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { Model } from '../lagrangian/model.ts';
import { automorphismsText } from './automorphismText.ts';
import { coefficientOf, plainCoefficient } from './coefficient.ts';
import { type CompactDiagram, unpackBody } from './compact.ts';
import { contractionsText } from './contractionText.ts';
import type { Prepared } from './prepare.ts';
import type { NamedTheory } from './theory.ts';
import type { WorkingDTO } from './types.ts';

/** A diagram beside its names. */
export interface NamedDiagram {
  readonly diagram: Diagram;
  readonly named: NamedTheory;
  readonly legTypes: readonly number[];
  readonly legNames: readonly string[];
  /** null for a diagram without a model. */
  readonly model: Model | null;
}

/**
 * The account of one factor by two routes that share no code: contractions counted step by step, and the order of the
 * automorphism group; then the coefficient of the diagram, and the drawing in words.
 */
export function working({ diagram, named, legTypes, legNames, model }: NamedDiagram): WorkingDTO {
  const contractions = contractionsText(diagram, named, legTypes);
  const group = automorphismsText(diagram, named, legTypes);
  const weight: Rational = rational(1n, BigInt(group.order));
  return {
    contractions,
    automorphisms: group,
    agree: contractions.weight === format(weight),
    coefficient: model ? coefficientOf(model, named, diagram, weight) : plainCoefficient(named, diagram, weight),
    description: describe(diagram, named.theory, { halves: named.halves.map(({ text }) => text), legs: legNames }),
  };
}

/** The working of a stored diagram. */
export const workingOf = ({ names, canonical, model }: Prepared, compact: CompactDiagram): WorkingDTO =>
  working({
    diagram: unpackBody(compact.body),
    named: names,
    legTypes: canonical.request.legs,
    legNames: names.legs,
    model,
  });

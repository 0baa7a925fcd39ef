import { LimitError } from '../errors.ts';
import { parametersText } from '../lagrangian/kinds.ts';
import type { FieldFactor, Model, Propagator, Signature, Term, VertexKind } from '../lagrangian/model.ts';
import { coefficientLatex, coefficientText, termLatex, termText } from '../lagrangian/print.ts';
import { factorLatex, factorText, permutationLines, vertexFactor } from './factor.ts';
import type { PropagatorRuleDTO, RuleOrigin, RulesDTO, VertexRuleDTO } from './types.ts';

const origin = (term: Term): RuleOrigin => ({
  text: termText(term),
  latex: termLatex(term),
  start: term.span?.start ?? null,
  end: term.span?.end ?? null,
});

const halfLine = ({ field, conjugate }: FieldFactor): string => (conjugate ? `${field}^*` : field);

/** A factor too long to write out is described; the permutation sum stands as a sum. */
function describedRule(
  kind: VertexKind,
  signature: Signature,
): Pick<VertexRuleDTO, 'factor' | 'latex' | 'permutations'> {
  const front = signature === 'euclidean' ? '-' : 'i\\,';
  const terms = kind.terms.map(termLatex).join(' ');
  return {
    factor: 'sum over all assignments of the momenta (too long to write out)',
    latex: `${front}\\sum_{\\text{perm}} \\left[${terms}\\right]_{\\partial_\\mu \\to \\mp i p_\\mu}`,
    permutations: [],
  };
}

function written(kind: VertexKind, signature: Signature): Pick<VertexRuleDTO, 'factor' | 'latex' | 'permutations'> {
  try {
    const factor = vertexFactor(kind, signature);
    return { factor: factorText(factor), latex: factorLatex(factor), permutations: permutationLines(factor) };
  } catch (error) {
    if (error instanceof LimitError) return describedRule(kind, signature);
    throw error;
  }
}

const vertexRule = (kind: VertexKind, signature: Signature): VertexRuleDTO => ({
  fields: kind.fields.map(halfLine),
  coupling: parametersText(kind.parameters),
  ...written(kind, signature),
  terms: kind.terms.map(origin),
});

/** How a denominator is put together in each convention. */
const FORM: Readonly<Record<Signature, { above: string; aboveLatex: string; mass: '-' | '+'; end: string }>> = {
  '+---': { above: 'I', aboveLatex: 'i', mass: '-', end: ' + i0' },
  '-+++': { above: '-I', aboveLatex: '-i', mass: '+', end: ' - i0' },
  euclidean: { above: '1', aboveLatex: '1', mass: '+', end: '' },
};

/** "p^2", "Z p^2", "(1 + a) p^2". */
function squared(kinetic: string, square: string): string {
  if (kinetic === '1') return square;
  return /[ +]/.test(kinetic) ? `(${kinetic}) ${square}` : `${kinetic} ${square}`;
}

function massPart(text: string, terms: number, sign: '-' | '+'): string {
  if (text === '0') return '';
  if (terms > 1) return ` ${sign} (${text})`;
  return text.startsWith('-') ? ` ${sign === '-' ? '+' : '-'} ${text.slice(1)}` : ` ${sign} ${text}`;
}

function propagatorRule(propagator: Propagator, kind: 'real' | 'complex', signature: Signature): PropagatorRuleDTO {
  const { above, aboveLatex, mass, end } = FORM[signature];
  const { kinetic, massSquared, terms } = propagator;
  const m2 = coefficientText(massSquared);
  const below = `${squared(coefficientText(kinetic), 'p^2')}${massPart(m2, massSquared.length, mass)}${end}`;
  const belowLatex = `${squared(coefficientLatex(kinetic), 'p^{2}')}${massPart(coefficientLatex(massSquared), massSquared.length, mass)}${end}`;
  return {
    field: propagator.field,
    kind,
    factor: below === 'p^2' ? `${above}/p^2` : `${above}/(${below})`,
    latex: `\\frac{${aboveLatex}}{${belowLatex}}`,
    massSquared: m2,
    terms: terms.map(origin),
  };
}

/**
 * The Feynman rules of a model, each next to the terms it came from, in the order of model.propagators and model.kinds.
 *
 * Propagators are i/(p² − m² + i0), −i/(p² + m² − i0) or 1/(p² + m²) by convention, with the kinetic normalisation Z where it is not
 * one; vertices are i × (Euclidean: −) the functional derivative. Internal lines between φ and φ* of a complex field carry the same rule.
 */
export function modelRules(model: Model): RulesDTO {
  const { signature } = model.conventions;
  const kindOf = new Map(model.fields.map(({ name, kind }) => [name, kind]));
  return {
    propagators: model.propagators.map((one) => propagatorRule(one, kindOf.get(one.field)!, signature)),
    vertices: model.kinds.map((kind) => vertexRule(kind, signature)),
  };
}

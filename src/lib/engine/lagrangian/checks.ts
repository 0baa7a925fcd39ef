import { boundedness } from './boundedness.ts';
import { type Check, listed, SHOWN } from './check.ts';
import type { Character } from './lattice.ts';
import { couplingDimensions, fieldDimension, parameterDimensions } from './massDimension.ts';
import type { Model } from './model.ts';
import { normalisationChecks } from './normalisation.ts';
import { exchangeableFields, isChargeConjugationInvariant } from './permutations.ts';
import { coefficientSign } from './propagating.ts';
import { linearText } from './spacetime.ts';
import { forbiddenBy, forbidsText, phaseSymmetries, symmetryText } from './symmetries.ts';

function hermiticity(model: Model): Check {
  const complex = model.fields.some(({ kind }) => kind === 'complex') || model.parameters.some((p) => p.complex);
  const text = complex
    ? 'The Lagrangian equals its own conjugate.'
    : 'All fields and parameters are real, and so is every coefficient.';
  return { code: 'hermiticity', title: 'Hermiticity', verdict: 'good', text };
}

function kineticSigns(model: Model): Check {
  const open = model.propagators.filter(({ kinetic }) => coefficientSign(kinetic) === null).map(({ field }) => field);
  if (open.length === 0)
    return {
      code: 'kinetic-signs',
      title: 'Kinetic signs',
      verdict: 'good',
      text: 'Every kinetic term has the sign of a healthy field in this convention.',
    };
  return {
    code: 'kinetic-signs',
    title: 'Kinetic signs',
    verdict: 'caution',
    text: `The sign of the kinetic term of ${listed(open)} depends on the values of the parameters.`,
  };
}

function masses(model: Model): Check[] {
  const tachyons = model.propagators
    .filter(({ massSquared }) => massSquared.length > 0 && coefficientSign(massSquared) === -1)
    .map(({ field }) => field);
  if (tachyons.length === 0) return [];
  return [
    {
      code: 'mass-sign',
      title: 'Sign of the mass term',
      verdict: 'caution',
      text: `The squared mass of ${listed(tachyons)} is negative at the origin (parameters taken as positive): shift the field to a minimum first, or the propagator is that of an unstable point.`,
    },
  ];
}

function dimensions(model: Model): Check[] {
  const field = linearText(fieldDimension(model));
  const { known, clash } = parameterDimensions(model);
  const single = [...known].map(([name, value]) =>
    value ? `[${name}] = ${linearText(value)}` : `[${name}] not fixed`,
  );
  const checks: Check[] = [
    {
      code: 'dimensions',
      title: `Mass dimensions in d = ${model.conventions.dimension}`,
      verdict: 'note',
      text:
        [`[field] = ${field}`, ...single].length > 1 ? `[field] = ${field}; ${listed(single)}.` : `[field] = ${field}.`,
    },
  ];
  if (clash)
    checks.push({
      code: 'dimension-clash',
      title: 'Dimensions do not match',
      verdict: 'caution',
      text: 'One parameter would need two different mass dimensions in different terms (or a bare number would need one); a scale is left out somewhere.',
    });
  return checks;
}

function powerCounting(model: Model): Check[] {
  const couplings = couplingDimensions(model);
  if (couplings.length === 0) return [];
  const named = (wanted: string): string[] =>
    couplings
      .filter(({ renormalisability }) => renormalisability === wanted)
      .map(({ name, dimension }) => `${name === '1' ? 'a vertex without a coupling' : name} (dimension ${dimension})`);
  const bad = named('non-renormalisable');
  const parts = (['super-renormalisable', 'just renormalisable', 'non-renormalisable'] as const)
    .map((word) => ({ word, names: [...new Set(named(word))] }))
    .filter(({ names }) => names.length > 0)
    .map(({ word, names }) => `${word}: ${listed(names)}`);
  return [
    {
      code: 'renormalisability',
      title: 'Power counting',
      verdict: bad.length > 0 ? 'note' : 'good',
      text: `${parts.join('; ')}.`.replace(/^./, (c) => c.toUpperCase()),
    },
  ];
}

function symmetries(model: Model, found: readonly Character[]): Check[] {
  const phases = found.map(
    (symmetry): Check => ({
      code: symmetry.order === 0n ? 'charge' : 'discrete',
      title: symmetry.order === 0n ? 'Conserved charge' : 'Discrete symmetry',
      verdict: 'note',
      text: `${symmetryText(model, symmetry)}. ${forbidsText(model, symmetry)}`,
    }),
  );
  const checks = phases.slice(0, SHOWN);
  if (phases.length > SHOWN)
    checks.push({
      code: 'discrete',
      title: 'Further symmetries',
      verdict: 'note',
      text: `${phases.length - SHOWN} more independent phase symmetries.`,
    });
  if (isChargeConjugationInvariant(model))
    checks.push({
      code: 'conjugation',
      title: 'Charge conjugation',
      verdict: 'note',
      text: 'Exchanging every complex field with its conjugate leaves the Lagrangian as it is.',
    });
  return [...checks, ...permutations(model)];
}

function permutations(model: Model): Check[] {
  const sets = exchangeableFields(model);
  if (sets === null)
    return [
      {
        code: 'permutations',
        title: 'Permutations of fields',
        verdict: 'note',
        text: 'Not looked for: the Lagrangian has too many terms.',
      },
    ];
  return sets.map((set) => ({
    code: 'permutations',
    title: 'Permutations of fields',
    verdict: 'note',
    text: `${listed(set)} may be exchanged at will: diagrams that differ only by that have equal values.`,
  }));
}

function tadpoles(model: Model, found: readonly Character[]): Check[] {
  const linear = [
    ...new Set(model.kinds.filter(({ fields }) => fields.length === 1).map(({ fields }) => fields[0]!.field)),
  ];
  const checks: Check[] = linear.slice(0, SHOWN).map((name) => ({
    code: 'tadpole-term',
    title: 'Linear term',
    verdict: 'caution',
    text: `${name} has a linear term, a one-point vertex: shift the field to remove it, keep it, or cancel it by a counterterm.`,
  }));
  const open = model.fields
    .filter(
      ({ name }) => !linear.includes(name) && forbiddenBy(model, found, [{ field: name, conjugate: false }]) === null,
    )
    .map(({ name }) => name);
  if (open.length > 0)
    checks.push({
      code: 'tadpole-allowed',
      title: 'One-point function',
      verdict: 'note',
      text: `No symmetry found here forbids an expectation value of ${listed(open)}; loops generate one.`,
    });
  return checks;
}

function potential(model: Model): Check[] {
  const { answer, text } = boundedness(model);
  if (answer === 'free') return [];
  const verdict = answer === 'bounded' ? 'good' : answer === 'unbounded' ? 'caution' : 'note';
  return [{ code: 'boundedness', title: 'Potential', verdict, text }];
}

/**
 * What is checked in every model: hermiticity, signs, mass dimensions and power counting, symmetries with the correlators they forbid,
 * tadpoles, boundedness and normalisation. Every statement is exact; what is not decided says so.
 */
export function modelChecks(model: Model): Check[] {
  const found = phaseSymmetries(model);
  return [
    hermiticity(model),
    kineticSigns(model),
    ...masses(model),
    ...dimensions(model),
    ...powerCounting(model),
    ...symmetries(model, found),
    ...tadpoles(model, found),
    ...potential(model),
    ...normalisationChecks(model),
  ];
}

import { format, rational } from '../exact/rational.ts';
import { type ContractionStep, countContractions } from '../expansion/contractions.ts';
import { capital, inWords, plural } from '../expansion/describe.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { NamedTheory } from './theory.ts';
import type { WorkingDTO, WorkingStep } from './types.ts';

/** Factorials of the numbers of vertices of each kind: "2!\,3!". */
const placesLatex = (counts: readonly number[]): string =>
  counts
    .filter((n) => n > 0)
    .map((n) => `${n}!`)
    .join('\\,');

function placesStep(step: Extract<ContractionStep, { is: 'places' }>, counts: readonly number[]): WorkingStep {
  const total = counts.reduce((a, b) => a + b, 0);
  const ways = `The ${plural(total, 'vertex', 'vertices')} can be put on the places of the drawing in ${step.all} way${step.all === 1n ? '' : 's'}`;
  const text =
    step.same === 1n
      ? `${ways}; each gives contractions of its own.`
      : `${ways}; ${step.same} at a time give the same contractions, because the drawing does not tell those places apart.`;
  const latex = step.same === 1n ? placesLatex(counts) : `\\frac{${placesLatex(counts)}}{${step.same}}`;
  return { text, latex: `${latex} = ${step.ways}`, factor: `${step.ways}` };
}

const free = (n: bigint, field: string, vertex: number): string =>
  `${n === 1n ? 'the one free' : `${n} free`} half-line${n === 1n ? '' : 's'} of ${field} at vertex ${vertex + 1}`;

function linesStep(step: Extract<ContractionStep, { is: 'lines' }>, named: NamedTheory): WorkingStep {
  const field = named.halves[step.type]!.field;
  const [a, b, joined] = step.parts;
  const from = `${a} choice${a === 1n ? '' : 's'} of ${step.count === 1 ? 'a half-line' : `${inWords(step.count)} half-lines`} at vertex ${step.from + 1}`;
  const end = `${b} at vertex ${step.to + 1}`;
  const rest = step.count === 1 ? 'joined in one way' : `joined in ${step.count}! = ${joined} ways`;
  const latex = [a, b].filter((n) => n > 1n).map(String);
  if (step.count > 1) latex.push(`${step.count}!`);
  return {
    text: `${capital(plural(step.count, 'line'))} of ${field} between vertices ${step.from + 1} and ${step.to + 1}: ${from}, ${end}, ${rest}.`,
    latex: equation(latex, step.ways),
    factor: `${step.ways}`,
  };
}

/** "6 \\cdot 2! = 12"; a single number stands alone. */
function equation(factors: readonly string[], value: bigint): string {
  const product = factors.join(' \\cdot ') || '1';
  return product === `${value}` ? product : `${product} = ${value}`;
}

function selfStep(step: Extract<ContractionStep, { is: 'self' }>, named: NamedTheory): WorkingStep {
  const half = named.halves[step.type]!;
  const real = named.theory.partner[step.type] === step.type;
  const [chosen, joined] = step.parts;
  const how = real ? `(${2 * step.count} − 1)!!` : `${step.count}!`;
  const latex = [chosen > 1n ? `${chosen}` : '', real ? `(${2 * step.count}-1)!!` : `${step.count}!`].filter(Boolean);
  return {
    text: `${capital(plural(step.count, 'self-contraction'))} of ${half.field} at vertex ${step.vertex + 1}: ${chosen} choice${chosen === 1n ? '' : 's'} of the half-lines, joined in ${how} = ${joined} way${joined === 1n ? '' : 's'}.`,
    latex: equation(latex, step.ways),
    factor: `${step.ways}`,
  };
}

function stepText(step: ContractionStep, named: NamedTheory, counts: readonly number[]): WorkingStep {
  if (step.is === 'places') return placesStep(step, counts);
  if (step.is === 'lines') return linesStep(step, named);
  if (step.is === 'self') return selfStep(step, named);
  const text =
    step.is === 'legs'
      ? `Legs ${step.leg + 1} and ${step.other + 1} are joined to each other.`
      : `Leg ${step.leg + 1} is tied to one of ${free(step.ways, named.halves[step.type]!.text, step.vertex)}.`;
  return { text, latex: `${step.ways}`, factor: `${step.ways}` };
}

/** The first route to a weight in words: contractions counted step by step, over what the expansion divides by. */
export function contractionsText(
  diagram: Diagram,
  named: NamedTheory,
  legTypes: readonly number[],
): WorkingDTO['contractions'] {
  const { steps, total, divisor } = countContractions(diagram, named.theory, legTypes);
  const counts = named.kinds.map((_, kind) => diagram.kinds.filter((k) => k === kind).length);
  return {
    steps: steps.map((step) => stepText(step, named, counts)),
    total: `${total}`,
    divisor: `${divisor}`,
    weight: format(rational(total, divisor)),
  };
}

import type { DiagramPageData } from '#contract/api.ts';
import { nameWords, raised } from '#features/compose/words.ts';

/** A coupling monomial of a diagram as one reads it: "λ² ρ". */
export const couplingWords = (order: Readonly<Record<string, string>>): string =>
  Object.entries(order)
    .map(([name, power]) => (power === '1' ? nameWords(name) : `${nameWords(name)}${raised(power)}`))
    .join(' ') || '1';

/** What is true of a diagram, for its list of facts. */
export function factsOf(data: DiagramPageData): readonly (readonly [name: string, text: string, definition: string])[] {
  const yes = (fact: boolean): string => (fact ? 'yes' : 'no');
  return [
    ['S', data.symmetryFactor, 'symmetry-factor'],
    ['Weight', data.weight, 'symmetry-factor'],
    ['Contractions', data.pairings, 'contraction'],
    ['Couplings', couplingWords(data.order), 'order'],
    ['Loops', String(data.loops), 'loops'],
    ['Connected', yes(data.connected), 'keep'],
    ['1PI', yes(data.onePI), 'keep'],
    ['Self-contraction', yes(data.hasSelfContraction), 'self-contraction'],
    ['Tadpole', yes(data.hasTadpole), 'tadpole'],
  ];
}

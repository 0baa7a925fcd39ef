import type { RulesDTO } from '#contract/result.ts';

const CONJUGATE = '^*';

/** Fields less conjugates at one vertex or in one correlator. */
const charge = (operators: readonly string[], field: string): number =>
  operators.filter((operator) => operator === field).length -
  operators.filter((operator) => operator === field + CONJUGATE).length;

const times = (operators: readonly string[], field: string): number =>
  operators.filter((operator) => operator === field).length;

/**
 * Why a correlator has no diagram at any order, in a sentence; null where no reason of this kind is found (it may vanish
 * all the same). Looks at two things in every vertex: an even number of a real field, and a conserved number of a complex one.
 */
export function whyNone(rules: Pick<RulesDTO, 'propagators' | 'vertices'>, legs: readonly string[]): string | null {
  for (const { field, kind } of rules.propagators) {
    if (kind === 'real') {
      const even = rules.vertices.every(({ fields }) => times(fields, field) % 2 === 0);
      if (even && times(legs, field) % 2 === 1)
        return `Every vertex holds an even number of ${field} and this correlator an odd one, so it vanishes at every order.`;
    } else {
      const conserved = rules.vertices.every(({ fields }) => charge(fields, field) === 0);
      if (conserved && charge(legs, field) !== 0)
        return `Every vertex conserves the number of ${field}, and this correlator holds not as many ${field} as ${field}${CONJUGATE}, so it vanishes at every order.`;
    }
  }
  return null;
}

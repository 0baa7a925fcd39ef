import { InputError } from '../errors.ts';
import type { Model } from '../lagrangian/model.ts';
import { readName } from '../lagrangian/names.ts';
import type { NamedTheory } from './theory.ts';

const MOST_LEGS = 12;

/**
 * Field operators of a correlator, in order, as half-line types: a leg "phi" is the operator φ, in any spelling of the
 * Lagrangian language ("φ^*", "\\phi^\\dagger", "conj(phi)").
 *
 * @throws InputError wrong-legs for a name that is no field of the model, or for too many legs.
 */
export function readLegs(
  named: NamedTheory,
  model: Model,
  legs: readonly string[],
): { types: number[]; names: string[] } {
  if (legs.length > MOST_LEGS)
    throw new InputError('wrong-legs', `A correlator may have at most ${MOST_LEGS} legs; this one has ${legs.length}.`);
  const types = legs.map((leg, at) => {
    const operator = readName(leg);
    const field = operator && model.fields.find(({ name }) => name === operator.field);
    if (!operator || !field) {
      const known = named.halves.map((half) => half.text).join(', ');
      throw new InputError(
        'wrong-legs',
        `Leg ${at + 1}, "${leg.slice(0, 40)}", is no field of this model; its fields are ${known}.`,
      );
    }
    const conjugate = operator.conjugate && field.kind === 'complex';
    return named.halves.findIndex((half) => half.field === field.name && half.conjugate === conjugate);
  });
  return { types, names: types.map((type) => named.halves[type]!.text) };
}

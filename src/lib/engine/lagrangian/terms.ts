import type { Model, Term } from './model.ts';
import type { Monomial } from './monomial.ts';

/** All terms of a model in normal form: the quadratic parts of its fields, then its vertices. */
export const termsOf = ({ propagators, kinds }: Model): readonly Term[] => [
  ...propagators.flatMap(({ terms }) => terms),
  ...kinds.flatMap(({ terms }) => terms),
];

/** A term as the monomial that the arithmetic of the language works on. */
export const monomialOf = ({ number, parameters, factors, derivatives }: Term): Monomial => ({
  number,
  powers: [...parameters],
  factors,
  pairs: derivatives,
  open: [],
});

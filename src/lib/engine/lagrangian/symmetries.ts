import { annihilator, type Character, charge, echelonBasis, type Integers } from './lattice.ts';
import type { FieldFactor, Model } from './model.ts';

/** How often each field stands in a product of operators, a conjugate counted as −1 (a real field has none). */
export function contentOf(model: Model, factors: readonly FieldFactor[]): bigint[] {
  const at = new Map(model.fields.map(({ name }, i) => [name, i]));
  const content = new Array<bigint>(model.fields.length).fill(0n);
  for (const { field, conjugate } of factors) content[at.get(field)!]! += conjugate ? -1n : 1n;
  return content;
}

const absolute = (n: bigint): bigint => (n < 0n ? -n : n);
const size = (exponents: Integers): bigint => exponents.reduce((sum, n) => sum + absolute(n), 0n);

/** The contents that no phase symmetry tells apart from none: those of the vertices, and two of any real field. */
function neutralContents(model: Model): Integers[] {
  const real = model.fields.flatMap(({ kind }, at) =>
    kind === 'real' ? [model.fields.map((_, i) => (i === at ? 2n : 0n))] : [],
  );
  const vertices = new Map(
    model.kinds.map((kind): [string, Integers] => {
      const content = contentOf(model, kind.fields).map((n, i) => (model.fields[i]!.kind === 'real' ? n % 2n : n));
      return [content.join(), content];
    }),
  );
  return [...real, ...[...vertices.values()].sort((a, b) => Number(size(a) - size(b)))];
}

const plus = (a: Integers, b: Integers, times: bigint): bigint[] => a.map((n, i) => n + times * b[i]!);

/** Charges with the first one positive, made small by adding multiples of one another. */
function smallCharges(charges: readonly Integers[]): Integers[] {
  const reduced = [...charges];
  for (let changed = true; changed; ) {
    changed = false;
    for (let i = 0; i < reduced.length; i++)
      for (let j = 0; j < reduced.length; j++)
        for (const times of [1n, -1n]) {
          const candidate = plus(reduced[i]!, reduced[j]!, times);
          if (i === j || size(candidate) >= size(reduced[i]!)) continue;
          reduced[i] = candidate;
          changed = true;
        }
  }
  return reduced.map((exponents) => {
    const first = exponents.find((n) => n !== 0n) ?? 1n;
    return first < 0n ? exponents.map((n) => -n) : exponents;
  });
}

const modulo = (exponents: Integers, order: bigint): Integers => exponents.map((n) => ((n % order) + order) % order);

/** Reflections with few fields each: sums of two replace the longer where they are shorter. */
function shortReflections(reflections: readonly Integers[], continuous: readonly Integers[]): Integers[] {
  const reduced = reflections.map((exponents) => modulo(exponents, 2n));
  const halves = continuous.map((exponents) => modulo(exponents, 2n));
  for (let changed = true; changed; ) {
    changed = false;
    for (let i = 0; i < reduced.length; i++)
      for (const other of [...reduced.filter((_, j) => j !== i), ...halves]) {
        const candidate = modulo(plus(reduced[i]!, other, 1n), 2n);
        if (size(candidate) >= size(reduced[i]!) || size(candidate) === 0n) continue;
        reduced[i] = candidate;
        changed = true;
      }
  }
  return reduced;
}

/**
 * The symmetries of a model that multiply each field by a phase: U(1) charges (order 0) first, then Z_n (order n), as independent generators.
 *
 * A correlator is invariant under all of them exactly when its content lies in the lattice spanned by the contents of the vertices and twice each real field;
 * the symmetries are the characters that are trivial on that lattice. A real field takes only the signs ±1.
 */
export function phaseSymmetries(model: Model): Character[] {
  const { length } = model.fields;
  const found = annihilator(length, echelonBasis(length, neutralContents(model)));
  const continuous = smallCharges(found.filter(({ order }) => order === 0n).map(({ exponents }) => exponents));
  const reflections = shortReflections(
    found.filter(({ order }) => order === 2n).map(({ exponents }) => exponents),
    continuous,
  );
  return [
    ...continuous.map((exponents) => ({ exponents, order: 0n })),
    ...reflections.map((exponents) => ({ exponents, order: 2n })),
    ...found
      .filter(({ order }) => order > 2n)
      .map(({ exponents, order }) => ({ exponents: modulo(exponents, order), order })),
  ];
}

const listed = (items: readonly string[]): string =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;

/** "phi → −phi", "U(1) with charges phi 1, chi 2", "phi → e^(2πi/3) phi". */
export function symmetryText(model: Model, { exponents, order }: Character): string {
  const moved = model.fields.flatMap(({ name }, i) => (exponents[i] === 0n ? [] : [{ name, n: exponents[i]! }]));
  if (order === 0n)
    return `U(1) with ${moved.length === 1 ? 'charge' : 'charges'} ${moved.map(({ name, n }) => `${n} of ${name}`).join(', ')}`;
  return moved
    .map(({ name, n }) =>
      2n * n === order ? `${name} → −${name}` : `${name} → e^(${n === 1n ? '' : `${n}·`}2πi/${order}) ${name}`,
    )
    .join(', ');
}

/** Which correlators a symmetry makes vanish, as a sentence. */
export function forbidsText(model: Model, { exponents, order }: Character): string {
  const moved = model.fields.filter((_, i) => exponents[i] !== 0n).map(({ name }) => name);
  if (order === 0n) return 'Correlators whose charges do not add up to zero vanish.';
  if (order !== 2n) return `Correlators that it multiplies by a phase other than 1 vanish.`;
  return moved.length === 1
    ? `Correlators with an odd number of ${moved[0]} vanish.`
    : `Correlators with an odd number of ${listed(moved)} together vanish.`;
}

/**
 * Why a correlator vanishes at every order: a sentence that names the symmetry, or null when no phase symmetry forbids it.
 * `legs` are field operators of the model in any order.
 */
export const forbiddenBySymmetry = (model: Model, legs: readonly FieldFactor[]): string | null =>
  forbiddenBy(model, phaseSymmetries(model), legs);

/** The same with the phase symmetries of the model at hand. */
export function forbiddenBy(
  model: Model,
  symmetries: readonly Character[],
  legs: readonly FieldFactor[],
): string | null {
  const content = contentOf(model, legs);
  for (const symmetry of symmetries) {
    const total = charge(symmetry, content);
    if (total === 0n) continue;
    const text = symmetryText(model, symmetry);
    if (symmetry.order === 0n)
      return `This correlator vanishes at every order: every vertex conserves ${text}, and the legs carry ${total}.`;
    return symmetry.order === 2n
      ? `This correlator vanishes at every order: every vertex is even under ${text}, and the legs are odd.`
      : `This correlator vanishes at every order: every vertex is invariant under ${text}, and the legs are not.`;
  }
  return null;
}

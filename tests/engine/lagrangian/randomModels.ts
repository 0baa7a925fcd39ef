import fc from 'fast-check';

/** Real and complex fields with names of every shape: Greek, capital, subscript, several letters, digits. */
const REAL = ['phi', 'h', 'Phi', 's_1', 'chi_ab', 'abc', 'k3'];
const COMPLEX = ['eta', 'z', 'psi_x', 'Big'];
const PARAMETERS = ['lambda', 'g', 'm_h', 'v0', 'kappa_alpha', 'dZ', 'e'];
const COMPLEX_PARAMETERS = ['y', 'c_2'];
const INDICES = ['mu', 'nu', 'rho', 'sigma'];

const factor = fc.oneof(
  fc.constantFrom(...REAL),
  fc.constantFrom(...COMPLEX),
  fc.constantFrom(...COMPLEX.map((name) => `conj(${name})`)),
);

const power = fc.constantFrom('', '^2', '^3', '^-1', '^-2', '^(1/2)', '^(-3/2)');
const parameter = fc.oneof(
  fc.tuple(fc.constantFrom(...PARAMETERS), power).map(([name, n]) => `${name}${n}`),
  fc.tuple(fc.constantFrom(...COMPLEX_PARAMETERS), fc.constantFrom('', '^2')).map(([name, n]) => `${name}${n}`),
  fc.constantFrom(...COMPLEX_PARAMETERS.map((name) => `conj(${name})`)),
);

const number = fc.oneof(
  fc.tuple(fc.integer({ min: -60, max: 60 }), fc.integer({ min: 1, max: 60 })).map(([a, b]) => `(${a || 1})/${b}`),
  fc.constantFrom(
    'i',
    '1/4!',
    '(2 + 3 i)/5',
    'sqrt(2)',
    '(1 + sqrt(6))',
    'pi^2/3',
    '(1 - i sqrt(3) pi)',
    'pi^(1/2)',
    '-1',
  ),
);

interface Interaction {
  readonly number: string;
  readonly parameters: readonly string[];
  readonly fields: readonly string[];
  readonly pairs: readonly (readonly [number, number])[];
}

const interaction: fc.Arbitrary<Interaction> = fc.record({
  number,
  parameters: fc.array(parameter, { maxLength: 3 }),
  fields: fc.array(factor, { minLength: 1, maxLength: 6 }),
  pairs: fc.array(fc.tuple(fc.nat(5), fc.nat(5)), { maxLength: 3 }),
});

/** A factor under its derivatives, every pair of them with an index of its own. */
function derived(name: string, at: number, pairs: readonly (readonly [number, number])[]): string {
  const operators = pairs.flatMap(([i, j], k) => {
    if (i === j) return i === at ? ['d^2'] : [];
    return i === at || j === at ? [`d_${INDICES[k]}`] : [];
  });
  return operators.reduce((inner, operator) => `(${operator} ${inner})`, name);
}

function interactionText({ number: n, parameters, fields, pairs }: Interaction): string {
  const usable = fields.length < 3 ? [] : pairs.map(([i, j]) => [i % fields.length, j % fields.length] as const);
  const factors = fields.map((name, at) => derived(name, at, usable));
  const term = [n, ...parameters, ...factors].join(' * ');
  return `(${term}) + conj(${term})`;
}

const kinetic = [
  ...REAL.map((name) => `1/2 (d ${name})^2 - 1/2 m_h^2 ${name}^2`),
  ...COMPLEX.map((name) => `(d conj(${name})) (d ${name})`),
];

/** Hermitian Lagrangians over fixed fields with random interactions: derivatives, roots, π, i, negative and fractional powers, complex couplings. */
export const lagrangians: fc.Arbitrary<string> = fc
  .array(interaction, { maxLength: 6 })
  .map((terms) => [...kinetic, ...terms.map(interactionText)].join(' + '));

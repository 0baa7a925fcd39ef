import {
  type ExactNumber,
  fromRational,
  IMAGINARY,
  multiplyNumbers,
  NUMBER_ONE,
  NUMBER_ZERO,
  negateNumber,
  numberSign,
  powerOfNumber,
  rationalValue,
} from '../exact/number.ts';
import { numberLatex, numberText, productLatex, productText } from '../exact/numberText.ts';
import { add, format, multiply, type Rational, rational, ZERO } from '../exact/rational.ts';
import type { Diagram } from '../graph/diagram.ts';
import { parametersLatex, parametersText } from '../lagrangian/kinds.ts';
import type { Model, Signature, VertexKind } from '../lagrangian/model.ts';
import { vertexFactor } from '../rules/factor.ts';
import type { NamedTheory } from './theory.ts';
import type { WorkingDTO } from './types.ts';

type Coefficient = WorkingDTO['coefficient'];

/** i^n. */
const phase = (n: number): ExactNumber =>
  [NUMBER_ONE, IMAGINARY, negateNumber(NUMBER_ONE), negateNumber(IMAGINARY)][((n % 4) + 4) % 4]!;

/** What the functional derivative of a kind without derivative couplings leaves: its rule without i and couplings. */
const kindNumber = (kind: VertexKind): ExactNumber =>
  negateNumber(vertexFactor(kind, 'euclidean').terms[0]?.number ?? NUMBER_ZERO);

/** The number of a kind's rule without i and couplings; null with derivative couplings or where it is not rational. */
export const plainVertexNumber = (kind: VertexKind): Rational | null =>
  hasDerivatives(kind) ? null : rationalValue(kindNumber(kind));

const hasDerivatives = (kind: VertexKind): boolean => kind.terms.some(({ derivatives }) => derivatives.length > 0);

interface Parts {
  /** Magnitudes of the vertex factors without signs. */
  number: ExactNumber;
  /** Whether an odd number of vertex factors is negative. */
  negative: boolean;
  readonly powers: Map<string, Rational>;
  readonly momentum: string[];
  readonly momentumLatex: string[];
}

function collect(model: Model, named: NamedTheory, content: readonly number[]): Parts {
  const parts: Parts = { number: NUMBER_ONE, negative: false, powers: new Map(), momentum: [], momentumLatex: [] };
  content.forEach((n, index) => {
    if (n === 0) return;
    const kind = model.kinds[named.kinds[index]!.index]!;
    if (hasDerivatives(kind)) {
      // The whole vertex rule, sign and couplings included, stands for itself.
      const at = named.kinds[index]!.index + 1;
      parts.momentum.push(n === 1 ? `V${at}` : `V${at}^${n}`);
      parts.momentumLatex.push(n === 1 ? `V_{${at}}` : `V_{${at}}^{${n}}`);
      return;
    }
    for (const [name, power] of kind.parameters)
      parts.powers.set(name, add(parts.powers.get(name) ?? ZERO, multiply(power, rational(n))));
    const number = kindNumber(kind);
    const minus = numberSign(number) === -1;
    parts.number = multiplyNumbers(parts.number, powerOfNumber(minus ? negateNumber(number) : number, n));
    if (minus && n % 2 === 1) parts.negative = !parts.negative;
  });
  return parts;
}

/** i's of vertices and internal propagators; a vertex with derivatives keeps its own i in its rule. */
function phasesOf(signature: Signature, vertices: number, lines: number, negative: boolean): ExactNumber {
  const flip = (number: ExactNumber): ExactNumber => (negative ? negateNumber(number) : number);
  if (signature === 'euclidean') return flip(vertices % 2 === 1 ? negateNumber(NUMBER_ONE) : NUMBER_ONE);
  return flip(phase(vertices + (signature === '+---' ? lines : -lines)));
}

function joined(symbols: readonly string[], by: string): string {
  return symbols.filter((symbol) => symbol !== '' && symbol !== '1').join(by);
}

const sortedPowers = (powers: ReadonlyMap<string, Rational>): Map<string, Rational> =>
  new Map([...powers].filter(([, power]) => power.num !== 0n).sort(([a], [b]) => (a < b ? -1 : 1)));

/**
 * The number in front of a diagram's integral, split as coupling normalisation × 1/S × i's and signs.
 *
 * The i's are those of the vertices and of the internal propagators (external lines amputated). A vertex with derivatives
 * stands as V_n, the n-th vertex rule with its momenta and its own i.
 */
export function coefficientOf(model: Model, named: NamedTheory, diagram: Diagram, weight: Rational): Coefficient {
  const content = named.kinds.map((_, kind) => diagram.kinds.filter((k) => k === kind).length);
  const parts = collect(model, named, content);
  const plain = content.reduce(
    (sum, n, kind) => sum + (hasDerivatives(model.kinds[named.kinds[kind]!.index]!) ? 0 : n),
    0,
  );
  const phases = phasesOf(model.conventions.signature, plain, diagram.lines.length, parts.negative);
  const powers = sortedPowers(parts.powers);
  const symbols = joined([parametersText(powers), ...parts.momentum], '*');
  const latex = joined([parametersLatex(powers), ...parts.momentumLatex], '\\,');
  const all = multiplyNumbers(multiplyNumbers(phases, fromRational(weight)), parts.number);
  const couplingLatex = productLatex(parts.number, latex);
  return {
    coupling: productText(parts.number, symbols),
    weight: format(weight),
    phases: numberText(phases),
    whole: productText(all, symbols),
    latex: `${couplingLatex} \\times ${numberLatex(fromRational(weight))} \\times ${bracketed(numberLatex(phases))} = ${productLatex(all, latex)}`,
  };
}

const bracketed = (text: string): string => (text.startsWith('-') ? `(${text})` : text);

/** The same where no model is given: the names of the kinds stand for their whole vertex factors. */
export function plainCoefficient(named: NamedTheory, diagram: Diagram, weight: Rational): Coefficient {
  const counts = named.kinds.map((kind, at) => [kind, diagram.kinds.filter((k) => k === at).length] as const);
  const used = counts.filter(([, n]) => n > 0);
  const text = joined(
    used.map(([kind, n]) => (n === 1 ? `V(${kind.name})` : `V(${kind.name})^${n}`)),
    '*',
  );
  const latex = joined(
    used.map(([kind, n]) => `V_{${kind.couplingLatex}}${n === 1 ? '' : `^{${n}}`}`),
    '\\,',
  );
  const number = fromRational(weight);
  return {
    coupling: text || '1',
    weight: format(weight),
    phases: '1',
    whole: productText(number, text),
    latex: productLatex(number, latex),
  };
}

import type { ModelPreview } from '#contract/api.ts';
import { GREEK } from './words.ts';

/** A field operator that may stand in a correlator. */
export interface Operator {
  /** "phi" or "phi^*". */
  readonly name: string;
  readonly mathml: string;
  /** For those who listen: "phi", "phi conjugate". */
  readonly spoken: string;
}

/** Each field, and after a complex one its conjugate. */
export function operatorsOf(fields: ModelPreview['fields']): readonly Operator[] {
  return fields.flatMap(({ name, kind, mathml }) => {
    const field = { name, mathml, spoken: name };
    if (kind === 'real') return [field];
    return [field, { name: `${name}^*`, mathml: conjugate(mathml), spoken: `${name} conjugate` }];
  });
}

/** The typeset conjugate of a typeset field. */
const conjugate = (mathml: string): string =>
  mathml.replace(/^<math([^>]*)>([\s\S]*)<\/math>$/, '<math$1><msup><mrow>$2</mrow><mo>∗</mo></msup></math>');

/** A leg in the spelling of the model: "φ", "\phi" and "phi" are one name, and a real field is its own conjugate. */
export function operatorFor(operators: readonly Operator[], leg: string): Operator | undefined {
  const name = plain(leg);
  const known = operators.find((operator) => operator.name === name);
  return known ?? operators.find((operator) => name === `${operator.name}^*`);
}

const SPELLED: ReadonlyMap<string, string> = new Map([
  ...Object.entries(GREEK).map(([name, letter]) => [letter, name] as const),
  ['ϕ', 'phi'] as const,
]);

function plain(leg: string): string {
  const bare = leg
    .replace(/^conj\((.*)\)$/, '$1^*')
    .replace(/\\/g, '')
    .replace(/\^?(†|\{?dagger\}?)$|\^\{\*\}$|(?<!\^)\*$/, '^*');
  return bare.replace(/\p{L}/gu, (letter) => SPELLED.get(letter) ?? letter);
}

/** The legs with one moved by a place, or as they are at an end. */
export function moved(legs: readonly string[], from: number, by: -1 | 1): readonly string[] {
  const to = from + by;
  if (to < 0 || to >= legs.length) return legs;
  const next = [...legs];
  [next[from], next[to]] = [next[to]!, next[from]!];
  return next;
}

export const without = (legs: readonly string[], at: number): readonly string[] =>
  legs.filter((_, index) => index !== at);

/** "⟨h h s s⟩" for those who listen. */
export function spokenCorrelator(operators: readonly Operator[], legs: readonly string[]): string {
  if (legs.length === 0) return 'vacuum diagrams, no legs';
  return `correlator of ${legs.map((leg) => operatorFor(operators, leg)?.spoken ?? leg).join(', ')}`;
}

/** The first question about a model: its first field's propagator. */
export function firstLegs(fields: ModelPreview['fields']): string {
  const [field] = fields;
  if (!field) return '';
  return field.kind === 'real' ? `${field.name} ${field.name}` : `${field.name} ${field.name}^*`;
}

import type { ExpansionRequest } from '#contract/request.ts';
import { exampleById } from '#features/model/examples.ts';

/** What the live example asks, as its plain form holds it. */
export interface Question {
  readonly lagrangian: string;
  readonly legs: string;
  readonly by: 'loops' | 'total';
  readonly n: string;
  readonly keep: ExpansionRequest['keep'];
}

export const KEEPS: readonly { readonly value: ExpansionRequest['keep']; readonly label: string }[] = [
  { value: '1PI', label: '1PI' },
  { value: 'connected', label: 'Connected' },
  { value: 'normalised', label: 'Normalised' },
  { value: 'all', label: 'All' },
];

/** The Saltmarsh portal, ⟨h h s s⟩ at one loop. */
export const FIRST: Question = {
  lagrangian: exampleById('portal')!.input.lagrangian!,
  legs: 'h h s s',
  by: 'loops',
  n: '1',
  keep: '1PI',
};

/** The question in an address; what is missing or no choice of the form is as in the first one. */
export function questionOf(query: URLSearchParams): Question {
  const text = (name: string, otherwise: string) => query.get(name) ?? otherwise;
  return {
    lagrangian: text('lagrangian', FIRST.lagrangian).replace(/\r\n?/g, '\n'),
    legs: text('legs', FIRST.legs).trim(),
    by: query.get('by') === 'total' ? 'total' : 'loops',
    n: text('n', FIRST.n).trim(),
    keep: KEEPS.find(({ value }) => value === query.get('keep'))?.value ?? FIRST.keep,
  };
}

/** Field operators in a text such as "⟨h h s s⟩" or "phi, phi^*". */
export const legsOf = (text: string): string[] => text.split(/[\s,;⟨⟩<>]+/u).filter((leg) => leg !== '');

/** The expansion that a question asks for; not yet checked. */
export function requestOf(question: Question): unknown {
  const n = Number(question.n);
  return {
    lagrangian: question.lagrangian,
    legs: legsOf(question.legs),
    order: question.by === 'total' ? { total: question.n } : { loops: question.n === '' ? Number.NaN : n },
    keep: question.keep,
  };
}

const COUNTS = ['tree level', 'one loop', 'two loops', 'three loops', 'four loops'];
const KEEP_WORDS = { all: 'all diagrams', normalised: 'normalised', connected: 'connected', '1PI': '1PI' } as const;

/** "1PI, one loop": the request after its legs, in words. */
export function wordsOf({ by, n, keep }: Question): string {
  const order = by === 'total' ? `total power ${n}` : (COUNTS[Number(n)] ?? `${n} loops`);
  return `${KEEP_WORDS[keep]}, ${order}`;
}

const NUMERALS: readonly (readonly [number, string])[] = [
  [50, 'L'],
  [40, 'XL'],
  [10, 'X'],
  [9, 'IX'],
  [5, 'V'],
  [4, 'IV'],
  [1, 'I'],
];

/** A plate is numbered as in an atlas. @param number 1 … 89 */
export function numeral(number: number): string {
  const [value, sign] = NUMERALS.find(([size]) => size <= number) ?? [0, ''];
  return value === 0 ? '' : sign + numeral(number - value);
}

/** Members grouped by a key, in the order of first members. */
export function grouped<T>(items: readonly T[], keyOf: (item: T) => string): readonly (readonly T[])[] {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const key = keyOf(item);
    const group = groups.get(key);
    if (group) group.push(item);
    else groups.set(key, [item]);
  }
  return [...groups.values()];
}

/** A product of couplings as LaTeX. @param latexOf the LaTeX of a coupling's name */
export function couplingsLatex(order: Readonly<Record<string, string>>, latexOf: (name: string) => string): string {
  const factors = Object.entries(order)
    .filter(([, power]) => power !== '0')
    .map(([name, power]) => (power === '1' ? latexOf(name) : `${latexOf(name)}^{${power}}`));
  return factors.length === 0 ? '1' : factors.join('\\,');
}

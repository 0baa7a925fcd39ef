import type { Diagram } from '../graph/diagram.ts';
import type { Theory } from '../graph/theory.ts';

/** How half-line types and legs are called in a description. */
export interface DescriptionNames {
  /** One text for each half-line type. */
  readonly halves: readonly string[];
  readonly legs: readonly string[];
}

const WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve'];

/** "three", "13". */
export const inWords = (n: number): string => WORDS[n] ?? String(n);
export const plural = (n: number, noun: string, nouns = `${noun}s`): string =>
  `${inWords(n)} ${n === 1 ? noun : nouns}`;

const listed = (parts: readonly string[]): string =>
  parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** "vertices 1 and 2 joined by three lines of φ" for every bundle of equal lines. */
function joins({ lines }: Diagram, theory: Theory, { halves }: DescriptionNames): string[] {
  const bundles = new Map<string, number>();
  for (const { from, to, type } of lines)
    bundles.set(`${from},${to},${type}`, (bundles.get(`${from},${to},${type}`) ?? 0) + 1);
  return [...bundles].map(([key, n]) => {
    const [from, to, type] = key.split(',').map(Number) as [number, number, number];
    const real = theory.partner[type] === type;
    const field = halves[type]!;
    if (from === to) return `vertex ${from + 1} closed on itself by ${plural(n, 'self-contraction')} of ${field}`;
    const lineText = `${plural(n, 'line')} of ${field}`;
    return real
      ? `vertices ${from + 1} and ${to + 1} joined by ${lineText}`
      : `${lineText} running from vertex ${from + 1} to vertex ${to + 1}`;
  });
}

function legTexts({ legs }: Diagram, names: DescriptionNames): string[] {
  const texts: string[] = [];
  legs.forEach((at, leg) => {
    if (at >= 0) texts.push(`leg ${leg + 1} (${names.legs[leg]}) ends on vertex ${at + 1}`);
    else if (-1 - at > leg)
      texts.push(`legs ${leg + 1} and ${-at} (${names.legs[leg]}, ${names.legs[-1 - at]}) are joined to each other`);
  });
  return texts;
}

/** The picture in words, for those who cannot see it: "Two vertices; vertices 1 and 2 joined by three lines of phi; …". */
export function describe(diagram: Diagram, theory: Theory, names: DescriptionNames): string {
  const { kinds } = diagram;
  if (kinds.length === 0 && diagram.legs.length === 0) return 'The empty diagram.';
  const parts = [
    kinds.length > 0 ? plural(kinds.length, 'vertex', 'vertices') : 'No vertex',
    ...joins(diagram, theory, names),
    ...(diagram.legs.length > 0 ? [listed(legTexts(diagram, names))] : []),
  ];
  return `${capital(parts.join('; '))}.`;
}

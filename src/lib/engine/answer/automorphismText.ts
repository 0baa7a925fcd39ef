import { capital, plural } from '../expansion/describe.ts';
import { automorphisms, type Bundle, type Generator } from '../graph/automorphisms.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { NamedTheory } from './theory.ts';
import type { WorkingDTO, WorkingStep } from './types.ts';

type GeneratorText = WorkingDTO['automorphisms']['generators'][number];

/** Cycles of a permutation, each of length two or more. */
function cyclesOf(image: readonly number[]): number[][] {
  const seen = new Set<number>();
  const cycles: number[][] = [];
  image.forEach((_, start) => {
    const cycle: number[] = [];
    for (let at = start; !seen.has(at); at = image[at]!) {
      seen.add(at);
      cycle.push(at);
    }
    if (cycle.length > 1) cycles.push(cycle);
  });
  return cycles;
}

const written = (cycles: readonly number[][], mark = ''): string =>
  cycles.map((cycle) => `(${cycle.map((at) => `${mark}${at + 1}`).join(' ')})`).join('');

/** Moved points as [from, to], numbered from 1. */
const moves = (image: readonly number[]): [number, number][] =>
  image.flatMap((to, at): [number, number][] => (to === at ? [] : [[at + 1, to + 1]]));

function vertexWords(cycles: readonly number[][]): string {
  const parts = cycles.map((cycle) => {
    const names = cycle.map((at) => at + 1);
    return names.length === 2
      ? `exchanges vertices ${names[0]} and ${names[1]}`
      : `carries vertices ${names.join(' → ')} → ${names[0]}`;
  });
  return parts.length < 2 ? parts.join('') : `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)}`;
}

function generatorText(generator: Generator, swapped: Bundle | undefined): GeneratorText {
  const vertices = moves(generator.vertices);
  const lines = moves(generator.lines);
  const lineCycles = written(cyclesOf(generator.lines), 'l');
  if (generator.kind === 'vertices') {
    const cycles = cyclesOf(generator.vertices);
    return {
      words: `${vertexWords(cycles)}, with their lines`,
      cycles: `${written(cycles)}${lineCycles}`,
      vertices,
      lines,
    };
  }
  if (generator.kind === 'parallel') {
    const [a, b] = lines[0]!;
    return { words: `exchanges the equal lines l${a} and l${b}`, cycles: lineCycles, vertices, lines };
  }
  const line = swapped!.lines[0]! + 1;
  return {
    words: `swaps the two ends of the self-contraction l${line} at vertex ${swapped!.from + 1}`,
    cycles: `(l${line}⁺ l${line}⁻)`,
    vertices,
    lines: [[line, line]],
  };
}

function bundleStep({ from, to, lines, swappable, factor }: Bundle, field: string): WorkingStep {
  const m = lines.length;
  if (from !== to)
    return {
      text: `${capital(plural(m, 'equal line'))} of ${field} between vertices ${from + 1} and ${to + 1}: ${m}! exchanges.`,
      latex: `${m}! = ${factor}`,
      factor: `${factor}`,
    };
  const ends = swappable ? `, each with two ends to swap: ${m}!·2^${m}` : `: ${m}!`;
  return {
    text: `${capital(plural(m, 'self-contraction'))} of ${field} at vertex ${from + 1}${ends}.`,
    latex: `${m}!${swappable ? ` \\cdot 2^{${m}}` : ''} = ${factor}`,
    factor: `${factor}`,
  };
}

/** The second route to a weight in words: the automorphism group, its order factor by factor, and generators. */
export function automorphismsText(
  diagram: Diagram,
  named: NamedTheory,
  legTypes: readonly number[],
): WorkingDTO['automorphisms'] {
  const found = automorphisms(diagram, named.theory, legTypes);
  const swapped = found.bundles.filter(({ swappable }) => swappable).values();
  const vertexStep: WorkingStep = {
    text:
      found.vertexOrder === 1n
        ? 'No permutation of the vertices but the identity keeps legs, kinds and lines.'
        : `${found.vertexOrder} permutations of the vertices keep legs, kinds and lines.`,
    latex: `${found.vertexOrder}`,
    factor: `${found.vertexOrder}`,
  };
  const bundles = found.bundles.filter(({ factor }) => factor > 1n);
  return {
    order: `${found.order}`,
    generators: found.generators.map((generator) =>
      generatorText(generator, generator.kind === 'ends' ? swapped.next().value : undefined),
    ),
    steps: [
      ...(diagram.kinds.length > 0 ? [vertexStep] : []),
      ...bundles.map((bundle) => bundleStep(bundle, named.halves[bundle.type]!.field)),
    ],
  };
}

import { factorial } from '../exact/combinatorics.ts';
import { binomial } from '../exact/seriesIndex.ts';
import type { Diagram } from '../graph/diagram.ts';
import type { Theory } from '../graph/theory.ts';
import { contentOf, exchanges } from './pairings.ts';
import { type Placements, placements } from './placements.ts';

/** One step of counting the contractions of a diagram, with the number of ways it leaves. */
export type ContractionStep =
  | ({ readonly is: 'places'; readonly ways: bigint } & Placements)
  | { readonly is: 'leg'; readonly leg: number; readonly vertex: number; readonly type: number; readonly ways: bigint }
  | { readonly is: 'legs'; readonly leg: number; readonly other: number; readonly ways: bigint }
  | {
      readonly is: 'lines';
      readonly from: number;
      readonly to: number;
      readonly type: number;
      readonly count: number;
      /** Choices of half-lines at `from`, at `to`, and ways to join the chosen. */
      readonly parts: readonly [bigint, bigint, bigint];
      readonly ways: bigint;
    }
  | {
      readonly is: 'self';
      readonly vertex: number;
      readonly type: number;
      readonly count: number;
      /** Choices of half-lines, and ways to join the chosen. */
      readonly parts: readonly [bigint, bigint];
      readonly ways: bigint;
    };

export interface ContractionCount {
  readonly steps: readonly ContractionStep[];
  /** The product of the ways of all steps: contractions in the class. */
  readonly total: bigint;
  /** ∏ n_kind! · ∏ k_field!: contractions per unit of weight. */
  readonly divisor: bigint;
}

/** (2l − 1)!!: ways to join 2l half-lines of one real field. */
function doubleFactorial(l: number): bigint {
  let value = 1n;
  for (let k = 2 * l - 1; k > 1; k -= 2) value *= BigInt(k);
  return value;
}

/** The half-lines of each vertex that no step has used yet. */
class Free {
  readonly #left: number[][];

  constructor(
    { kinds }: Diagram,
    private readonly theory: Theory,
  ) {
    this.#left = kinds.map((kind) => [...theory.kinds[kind]!]);
  }

  /** Ways to choose n free half-lines of a type at a vertex, which are then used. */
  choose(vertex: number, type: number, n: number): bigint {
    const ways = binomial(this.#left[vertex]![type]!, n);
    this.#left[vertex]![type]! -= n;
    return ways;
  }

  self(vertex: number, type: number, count: number): ContractionStep {
    const partner = this.theory.partner[type]!;
    const real = partner === type;
    const chosen = real
      ? this.choose(vertex, type, 2 * count)
      : this.choose(vertex, type, count) * this.choose(vertex, partner, count);
    const joined = real ? doubleFactorial(count) : factorial(count);
    return { is: 'self', vertex, type, count, parts: [chosen, joined], ways: chosen * joined };
  }

  lines(from: number, to: number, type: number, count: number): ContractionStep {
    const parts = [
      this.choose(from, this.theory.partner[type]!, count),
      this.choose(to, type, count),
      factorial(count),
    ] as const;
    return { is: 'lines', from, to, type, count, parts, ways: parts[0] * parts[1] * parts[2] };
  }
}

function legSteps({ legs }: Diagram, legTypes: readonly number[], theory: Theory, free: Free): ContractionStep[] {
  const steps: ContractionStep[] = [];
  legs.forEach((vertex, leg) => {
    const type = theory.partner[legTypes[leg]!]!;
    if (vertex >= 0) steps.push({ is: 'leg', leg, vertex, type, ways: free.choose(vertex, type, 1) });
    else if (-1 - vertex > leg) steps.push({ is: 'legs', leg, other: -1 - vertex, ways: 1n });
  });
  return steps;
}

/**
 * Counts the contractions of one diagram step by step, as one does on paper: put the labelled vertices on their places, tie
 * each leg to one of the free half-lines of its vertex, choose and join the half-lines of every bundle of lines.
 *
 * It uses neither the automorphism group nor the enumerator, so that weight = total / divisor checks both.
 * @example φ⁴ sunset with two legs: 2 · 4 · 4 · 3! = 192 of 2!·4!² = 1152, weight 1/6
 */
export function countContractions(diagram: Diagram, theory: Theory, legTypes: readonly number[]): ContractionCount {
  const free = new Free(diagram, theory);
  const steps: ContractionStep[] = [];
  const placed = placements(diagram, theory);
  if (diagram.kinds.length > 0) steps.push({ is: 'places', ways: placed.different, ...placed });
  steps.push(...legSteps(diagram, legTypes, theory, free));
  const bundles = new Map<string, number>();
  for (const { from, to, type } of diagram.lines) {
    const ends = theory.partner[type] === type && from > to ? [to, from] : [from, to];
    const key = [...ends, type].join();
    bundles.set(key, (bundles.get(key) ?? 0) + 1);
  }
  for (const [key, count] of bundles) {
    const [from, to, type] = key.split(',').map(Number) as [number, number, number];
    steps.push(from === to ? free.self(from, type, count) : free.lines(from, to, type, count));
  }
  return {
    steps,
    total: steps.reduce((product, { ways }) => product * ways, 1n),
    divisor: exchanges(theory, contentOf(diagram, theory)),
  };
}

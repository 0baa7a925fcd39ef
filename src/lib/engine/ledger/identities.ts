import { factorial } from '../exact/combinatorics.ts';
import { format, rational } from '../exact/rational.ts';
import type { Content, CountingRequest } from '../graph/theory.ts';
import { admittedContents } from './contents.ts';
import { GeneratingFunctions } from './generating.ts';
import { divisor } from './independent.ts';
import { CountingSpace } from './space.ts';
import { bareVertices } from './vertexParts.ts';

/** An equation small enough to check by hand; `holds` says that both sides, computed separately, are equal. */
export interface Identity {
  readonly left: string;
  readonly right: string;
  readonly holds: boolean;
  readonly text: string;
}

/** Contents shown, and half-lines up to which a person can follow. */
const SHOWN = 3;
const MOST_HALF_LINES = 24;
const MOST_TERMS = 6;

/**
 * The identities behind the ledger at the lowest contents of a request: how many contractions there are in all, what weight that is, and
 * how they split into connected ones and ones in several pieces. They concern Z and W with nothing dropped, whatever the request keeps.
 *
 * `kindNames` names the vertex kinds in the texts. @throws InputError infinite-order, LimitError as admittedContents does.
 * @example φ⁴ vacuum at order 2: "7·5·3·1 = 105", "105/(2!·4!·4!) = 35/384", "105 = 96 + 3·3"
 */
export function identities(request: CountingRequest, kindNames: readonly string[] = []): Identity[] {
  const space = new CountingSpace(request.theory);
  const functions = new GeneratingFunctions(space, bareVertices(space));
  const points = space.legs.id(request.theory.partner.map((_, h) => request.legs.filter((type) => type === h).length));
  return admittedContents(request)
    .filter((content) => content.some((n) => n > 0))
    .map((content) => ({ content, id: space.contents.id(content) }))
    .filter(({ id }) => space.legs.total(allHalfLines(space, id, points)) <= MOST_HALF_LINES)
    .sort((a, b) => space.contents.total(a.id) - space.contents.total(b.id))
    .slice(0, SHOWN)
    .flatMap(({ content, id }) => {
      const what = describe(request, content, kindNames);
      const pieces = decomposition(space, functions, id, points, what);
      return [matching(space, id, points, what), weight(request, functions.full(id, points), content, what), ...pieces];
    });
}

function allHalfLines(space: CountingSpace, content: number, points: number): number {
  return space.legs.add(space.legs.id(space.halfLines(content)), points);
}

/** The number of pairings, as a product of odd numbers (n! for a complex field) beside n!/(2^{n/2}(n/2)!). */
function matching(space: CountingSpace, content: number, points: number, what: string): Identity {
  const vector = space.legs.vector(allHalfLines(space, content, points));
  const factors: string[] = [];
  let closed = 1n;
  space.theory.partner.forEach((partner, h) => {
    const n = vector[h]!;
    if (partner < h || n === 0) return;
    if (partner === h) {
      const odd = Array.from({ length: n / 2 }, (_, i) => n - 1 - 2 * i);
      factors.push(odd.join('·'));
      closed *= factorial(n) / (2n ** BigInt(n / 2) * factorial(n / 2));
    } else {
      factors.push(`${n}!`);
      closed *= factorial(n);
    }
  });
  const product = space.expectation(allHalfLines(space, content, points));
  const total = vector.reduce((sum, n) => sum + n, 0);
  return {
    left: factors.join(' · '),
    right: `${closed}`,
    holds: product === closed,
    text: `${what}: ways to join the ${total} half-lines in pairs.`,
  };
}

function weight(request: CountingRequest, pairings: bigint, content: Content, what: string): Identity {
  const factors = content.flatMap((n, k) => {
    if (n === 0) return [];
    const vertex = request.theory.kinds[k]!.filter((valence) => valence > 1).map((valence) => `${valence}!`);
    return [...(n > 1 ? [`${n}!`] : []), ...Array.from({ length: n }, () => vertex).flat()];
  });
  const written = factors.reduce((product, text) => product * factorial(Number.parseInt(text, 10)), 1n);
  return {
    left: factors.length > 0 ? `${pairings}/(${factors.join('·')})` : `${pairings}`,
    right: format(rational(pairings, written)),
    holds: written === divisor(request, content),
    text: `${what}: all contractions, over the exchanges of equal vertices and of equal half-lines at a vertex.`,
  };
}

/** All contractions by the piece that holds the first external point (or the first vertex): connected with everything, or with a part. */
function decomposition(
  space: CountingSpace,
  functions: GeneratingFunctions,
  content: number,
  points: number,
  what: string,
): Identity[] {
  const { contents, legs } = space;
  const rootedByPoint = points !== legs.zero;
  const outer = rootedByPoint ? contents.splits(content) : contents.rooted(content);
  const terms: string[] = [];
  let total = 0n;
  for (let i = outer.left.length - 1; i >= 0; i--) {
    const inner = rootedByPoint
      ? space.rootedLegSplits(points, outer.left[i]!)
      : space.legSplits(points, outer.left[i]!);
    for (let j = inner.left.length - 1; j >= 0; j--) {
      const ways = outer.ways[i]! * inner.ways[j]!;
      const piece = functions.connected(outer.left[i]!, inner.left[j]!);
      const others = functions.full(outer.right[i]!, inner.right[j]!);
      if (piece === 0n || others === 0n) continue;
      total += ways * piece * others;
      const shown = [ways, piece, others].filter((factor) => factor !== 1n);
      terms.push(shown.length > 0 ? shown.join('·') : '1');
    }
  }
  const all = functions.full(content, points);
  if (terms.length < 2 || terms.length > MOST_TERMS) return [];
  const root = rootedByPoint ? 'first external point' : 'first vertex';
  return [
    {
      left: `${all}`,
      right: terms.join(' + '),
      holds: total === all,
      text: `${what}: contractions by the connected piece that holds the ${root}; each term is choices · piece · the rest.`,
    },
  ];
}

function describe(request: CountingRequest, content: Content, names: readonly string[]): string {
  const vertices = content.flatMap((n, k) => {
    if (n === 0) return [];
    const name = names[k] ?? (content.length === 1 ? '' : `kind ${k + 1}`);
    return [`${n} ${n === 1 ? 'vertex' : 'vertices'}${name === '' ? '' : ` ${name}`}`];
  });
  const legs = request.legs.length;
  return `${vertices.join(', ')}${legs > 0 ? ` and ${legs} external ${legs === 1 ? 'point' : 'points'}` : ''}`;
}

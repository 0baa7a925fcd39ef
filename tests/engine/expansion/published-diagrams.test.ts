import { describe, expect, it } from 'vitest';
import { rational } from '#engine/exact/rational.ts';
import { countContractions } from '#engine/expansion/contractions.ts';
import { expandRequest } from '#engine/expansion/expand.ts';
import { automorphisms } from '#engine/graph/automorphisms.ts';
import { canonicalLabel } from '#engine/graph/canonical.ts';
import type { Diagram } from '#engine/graph/diagram.ts';
import { facts } from '#engine/graph/facts.ts';
import type { Theory } from '#engine/graph/theory.ts';
import other from '../../reference/diagrams_other.json' with { type: 'json' };
import phi3 from '../../reference/diagrams_phi3.json' with { type: 'json' };
import phi4 from '../../reference/diagrams_phi4.json' with { type: 'json' };
import rules from '../../reference/feynman_rules.json' with { type: 'json' };

/**
 * Diagrams by edge list with their factors: tests/reference/diagrams_*.json (each file's "source": two independent programs, nauty, and
 * the tables of H. Kleinert, A. Pelster, B. Kastening, M. Bachmann, Phys. Rev. E 62 (2000) 1537).
 */
interface Entry {
  readonly edges: readonly (readonly (number | string)[])[];
  readonly S: number;
  readonly vertices?: number;
  readonly loops?: number;
  readonly wick_contractions?: number;
  readonly wick_contractions_all_labelings?: number;
  readonly distinct_leg_labelings?: number;
  readonly one_particle_irreducible?: boolean;
  readonly self_contraction?: boolean;
  readonly bridge_to_vacuum_part?: boolean;
  readonly 'tadpole (vacuum part on one vertex)'?: boolean;
  readonly cut_vertex_or_self_loop?: boolean;
}

interface Read {
  readonly diagram: Diagram;
  readonly theory: Theory;
  readonly legs: number[];
}

/** One real field; the kinds are the valences that occur, ascending. */
function read({ edges }: Entry, valences?: number[]): Read {
  const ends = edges.filter(([a]) => typeof a === 'string') as [string, number][];
  const lines = edges.filter(([a]) => typeof a === 'number') as [number, number][];
  const count = Math.max(...edges.flat().filter((end) => typeof end === 'number'));
  const degree = new Array<number>(count).fill(0);
  for (const end of [...lines.flat(), ...ends.map(([, v]) => v)]) degree[end - 1]!++;
  const kinds = valences ?? [...new Set(degree)].sort((a, b) => a - b);
  ends.sort(([a], [b]) => Number(a.slice(1)) - Number(b.slice(1)));
  return {
    theory: { partner: [0], kinds: kinds.map((k) => [k]) },
    legs: ends.map(() => 0),
    diagram: {
      kinds: degree.map((k) => kinds.indexOf(k)),
      legs: ends.map(([, v]) => v - 1),
      lines: lines.map(([a, b]) => ({ from: Math.min(a, b) - 1, to: Math.max(a, b) - 1, type: 0 })),
    },
  };
}

const lists = Object.entries({ phi4, phi3, other }).flatMap(([file, content]) =>
  Object.entries(content).flatMap(([name, value]): [string, Entry[]][] =>
    Array.isArray(value) && typeof value[0] === 'object' ? [[`${file}: ${name}`, value as unknown as Entry[]]] : [],
  ),
);

describe('every listed diagram', () => {
  it('reads the lists', () => expect(lists.length).toBeGreaterThanOrEqual(15));
  it.each(lists)('%s', (_, entries) => {
    for (const entry of entries) {
      const { diagram, theory, legs } = read(entry);
      const S = automorphisms(diagram, theory, legs).order;
      expect([entry.edges, S]).toEqual([entry.edges, BigInt(entry.S)]);
      const { total, divisor } = countContractions(diagram, theory, legs);
      expect(rational(total, divisor)).toEqual(rational(1n, S));
      if (entry.wick_contractions !== undefined) expect(total).toBe(BigInt(entry.wick_contractions));
      if (entry.wick_contractions_all_labelings !== undefined)
        expect(total * BigInt(entry.distinct_leg_labelings!)).toBe(BigInt(entry.wick_contractions_all_labelings));
      const found = facts(diagram);
      if (entry.loops !== undefined) expect(found.loops).toBe(entry.loops);
      if (entry.one_particle_irreducible !== undefined) expect(found.onePI).toBe(entry.one_particle_irreducible);
      if (entry.self_contraction !== undefined) expect(found.hasSelfContraction).toBe(entry.self_contraction);
      if (legs.length > 0 && entry.bridge_to_vacuum_part !== undefined)
        expect([entry.edges, found.hasTadpole]).toEqual([entry.edges, entry.bridge_to_vacuum_part]);
      const hanging = entry['tadpole (vacuum part on one vertex)'];
      if (hanging !== undefined) expect([entry.edges, found.isScaleless]).toEqual([entry.edges, hanging]);
    }
  });
});

describe('whole lists against the expansion', () => {
  it.each(lists.filter(([name]) => /labelled$|vacuum_connected$/.test(name) && !/unlabelled/.test(name)))(
    '%s: the same diagrams, each once',
    (_, entries) => {
      const valences = [...new Set(entries.flatMap((entry) => read(entry).theory.kinds.map(([k]) => k!)))].sort(
        (a, b) => a - b,
      );
      const byContent = new Map<string, Set<string>>();
      let legs: number[] = [];
      let theory: Theory = { partner: [0], kinds: [] };
      for (const entry of entries) {
        const one = read(entry, valences);
        ({ legs, theory } = one);
        const content = valences.map((_, kind) => one.diagram.kinds.filter((k) => k === kind).length).join();
        const label = canonicalLabel(one.diagram, theory, legs).bare;
        byContent.set(content, (byContent.get(content) ?? new Set()).add(label));
      }
      expect([...byContent.values()].reduce((sum, { size }) => sum + size, 0)).toBe(entries.length);
      for (const [content, labels] of byContent) {
        const counts = content.split(',').map(Number);
        const order = {
          by: 'powers',
          weights: counts.map((__, k) => counts.map((___, c) => rational(k === c ? 1 : 0))),
          bound: counts.map((n) => rational(n)),
          through: false,
        } as const;
        const ours = [...expandRequest({ theory, legs, order, keep: 'connected', drop: [] })];
        expect(new Set(ours.map((diagram) => canonicalLabel(diagram, theory, legs).bare))).toEqual(labels);
        expect(ours.length).toBe(labels.size);
      }
    },
  );
});

/** M. Peskin, D. Schroeder (1995) p. 93 and M. Srednicki (2007), as listed in tests/reference/feynman_rules.json. */
describe('textbook factors', () => {
  it.each(rules.symmetry_factor_examples.map((entry): [string, Entry] => [entry.name, entry]))('%s', (_, entry) => {
    const { diagram, theory, legs } = read(entry);
    expect(automorphisms(diagram, theory, legs).order).toBe(BigInt(entry.S));
  });
});

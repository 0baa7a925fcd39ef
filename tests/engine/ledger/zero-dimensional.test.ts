import { describe, expect, it } from 'vitest';
import type { Drop, Keep } from '#engine/graph/theory.ts';
import reference from '../../reference/zero_dim.json' with { type: 'json' };
import { oneField, weightOf } from './requests.ts';

/**
 * Exact zero-dimensional series: tests/reference/zero_dim.json (source and status stand with each entry: direct evaluation of Gaussian
 * moments; Cvitanović, Lautrup, Pearson, Phys. Rev. D 18 (1978) 1939; Borinsky, arXiv:1703.00840).
 */
interface Series {
  readonly legs: number;
  readonly keep: Keep;
}

/** Which sum a column of the reference file holds; the others there are functions of these. */
function column(name: string): Series | null {
  const match =
    /^(Z_all_vacuum|logZ_connected_vacuum|M(\d)_|G(\d)_full|C(\d)_connected|Gamma(\d)_1PI_sum|Sigma_1PI_2pt|Gamma4_1PI =)/.exec(
      name,
    );
  if (!match) return null;
  const digit = match.slice(2).find((text) => text !== undefined);
  if (name.startsWith('Z_')) return { legs: 0, keep: 'all' };
  if (name.startsWith('logZ')) return { legs: 0, keep: 'connected' };
  if (name.startsWith('Sigma')) return { legs: 2, keep: '1PI' };
  if (name.startsWith('Gamma')) return { legs: Number(digit ?? 4), keep: '1PI' };
  return {
    legs: Number(digit),
    keep: name.startsWith('M') ? 'all' : name.startsWith('G') ? 'normalised' : 'connected',
  };
}

/** log Z has no constant; the reference writes 1 or 0 by convention, the contract says none. */
const cases = reference.entries.flatMap((entry) => {
  const single = /^phi\^(\d)( without self-contractions)?$/.exec(entry.theory);
  if (!single) return [];
  const drop: Drop[] = single[2] ? ['self-contractions'] : [];
  return Object.entries(entry).flatMap(([name, values]) => {
    const series = column(name);
    return series && Array.isArray(values)
      ? [{ theory: entry.theory, name, valence: Number(single[1]), drop, values, ...series }]
      : [];
  });
});

describe('series of one coupling', () => {
  it('finds the columns of all seven theories', () => {
    expect(new Set(cases.map((c) => c.theory)).size).toBe(7);
    expect(cases.length).toBeGreaterThan(80);
  });
  it.each(cases)('$theory: $name', ({ valence, legs, keep, drop, values }) => {
    const got = values.map((_, n) => weightOf(oneField([valence], [n], legs, keep, drop)));
    expect(got).toEqual(values);
  });
});

describe('φ³ without tadpoles', () => {
  const entry = reference.entries.find((e) => e.theory.startsWith('phi^3 without tadpoles'))! as unknown as Record<
    string,
    string[]
  >;
  it.each([
    ['logZ_at_j = sum over 1PI (bridgeless) connected vacuum diagrams', 0],
    ['C2_connected_tadpole_free', 2],
    ['C3_connected_tadpole_free', 3],
    ['C4_connected_tadpole_free', 4],
    ['C5_connected_tadpole_free', 5],
  ] as const)('%s', (name, legs) => {
    const values = entry[name]!;
    expect(values.map((_, n) => weightOf(oneField([3], [n], legs, 'connected', ['tadpoles'])))).toEqual(values);
  });
  it('the source that makes ⟨φ⟩ vanish is minus the 1PI one-point sum', () => {
    const source = entry['j(g)']!.map((value) => (value === '0' ? '0' : value.replace(/^-/, '')));
    expect(source.map((_, n) => weightOf(oneField([3], [n], 1, '1PI')))).toEqual(source);
  });
});

describe('φ³ + φ⁴', () => {
  const entry = reference.entries.find((e) => e.theory === 'phi^3 + phi^4')! as unknown as Record<
    string,
    Record<string, string>
  >;
  const columns: [string, number, Keep][] = [
    ['Z_all_vacuum', 0, 'all'],
    ['logZ_connected_vacuum', 0, 'connected'],
    ...[1, 2, 3, 4].map((n): [string, number, Keep] => [`C${n}_connected`, n, 'connected']),
    ...[1, 2, 3, 4].map((n): [string, number, Keep] => [`Gamma${n}_1PI_sum (a+2b<=6)`, n, '1PI']),
  ];
  it.each(columns)('%s', (name, legs, keep) => {
    const power = (text: string, coupling: string): number =>
      Number(new RegExp(`${coupling}\\^(\\d+)`).exec(text)?.[1] ?? 0);
    const values = entry[name]!;
    const got = Object.fromEntries(
      Object.keys(values).map((key) => [
        key,
        weightOf(oneField([3, 4], [power(key, 'g3'), power(key, 'g4')], legs, keep)),
      ]),
    );
    expect(got).toEqual(values);
  });
});

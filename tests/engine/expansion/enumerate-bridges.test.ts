import { describe, expect, it } from 'vitest';
import { enumerateContent } from '#engine/expansion/enumerate.ts';
import type { CountedDiagram } from '#engine/graph/diagram.ts';
import { facts } from '#engine/graph/facts.ts';
import type { Theory } from '#engine/graph/theory.ts';
import counts from '../../reference/counts.json' with { type: 'json' };
import { real } from '../ledger/requests.ts';
import { smallCases } from '../ledger/smallCases.ts';

const text = ({ kinds, legs, lines, symmetryFactor }: CountedDiagram): string =>
  `${kinds}|${legs}|${lines.map(({ from, to, type }) => `${from}-${to}.${type}`)}|${symmetryFactor}`;

const larger: [string, Theory, number[], number[]][] = [
  ['φ³ two-point', real(3), [0, 0], [6]],
  ['φ³ vacuum', real(3), [], [8]],
  ['φ + φ³ + φ⁴', real(1, 3, 4), [0, 0], [2, 4, 2]],
  ['φ⁴ four-point', real(4), [0, 0, 0, 0], [4]],
  ['φ⁵ + φ² three-point', real(2, 5), [0, 0, 0], [2, 3]],
];

describe('without bridges: the same list as by leaving them out afterwards', () => {
  it.each([...smallCases, ...larger])('%s', (_, theory, legs, content) => {
    const all = [...enumerateContent(theory, legs, content, { components: 'connected' })];
    const kept = all.filter((diagram) => diagram.kinds.length === 0 || facts(diagram).onePI);
    const early = [...enumerateContent(theory, legs, content, { components: 'connected', noBridges: true })];
    expect(early.map(text)).toEqual(kept.map(text));
  });

  /** 1PI φ³ vacuum diagrams by loops: tests/reference/counts.json. */
  it('φ³ vacuum by loop order', () => {
    const { vacuum } = counts.phi3_1PI_by_loop_order;
    for (const [loops, number] of Object.entries(vacuum)) {
      const content = [2 * (Number(loops) - 1)];
      const list = [...enumerateContent(real(3), [], content, { components: 'connected', noBridges: true })];
      expect([loops, list.length]).toEqual([loops, number]);
    }
  });
});

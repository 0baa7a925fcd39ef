import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { DiagramRow, Plate } from '#contract/api.ts';
import { memberQuery } from '#features/canvas/api.ts';
import { arrange, neighbour, type OpenPlate } from '#features/canvas/arrange.ts';
import { legNumbers } from '#features/canvas/nodes.tsx';
import { sorted } from '#features/canvas/sort.ts';

const row = (position: number, change: Partial<DiagramRow> = {}): DiagramRow => ({
  id: `w1.${position}`,
  bare: '',
  vertices: [],
  legs: [],
  lines: [],
  order: {},
  loops: 1,
  symmetryFactor: '1',
  weight: '1',
  pairings: '1',
  connected: true,
  onePI: true,
  hasSelfContraction: false,
  hasTadpole: false,
  shape: '',
  position,
  drawing: { width: 100, height: 60, paths: [], dots: '', labels: [] },
  description: '',
  ...change,
});
const plate = (key: string, first: number, count = 1): Plate => ({
  key,
  title: key,
  titleLatex: key,
  count,
  first,
  weight: '1',
});
/** Plates with these numbers of diagrams, numbered through. */
function sheets(counts: readonly number[]): OpenPlate[] {
  let next = 1;
  return counts.map((count, at) => {
    const first = next;
    next += count;
    return {
      plate: plate(String(at), first, count),
      rows: Array.from({ length: count }, (_, i) => row(first + i)),
    };
  });
}

describe('plates of a whole list', () => {
  it('hold every diagram of their coupling powers, whatever vertices those come from', () => {
    // In an O(2) quartic all of h⁴, h²s², s⁴ carry λ.
    const rows = [
      row(1, { order: { lambda: '2', rho: '1' }, vertices: [{ id: 1, kind: 'h h h h' }] }),
      row(2, { order: { rho: '1', lambda: '2' }, vertices: [{ id: 1, kind: 'h h s s' }] }),
      row(3, { order: { rho: '3' }, vertices: [{ id: 1, kind: 'h h s s' }] }),
    ];
    const groups = sorted('couplings', [plate('a', 1), plate('b', 3)], rows);
    expect(groups.get('a')!.map(({ position }) => position)).toEqual([1, 2]);
    expect(groups.get('b')!.map(({ position }) => position)).toEqual([3]);
  });

  it.each([
    ['loops', { loops: 2 }],
    ['factor', { symmetryFactor: '12' }],
    ['shape', { shape: 'x' }],
  ] as const)('are told apart by %s', (by, change) => {
    const groups = sorted(by, [plate('a', 1), plate('b', 2)], [row(1), row(2, change), row(3)]);
    expect([...groups.values()].map((members) => members.map(({ position }) => position))).toEqual([[1, 3], [2]]);
  });

  it('are empty while their first member has not come', () => {
    expect(sorted('loops', [plate('2', 9)], [row(1)]).get('2')).toEqual([]);
  });

  it('are asked from the server by their key', () => {
    expect(memberQuery('couplings', '2,1')).toEqual({ order: '2,1' });
    expect(memberQuery('factor', '6')).toEqual({ factor: '6' });
  });
});

describe('laying plates out', () => {
  const counts = fc.array(fc.integer({ min: 0, max: 40 }), { minLength: 1, maxLength: 30 });

  it('keeps plates apart, and every diagram in a cell of its own inside its plate', () => {
    fc.assert(
      fc.property(counts, (numbers) => {
        const { plates, cell } = arrange(sheets(numbers));
        for (const [at, one] of plates.entries()) {
          for (const other of plates.slice(at + 1)) {
            const apart =
              one.x + one.width <= other.x ||
              other.x + other.width <= one.x ||
              one.y + one.height <= other.y ||
              other.y + other.height <= one.y;
            expect(apart).toBe(true);
          }
          expect(new Set(one.cells.map(({ x, y }) => `${x} ${y}`)).size).toBe(one.rows.length);
          for (const { x, y } of one.cells) {
            expect(x + cell.width).toBeLessThanOrEqual(one.width);
            expect(y + cell.height).toBeLessThanOrEqual(one.height);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  it('gives every diagram the room of the largest drawing', () => {
    const [small] = sheets([3]);
    const large = { plate: plate('large', 9), rows: [row(9, { drawing: { ...row(9).drawing, width: 400 } })] };
    expect(arrange([small!, large]).cell.width).toBeGreaterThanOrEqual(400);
  });

  it('numbers plates as books do', () => {
    expect(arrange(sheets([1, 1, 1, 1])).plates.map(({ title }) => title)).toEqual([
      'Plate I',
      'Plate II',
      'Plate III',
      'Plate IV',
    ]);
    expect(arrange(sheets(Array(90).fill(1))).plates.at(-1)!.title).toBe('No. 90');
  });
});

describe('numbers of legs', () => {
  const labels = (...texts: string[]) =>
    row(1, {
      legs: texts.map((_, at) => ({ id: at + 1, field: 'h', vertex: 1 })),
      drawing: {
        ...row(1).drawing,
        labels: texts.map((text, at) => ({ x: 20 + at, y: 10, text, anchor: at === 0 ? 'end' : 'start' })),
      },
    });

  it('stand each at its own leg, left of it on the left side', () => {
    expect(legNumbers(labels('h₁', 'φ*₂'))).toEqual({ text: '12', x: '13 21', y: '10 10' });
  });

  it('are left out without legs, and where one character is not enough', () => {
    expect(legNumbers(labels())).toBeNull();
    expect(legNumbers(labels(...Array(10).fill('h₁')))).toBeNull();
    expect(legNumbers(labels('h'))).toBeNull();
  });
});

describe('arrow keys', () => {
  const sheet = arrange(sheets([12, 5]));

  it('go to the next diagram and back', () => {
    expect(neighbour(sheet, 1, 'right')).toBe(2);
    expect(neighbour(sheet, 2, 'left')).toBe(1);
    const below = neighbour(sheet, 1, 'down');
    expect(below).toBeGreaterThan(1);
    expect(neighbour(sheet, below, 'up')).toBe(1);
  });

  it('stay where nothing lies further', () => {
    expect(neighbour(sheet, 1, 'left')).toBe(1);
    expect(neighbour(sheet, 1, 'up')).toBe(1);
    expect(neighbour(arrange([]), 7, 'right')).toBe(7);
  });
});

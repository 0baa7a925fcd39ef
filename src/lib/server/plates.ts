import type { GroupBy, Plate } from '#contract/api.ts';
import type { StoredDiagram } from '#contract/job.ts';
import type { DiagramDTO } from '#contract/result.ts';
import { add, format, type Rational, rational, ZERO } from '#engine/exact/rational.ts';
import { type Prepared, renderDiagram } from './engine.ts';
import { runtime } from './runtime.ts';

const COLUMN: Record<GroupBy, string> = {
  couplings: 'order_key',
  loops: 'loops',
  factor: 'symmetry_factor',
  shape: 'shape',
};

interface Part {
  key: string | number;
  symmetryFactor: string;
  count: number;
  first: number;
}

interface Group {
  key: string;
  count: number;
  first: number;
  weight: Rational;
}

/** Counts per (group, factor): the sum of weights of a group is Σ count/S, exactly. */
function partsOf(bodyId: number, by: GroupBy): Part[] {
  const column = COLUMN[by];
  const sql = `SELECT ${column} AS key, symmetry_factor AS symmetryFactor, count(*) AS count, min(position) AS first
    FROM diagrams WHERE body_id = ? GROUP BY ${column}, symmetry_factor`;
  return runtime().db.$client.prepare<[number], Part>(sql).all(bodyId);
}

function groupsOf(parts: readonly Part[]): Group[] {
  const groups = new Map<string, Group>();
  for (const part of parts) {
    const key = String(part.key);
    const group = groups.get(key) ?? { key, count: 0, first: part.first, weight: ZERO };
    group.count += part.count;
    group.first = Math.min(group.first, part.first);
    group.weight = add(group.weight, rational(part.count, BigInt(part.symmetryFactor)));
    groups.set(key, group);
  }
  return [...groups.values()].sort((a, b) => a.first - b.first);
}

function firstDiagram(prepared: Prepared, bodyId: number, position: number): DiagramDTO {
  const sql = `SELECT position, label, body, loops, symmetry_factor AS symmetryFactor, weight, pairings,
    order_key AS "order", shape, flags FROM diagrams WHERE body_id = ? AND position = ?`;
  return renderDiagram(
    prepared,
    runtime().db.$client.prepare<[number, number], StoredDiagram>(sql).get(bodyId, position)!,
  );
}

const LOOPS = ['Tree diagrams', 'One loop', 'Two loops', 'Three loops', 'Four loops', 'Five loops', 'Six loops'];

/** Titles of a group: plain words, and LaTeX where it is mathematics. */
function titleOf(prepared: Prepared, bodyId: number, by: GroupBy, group: Group): { title: string; titleLatex: string } {
  if (by === 'loops') {
    const title = LOOPS[Number(group.key)] ?? `${group.key} loops`;
    return { title, titleLatex: `L = ${group.key}` };
  }
  if (by === 'factor') return { title: `S = ${group.key}`, titleLatex: `S = ${group.key}` };
  const diagram = firstDiagram(prepared, bodyId, group.first);
  if (by === 'shape') return { title: `Shape of no. ${group.first}`, titleLatex: `\\text{no. }${group.first}` };
  const powers = Object.entries(diagram.order);
  if (powers.length === 0) return { title: 'No coupling', titleLatex: '1' };
  const latexOf = (name: string) => prepared.names.couplingLatex(name);
  return {
    title: powers.map(([name, power]) => (power === '1' ? name : `${name}^${power}`)).join(' '),
    titleLatex: powers
      .map(([name, power]) => (power === '1' ? latexOf(name) : `${latexOf(name)}^{${power}}`))
      .join('\\,'),
  };
}

/** The groups of a stored list. One pass over an index; costs O(rows), a few milliseconds for thousands. */
export function platesOf(prepared: Prepared, bodyId: number, by: GroupBy): Plate[] {
  return groupsOf(partsOf(bodyId, by)).map((group) => ({
    key: group.key,
    ...titleOf(prepared, bodyId, by, group),
    count: group.count,
    first: group.first,
    weight: format(group.weight),
  }));
}

import type { GroupBy, Plate } from '#contract/api.ts';
import type { DiagramDTO } from '#contract/result.ts';
import { add, format, type Rational, rational, ZERO } from '#engine/exact/rational.ts';
import { type Prepared, renderDiagram } from '#engine/index.ts';
import { rowAt } from './diagram-rows.ts';
import { runtime } from './runtime.ts';

/** Grouping by shape can give nearly as many groups as there are diagrams: nobody looks at more than these. */
const MOST = 500;
const KEPT = 100;

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

interface Body {
  id: number;
  state: string;
}

/** Groups of complete bodies: they never change, and counting a large one takes a fraction of a second. */
const cache = new Map<string, { groups: Group[]; total: number }>();

/** Counts per (group, factor): the sum of weights of a group is Σ count/S, exactly. */
function partsOf(bodyId: number, by: GroupBy): Part[] {
  const column = COLUMN[by];
  const sql = `SELECT ${column} AS key, symmetry_factor AS symmetryFactor, count(*) AS count, min(position) AS first
    FROM diagrams WHERE body_id = ? GROUP BY ${column}, symmetry_factor`;
  return runtime().db.$client.prepare<[number], Part>(sql).all(bodyId);
}

function collect(parts: readonly Part[]): Group[] {
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

function groupsOf(body: Body, by: GroupBy): { groups: Group[]; total: number } {
  const key = `${body.id} ${by}`;
  const known = cache.get(key);
  if (known) return known;
  const all = collect(partsOf(body.id, by));
  const answer = { groups: all.slice(0, MOST), total: all.length };
  if (body.state !== 'complete') return answer;
  cache.set(key, answer);
  if (cache.size > KEPT) cache.delete(cache.keys().next().value!);
  return answer;
}

function firstDiagram(prepared: Prepared, bodyId: number, position: number): DiagramDTO {
  return renderDiagram(prepared, rowAt(bodyId, position)!);
}

const LOOPS = ['Tree diagrams', 'One loop', 'Two loops', 'Three loops', 'Four loops', 'Five loops', 'Six loops'];

/** Titles of a group: plain words, and LaTeX where it is mathematics. */
function titleOf(
  prepared: Prepared,
  bodyId: number,
  by: GroupBy,
  { key, first }: Group,
): { title: string; titleLatex: string } {
  if (by === 'loops') return { title: LOOPS[Number(key)] ?? `${key} loops`, titleLatex: `L = ${key}` };
  if (by === 'factor') return { title: `S = ${key}`, titleLatex: `S = ${key}` };
  if (by === 'shape') return { title: `Shape of no. ${first}`, titleLatex: `\\text{Shape of no. }${first}` };
  const powers = Object.entries(firstDiagram(prepared, bodyId, first).order);
  if (powers.length === 0) return { title: 'No coupling', titleLatex: '1' };
  const latexOf = (name: string) => prepared.model.parameters.find((one) => one.name === name)?.latex ?? name;
  return {
    title: powers.map(([name, power]) => (power === '1' ? name : `${name}^${power}`)).join(' '),
    titleLatex: powers
      .map(([name, power]) => (power === '1' ? latexOf(name) : `${latexOf(name)}^{${power}}`))
      .join('\\,'),
  };
}

/** The groups of a stored list, the first 500, and how many there are. One pass over the rows: O(rows), then from memory. */
export function platesOf(prepared: Prepared, body: Body, by: GroupBy): { items: Plate[]; total: number } {
  const { groups, total } = groupsOf(body, by);
  const items = groups.map((group) => ({
    key: group.key,
    ...titleOf(prepared, body.id, by, group),
    count: group.count,
    first: group.first,
    weight: format(group.weight),
  }));
  return { items, total };
}

import { z } from 'zod';
import type { StoredDiagram } from '#contract/job.ts';
import { FLAGS } from '#engine/index.ts';
import { readCursor } from './cursor.ts';
import { Refusal } from './refusal.ts';

/** Orders of a diagram list. Every sort ends in the position, so pages neither repeat nor skip a row. */
export const SORTS = ['position', '-position', 'loops', '-loops', 'factor', '-factor', 'shape', '-shape'] as const;
export type Sort = (typeof SORTS)[number];

const yesNo = z.enum(['true', 'false']).transform((value) => value === 'true');

/** The query string of a diagram list, checked. Unknown keys are errors. */
export const diagramQuerySchema = z.strictObject({
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(500).default(100),
  sort: z.enum(SORTS).default('position'),
  find: z.string().max(200).optional(),
  loops: z.coerce.number().int().min(0).max(100).optional(),
  factor: z
    .string()
    .regex(/^\d{1,60}$/)
    .optional(),
  /** Name-free key of a vertex content or shape, as plates give it. */
  order: z.string().max(400).optional(),
  shape: z.string().max(400).optional(),
  connected: yesNo.optional(),
  onePI: yesNo.optional(),
  selfContraction: yesNo.optional(),
  tadpole: yesNo.optional(),
});
export type DiagramQuery = z.output<typeof diagramQuerySchema>;
export type DiagramFilter = Partial<z.input<typeof diagramQuerySchema>>;

export interface Clause {
  sql: string;
  values: (string | number)[];
}

/** One part of a sort key: an SQL expression, its kind, and its value in a row. */
interface Key {
  sql: string;
  number: boolean;
  of(row: StoredDiagram): string | number;
}

const POSITION: Key = { sql: 'position', number: true, of: (row) => row.position };
const KEYS: Record<string, Key[]> = {
  position: [],
  loops: [{ sql: 'loops', number: true, of: (row) => row.loops }],
  // Factors of any size are text: the longer one is the larger.
  factor: [
    { sql: 'length(symmetry_factor)', number: true, of: (row) => row.symmetryFactor.length },
    { sql: 'symmetry_factor', number: false, of: (row) => row.symmetryFactor },
  ],
  shape: [{ sql: 'shape', number: false, of: (row) => row.shape }],
};

export interface SortPlan {
  /** The position comes last, so the order is total. */
  keys: Key[];
  descending: boolean;
  keyOf(row: StoredDiagram): (string | number)[];
}

export function sortPlan(sort: Sort): SortPlan {
  const keys = [...KEYS[sort.replace('-', '')]!, POSITION];
  return { keys, descending: sort.startsWith('-'), keyOf: (row) => keys.map((key) => key.of(row)) };
}

/** The condition that a row stands beyond the last one seen. @throws Refusal when the cursor belongs to another sort. */
export function beyondClause({ keys, descending }: SortPlan, after: string | undefined): Clause[] {
  const seen = readCursor(after ?? null);
  if (!seen) return [];
  const values = seen.map((part, at) => (keys[at]?.number ? Number(part) : part));
  if (seen.length !== keys.length || values.some((value) => Number.isNaN(value)))
    throw new Refusal('bad-request', 'The value of "after" belongs to another sort.');
  const left = keys.map(({ sql }) => sql).join(', ');
  return [{ sql: `(${left}) ${descending ? '<' : '>'} (${keys.map(() => '?').join(', ')})`, values }];
}

const FLAG_OF = {
  connected: FLAGS.connected,
  onePI: FLAGS.onePI,
  selfContraction: FLAGS.selfContraction,
  tadpole: FLAGS.tadpole,
} as const;

const flag = (bit: number, on: boolean): Clause => ({ sql: `(flags & ${bit}) ${on ? '!=' : '='} 0`, values: [] });
const equal = (column: string, value: string | number): Clause => ({ sql: `${column} = ?`, values: [value] });

/** The conditions of a query other than its place in the list. */
export function conditionsOf(query: DiagramQuery): Clause[] {
  const clauses: Clause[] = [];
  if (query.loops !== undefined) clauses.push(equal('loops', query.loops));
  if (query.factor !== undefined) clauses.push(equal('symmetry_factor', query.factor));
  if (query.order !== undefined) clauses.push(equal('order_key', query.order));
  if (query.shape !== undefined) clauses.push(equal('shape', query.shape));
  for (const [name, bit] of Object.entries(FLAG_OF)) {
    const wanted = query[name as keyof typeof FLAG_OF];
    if (wanted !== undefined) clauses.push(flag(bit, wanted));
  }
  return [...clauses, ...findClauses(query.find ?? '')];
}

const NUMBER_WORDS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight'];
const FIND_FLAGS: [RegExp, Clause][] = [
  [/\b(not|non)[- ]?1pi\b/i, flag(FLAGS.onePI, false)],
  [/\b1pi\b/i, flag(FLAGS.onePI, true)],
  [/\bdisconnected\b/i, flag(FLAGS.connected, false)],
  [/\bconnected\b/i, flag(FLAGS.connected, true)],
  [/\bno tadpoles?\b/i, flag(FLAGS.tadpole, false)],
  [/\btadpoles?\b/i, flag(FLAGS.tadpole, true)],
  [/\bno self-contractions?\b/i, flag(FLAGS.selfContraction, false)],
  [/\bself-contractions?\b/i, flag(FLAGS.selfContraction, true)],
];

/**
 * What the find box understands, in any combination: "#12" (a position), "1/6" (a weight), "S=6" (a factor),
 * "two loops", "1PI", "not 1PI", "tadpole", "no tadpole", "self-contraction", "connected", "disconnected";
 * every other word must stand in the label.
 */
function findClauses(find: string): Clause[] {
  let rest = find.trim();
  const clauses: Clause[] = [];
  const take = (pattern: RegExp, clauseOf: (match: RegExpExecArray) => Clause) => {
    const match = pattern.exec(rest);
    if (!match) return;
    clauses.push(clauseOf(match));
    rest = `${rest.slice(0, match.index)} ${rest.slice(match.index + match[0].length)}`;
  };
  for (const [pattern, clause] of FIND_FLAGS) take(pattern, () => clause);
  take(/(?:^|\s)#?(\d{1,7})(?=\s|$)/, (match) => equal('position', Number(match[1])));
  take(/(?:^|\s)(1\/\d{1,60})(?=\s|$)/, (match) => equal('weight', match[1]!));
  take(/\bS\s*=\s*(\d{1,60})/, (match) => equal('symmetry_factor', match[1]!));
  take(/\b(\d{1,2}|no|one|two|three|four|five|six|seven|eight)[- ]loops?\b/i, (match) => {
    const word = match[1]!.toLowerCase();
    return equal('loops', NUMBER_WORDS.includes(word) ? NUMBER_WORDS.indexOf(word) : Number(word));
  });
  const words = rest.split(/\s+/).filter(Boolean);
  if (words.length > 8) throw new Refusal('bad-request', 'Find takes at most eight words.');
  return [...clauses, ...words.map((word) => ({ sql: 'instr(label, ?) > 0', values: [word] }))];
}

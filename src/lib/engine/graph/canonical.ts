import { digest } from '../exact/sha256.ts';
import type { Diagram } from './diagram.ts';
import { codesOf, type Joins, joinsOf } from './matrix.ts';
import { label } from './search.ts';
import type { Theory } from './theory.ts';

/** Ways to number interchangeable fields and kinds that are tried; beyond it ties are left in the order given. */
const MOST_NUMBERINGS = 5040;
const PREFIX = 'w1';

/** Which theory type and kind stands at each nameless index: one entry for each numbering that gives the least certificate. */
export interface Numbering {
  /** One type for each field, in canonical order (for a complex field the smaller, φ). */
  readonly fields: readonly number[];
  readonly kinds: readonly number[];
}

export interface CanonicalLabel {
  /** The diagram with the names of fields and couplings forgotten: version prefix and 130 bits of SHA-256 of its least certificate. */
  readonly bare: string;
  /** vertices[p]: the vertex at canonical place p, in the first numbering. */
  readonly vertices: readonly number[];
  readonly numberings: readonly Numbering[];
}

/** Names of a theory: one for each half-line type (the field's), one coupling for each kind. */
export interface TheoryNames {
  readonly fields: readonly string[];
  readonly couplings: readonly string[];
}

function permutations<T>(items: readonly T[]): T[][] {
  if (items.length < 2) return [[...items]];
  return items.flatMap((item, at) =>
    permutations([...items.slice(0, at), ...items.slice(at + 1)]).map((rest) => [item, ...rest]),
  );
}

/** All orders of items that keep ascending keys: ties in every order, unless there are too many of them. */
function orders<T>(items: readonly T[], key: (item: T) => string): T[][] {
  const groups = new Map<string, T[]>();
  for (const item of items) groups.set(key(item), [...(groups.get(key(item)) ?? []), item]);
  const sorted = [...groups.keys()].sort().map((name) => groups.get(name)!);
  const count = sorted.reduce((product, group) => group.reduce((p, _, i) => p * (i + 1), product), 1);
  if (count > MOST_NUMBERINGS) return [sorted.flat()];
  return sorted.reduce<T[][]>(
    (lists, group) => lists.flatMap((list) => permutations(group).map((order) => [...list, ...order])),
    [[]],
  );
}

/** What is seen of a field without names: real or complex, its legs, how its lines meet vertices of which valence. */
function fieldKey(
  type: number,
  { n, external, joins }: Joins,
  diagram: Diagram,
  theory: Theory,
  legTypes: readonly number[],
  unlabelled: boolean,
): string {
  const partner = theory.partner[type]!;
  const legs = legTypes
    .map((leg, at) => (leg === type ? `${unlabelled ? '' : at}+` : leg === partner ? `${unlabelled ? '' : at}-` : ''))
    .join();
  const meets = diagram.kinds.map((kind, v) => {
    const counts = theory.kinds[kind]!;
    const own = joins[(external + v) * n + external + v]!;
    return `${counts[type]}.${counts[partner]}.${counts.reduce((a, b) => a + b, 0)}.${own[type]}`;
  });
  return `${partner === type ? 'r' : 'c'}|${legs}|${meets.sort().join()}`;
}

function usedFields(diagram: Diagram, theory: Theory, legTypes: readonly number[]): number[] {
  const used = new Set<number>();
  const use = (type: number): void => {
    used.add(Math.min(type, theory.partner[type]!));
  };
  for (const type of legTypes) use(type);
  for (const kind of diagram.kinds)
    theory.kinds[kind]!.forEach((count, type) => {
      if (count > 0) use(type);
    });
  return [...used].sort((a, b) => a - b);
}

interface Certified {
  readonly text: string;
  readonly vertices: readonly number[];
}

/** The certificate under one numbering of fields and kinds. */
function certify(
  diagram: Diagram,
  joins: Joins,
  theory: Theory,
  legCells: number[][],
  numbering: Numbering,
): Certified {
  const types = numbering.fields.flatMap((type) =>
    theory.partner[type] === type ? [type] : [type, theory.partner[type]!],
  );
  const { code, dictionary } = codesOf(joins, types);
  const kindCells = numbering.kinds.map((kind) =>
    diagram.kinds.flatMap((k, v) => (k === kind ? [joins.external + v] : [])),
  );
  const found = label(joins.n, code, [...legCells, ...kindCells]);
  const shape = types.map((type) => (theory.partner[type] === type ? 'r' : 'c')).join('');
  const cells = [...legCells, ...kindCells].map((cell) => cell.length).join();
  return {
    text: `${shape}/${legCells.length}/${cells}/${dictionary}/${found.certificate.join()}`,
    vertices: found.order.filter((node) => node >= joins.external).map((node) => node - joins.external),
  };
}

function least(
  diagram: Diagram,
  theory: Theory,
  legTypes: readonly number[],
  unlabelled: boolean,
): { best: Certified; numberings: Numbering[] } {
  const joins = joinsOf(diagram, theory, legTypes);
  const key = (type: number): string => fieldKey(type, joins, diagram, theory, legTypes, unlabelled);
  let best: Certified | null = null;
  let numberings: Numbering[] = [];
  for (const fields of orders(usedFields(diagram, theory, legTypes), key)) {
    const types = fields.flatMap((type) => [type, theory.partner[type]!]);
    const kindKey = (kind: number): string =>
      `${types.map((type) => theory.kinds[kind]![type]).join()}|${diagram.kinds.filter((k) => k === kind).length}`;
    const legCells = unlabelled
      ? [...new Set(types)]
          .map((type) => legTypes.flatMap((leg, at) => (leg === type ? [at] : [])))
          .filter((cell) => cell.length > 0)
      : legTypes.map((_, at) => [at]);
    for (const kinds of orders([...new Set(diagram.kinds)], kindKey)) {
      const certified = certify(diagram, joins, theory, legCells, { fields, kinds });
      if (best !== null && certified.text > best.text) continue;
      if (best === null || certified.text < best.text) {
        best = certified;
        numberings = [];
      }
      numberings.push({ fields, kinds });
    }
  }
  return { best: best!, numberings };
}

/**
 * The canonical label of a diagram with the names of fields and couplings forgotten: equal exactly for diagrams that are
 * the same up to numbering of vertices, order of lines and renaming. External points are labelled by position, the
 * direction of a complex line counts.
 *
 * Legs' types are part of the diagram: `legTypes[k]` is the half-line type of external point k.
 * One labelling search for each way to number interchangeable fields and kinds (usually one).
 */
export function canonicalLabel(diagram: Diagram, theory: Theory, legTypes: readonly number[]): CanonicalLabel {
  const { best, numberings } = least(diagram, theory, legTypes, false);
  return { bare: PREFIX + digest(best.text, 26), vertices: best.vertices, numberings };
}

/** The least name table of all numberings that give the same certificate. */
function nameTable(numberings: readonly Numbering[], names: TheoryNames): string {
  const tables = numberings.map(({ fields, kinds }) =>
    JSON.stringify([fields.map((type) => names.fields[type]), kinds.map((kind) => names.couplings[kind])]),
  );
  return tables.sort()[0]!;
}

const ascii = (text: string): string => text.replace(/[^\x20-\x7e]/g, (c) => `\\u${c.charCodeAt(0).toString(16)}`);

/** Label and names: the same diagram of the same fields and couplings has the same id in every expansion of any model. */
export function diagramId(canonical: Pick<CanonicalLabel, 'bare' | 'numberings'>, names: TheoryNames): string {
  return `${canonical.bare}-${digest(ascii(nameTable(canonical.numberings, names)), 10)}`;
}

/** As `diagramId`, for the diagram up to exchange of external legs of one field: its shape. */
export function shapeId(diagram: Diagram, theory: Theory, legTypes: readonly number[], names: TheoryNames): string {
  const { best, numberings } = least(diagram, theory, legTypes, true);
  return `s${digest(best.text + ascii(nameTable(numberings, names)), 20)}`;
}

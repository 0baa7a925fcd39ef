import { InputError, LimitError } from '../errors.ts';
import type { Diagram, Line } from '../graph/diagram.ts';
import { readName } from '../lagrangian/names.ts';

/** One diagram made elsewhere, as the contract writes it. */
export interface DiagramInput {
  readonly lines: readonly (readonly [number, number])[];
  readonly legs: readonly number[];
  readonly fields?: { readonly lines: readonly string[]; readonly legs: readonly string[] } | undefined;
  readonly kinds?: readonly string[] | undefined;
}

/** A field operator on a line or leg. */
export interface Operator {
  readonly field: string;
  readonly conjugate: boolean;
}

/** A diagram with its fields read: vertices from 0, fields of lines and legs by name. */
export interface GivenDiagram {
  readonly vertices: number;
  readonly lines: readonly { readonly from: number; readonly to: number; readonly field: string }[];
  readonly legs: readonly { readonly vertex: number; readonly operator: Operator }[];
}

const MOST_VERTICES = 24;
const FIELD = 'phi';

function refuse(message: string): never {
  throw new InputError('bad-request', message);
}

function operator(text: string, where: string): Operator {
  const name = readName(text);
  if (!name) refuse(`${where}: "${text.slice(0, 40)}" is not the name of a field.`);
  return name;
}

function checkVertices({ lines, legs, kinds }: DiagramInput): number {
  const used = new Set([...lines.flat(), ...legs]);
  const vertices = Math.max(0, ...used);
  if (vertices > MOST_VERTICES)
    throw new LimitError(
      `A diagram may have at most ${MOST_VERTICES} vertices; this one has ${vertices}.`,
      MOST_VERTICES,
      vertices,
    );
  for (let v = 1; v <= vertices; v++)
    if (!used.has(v))
      refuse(`Vertex ${v} has neither a line nor a leg; vertices are numbered 1 to ${vertices} without gaps.`);
  if (kinds && kinds.length !== vertices)
    refuse(`"kinds" names ${kinds.length} vertices; the diagram has ${vertices}.`);
  return vertices;
}

/** Reads the numbers and field names of a diagram; without "fields" every line and leg is of one real field, phi. */
export function readDiagram(input: DiagramInput): GivenDiagram {
  const vertices = checkVertices(input);
  const { lines, legs, fields } = input;
  if (fields && fields.lines.length !== lines.length)
    refuse(`"fields.lines" has ${fields.lines.length} entries for ${lines.length} lines.`);
  if (fields && fields.legs.length !== legs.length)
    refuse(`"fields.legs" has ${fields.legs.length} entries for ${legs.length} legs.`);
  return {
    vertices,
    lines: lines.map(([from, to], at) => {
      const { field, conjugate } = operator(fields?.lines[at] ?? FIELD, `Line ${at + 1}`);
      if (conjugate)
        refuse(
          `Line ${at + 1}: a line is named by its field without conjugation; it runs from its ${field}^* end to its ${field} end.`,
        );
      return { from: from - 1, to: to - 1, field };
    }),
    legs: legs.map((vertex, at) => ({
      vertex: vertex - 1,
      operator: operator(fields?.legs[at] ?? FIELD, `Leg ${at + 1}`),
    })),
  };
}

/** Half-line types of a set of fields: the type of φ, and of φ* (the same for a real field). */
export interface HalfTypes {
  readonly partner: readonly number[];
  readonly of: (field: string, conjugate: boolean) => number;
}

/** Half-lines of each type at each vertex. A leg φ ends on a φ* half-line; a line runs from its φ* end to its φ end. */
export function valences({ vertices, lines, legs }: GivenDiagram, { partner, of }: HalfTypes): number[][] {
  const rows = Array.from({ length: vertices }, () => partner.map(() => 0));
  for (const { from, to, field } of lines) {
    rows[from]![of(field, true)]!++;
    rows[to]![of(field, false)]!++;
  }
  for (const { vertex, operator: leg } of legs) rows[vertex]![partner[of(leg.field, leg.conjugate)]!]!++;
  return rows;
}

/** The diagram in integers, lines in the order given (those of a real field from the smaller vertex). */
export function toDiagram(
  { lines, legs }: GivenDiagram,
  { partner, of }: HalfTypes,
  kinds: readonly number[],
): Diagram {
  return {
    kinds,
    legs: legs.map(({ vertex }) => vertex),
    lines: lines.map(({ from, to, field }): Line => {
      const type = of(field, false);
      const real = partner[type] === type;
      return real && from > to ? { from: to, to: from, type } : { from, to, type };
    }),
  };
}

import { InputError } from '../errors.ts';
import { format, ONE, rational } from '../exact/rational.ts';
import { exchanges } from '../expansion/pairings.ts';
import { automorphisms } from '../graph/automorphisms.ts';
import { canonicalLabel, shapeId } from '../graph/canonical.ts';
import { facts } from '../graph/facts.ts';
import type { ModelSource, StructuredTerm } from '../lagrangian/input.ts';
import type { FieldFactor, Model } from '../lagrangian/model.ts';
import { readName } from '../lagrangian/names.ts';
import { readModel } from '../lagrangian/read.ts';
import { factsFlags } from './compact.ts';
import {
  type DiagramInput,
  type GivenDiagram,
  type HalfTypes,
  readDiagram,
  toDiagram,
  valences,
} from './givenDiagram.ts';
import { namedDiagram, namesOf } from './render.ts';
import { fieldsText, type NamedHalf, type NamedTheory, theoryOf } from './theory.ts';
import type { DiagramAnswer } from './types.ts';
import { working } from './working.ts';

/** The contract's request for one diagram; `model` is a Lagrangian text or a list of terms. */
export interface DiagramQuestion extends DiagramInput {
  readonly lagrangian?: string | undefined;
  readonly model?: string | { readonly terms: readonly StructuredTerm[] } | undefined;
  readonly conventions?: ModelSource['conventions'];
  readonly with: readonly 'integral'[];
}

function modelOf({ lagrangian, model, conventions }: DiagramQuestion): Model | null {
  if (lagrangian !== undefined && model !== undefined)
    throw new InputError('bad-request', 'Give either "lagrangian" or "model", not both.');
  const text = typeof model === 'string' ? model : lagrangian;
  if (text !== undefined) return readModel({ lagrangian: text, conventions });
  return typeof model === 'object' ? readModel({ model, conventions }) : null;
}

interface Placed {
  readonly named: NamedTheory;
  readonly kinds: readonly number[];
  readonly types: HalfTypes;
}

/** Field factors of a row of half-line counts. */
const fieldsOf = (row: readonly number[], halves: readonly NamedHalf[]): FieldFactor[] =>
  row.flatMap((n, type) =>
    Array.from({ length: n }, () => ({ field: halves[type]!.field, conjugate: halves[type]!.conjugate })),
  );

function typesOf(named: Pick<NamedTheory, 'halves'>, partner: readonly number[]): HalfTypes {
  return {
    partner,
    of: (field, conjugate) => {
      const type = named.halves.findIndex((half) => half.field === field && !half.conjugate);
      if (type < 0) throw new InputError('unknown-name', `The field ${field} is not a field of the model.`);
      return conjugate ? partner[type]! : type;
    },
  };
}

/** Which kind of the model each vertex is: by its fields, and by "kinds" where several kinds share them. */
function inModel(given: GivenDiagram, model: Model, wanted: readonly string[] | undefined): Placed {
  const named = theoryOf(model);
  const types = typesOf(named, named.theory.partner);
  const kinds = valences(given, types).map((row, v) => {
    const fields = fieldsText(fieldsOf(row, named.halves));
    const matching = named.theory.kinds.flatMap((kind, at) => (kind.join() === row.join() ? [at] : []));
    const name = wanted?.[v];
    const chosen = name === undefined ? matching : matching.filter((at) => isCalled(named.kinds[at]!, name));
    if (chosen.length === 1) return chosen[0]!;
    const known = matching.map((at) => named.kinds[at]!.name).join(', ');
    if (matching.length === 0)
      throw new InputError(
        'bad-request',
        `Vertex ${v + 1} joins ${fields}: the model has no such vertex; it has ${named.kinds.map(({ index }) => fieldsText(model.kinds[index]!.fields)).join(', ') || 'none'}.`,
      );
    throw new InputError(
      'bad-request',
      name === undefined || chosen.length > 1
        ? `Vertex ${v + 1} joins ${fields}, which ${matching.length} kinds of vertex do: say which in "kinds" (${known}).`
        : `Vertex ${v + 1} is called "${name.slice(0, 40)}" in "kinds"; vertices with its fields are ${known}.`,
    );
  });
  return { named, kinds, types };
}

/** A kind by its full name or its coupling, in any spelling of the coupling's name. */
function isCalled(kind: NamedTheory['kinds'][number], name: string): boolean {
  return kind.name === name || kind.coupling === name || kind.coupling === readName(name)?.field;
}

/** Without a model: fields as they occur (complex where a leg is conjugate), vertices told apart by fields and by "kinds". */
function withoutModel(given: GivenDiagram, wanted: readonly string[] | undefined): Placed {
  const conjugated = new Set(given.legs.flatMap(({ operator }) => (operator.conjugate ? [operator.field] : [])));
  const fields = [
    ...new Set([...given.lines.map(({ field }) => field), ...given.legs.map(({ operator }) => operator.field)]),
  ].sort();
  const halves: NamedHalf[] = [];
  const partner: number[] = [];
  for (const field of fields) {
    const at = halves.length;
    halves.push({ text: field, field, conjugate: false, latex: field });
    if (!conjugated.has(field)) partner.push(at);
    else {
      partner.push(at + 1, at);
      halves.push({ text: `${field}^*`, field, conjugate: true, latex: `${field}^{*}` });
    }
  }
  const types = typesOf({ halves }, partner);
  const rows = valences(given, types);
  const names = rows.map((row, v) => wanted?.[v] ?? fieldsText(fieldsOf(row, halves)));
  const distinct = new Map<string, number[]>();
  names.forEach((name, v) => {
    const row = distinct.get(name) ?? rows[v]!;
    if (row.join() !== rows[v]!.join())
      throw new InputError(
        'bad-request',
        `Vertices called "${name.slice(0, 40)}" in "kinds" do not all have the same fields.`,
      );
    distinct.set(name, row);
  });
  const order = [...distinct.keys()].sort();
  const named: NamedTheory = {
    theory: { partner, kinds: order.map((name) => distinct.get(name)!) },
    halves,
    kinds: order.map((name, index) => ({
      name,
      coupling: name,
      couplingLatex: name.replaceAll(' ', '\\,'),
      weights: new Map([[name, ONE]]),
      loops: 0,
      index,
    })),
    couplings: order,
  };
  return { named, kinds: names.map((name) => order.indexOf(name)), types };
}

/**
 * One diagram made elsewhere: its label, factor and facts as in an expansion, with the working. Lines stay in the order given.
 *
 * @throws InputError for vertices or fields that do not fit the model; LimitError beyond 24 vertices.
 */
export function answerDiagram(question: DiagramQuestion): DiagramAnswer {
  if (question.with.length > 0)
    throw new InputError('unsupported', 'Integrals are not computed yet: leave "with" out or empty.');
  const given = readDiagram(question);
  const model = modelOf(question);
  const { named, kinds, types } = model ? inModel(given, model, question.kinds) : withoutModel(given, question.kinds);
  const diagram = toDiagram(given, types, kinds);
  const legTypes = given.legs.map(({ operator }) => types.of(operator.field, operator.conjugate));
  const legNames = legTypes.map((type) => named.halves[type]!.text);
  const { bare, numberings } = canonicalLabel(diagram, named.theory, legTypes);
  const { order } = automorphisms(diagram, named.theory, legTypes);
  const content = named.kinds.map((_, at) => kinds.filter((kind) => kind === at).length);
  const found = facts(diagram);
  return {
    ...namedDiagram(
      named,
      legNames,
      { ...diagram, numberings },
      {
        label: bare,
        loops: found.loops,
        symmetryFactor: `${order}`,
        weight: format(rational(1n, order)),
        pairings: `${exchanges(named.theory, content) / order}`,
        shape: shapeId(diagram, named.theory, legTypes, namesOf(named)),
        flags: factsFlags(found),
      },
    ),
    working: working({ diagram, named, legTypes, legNames, model }),
  };
}

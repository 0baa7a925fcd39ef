import { describe } from '../expansion/describe.ts';
import { diagramId, type Numbering, type TheoryNames } from '../graph/canonical.ts';
import type { Diagram } from '../graph/diagram.ts';
import { type CompactDiagram, FLAGS, unpackBody } from './compact.ts';
import { type LedgerBody, namedLedger } from './ledger.ts';
import type { Prepared } from './prepare.ts';
import type { RunEnd, SummaryBody } from './run.ts';
import { type NamedTheory, orderOf } from './theory.ts';
import type { DiagramDTO, ExpansionResult, LedgerDTO, RulesDTO, Summary } from './types.ts';
import { ENGINE } from './version.ts';

const has = (flags: number, flag: number): boolean => (flags & flag) !== 0;

/** Vertex content of a diagram: how many vertices of each kind. */
function contentOf(diagram: Diagram, kinds: number): number[] {
  const content = new Array<number>(kinds).fill(0);
  for (const kind of diagram.kinds) content[kind]!++;
  return content;
}

/** The names that an id is made of: fields and coupling monomials. */
export const namesOf = (named: NamedTheory): TheoryNames => ({
  fields: named.halves.map(({ field }) => field),
  couplings: named.kinds.map(({ coupling }) => coupling),
});

/** Legs, vertices and lines with names: vertices and legs are numbered from 1. */
function namedParts(named: NamedTheory, legNames: readonly string[], diagram: Diagram) {
  return {
    vertices: diagram.kinds.map((kind, at) => ({ id: at + 1, kind: named.kinds[kind]!.name })),
    legs: diagram.legs.map((at, leg) => ({
      id: leg + 1,
      field: legNames[leg]!,
      vertex: at >= 0 ? at + 1 : null,
      ...(at >= 0 ? {} : { joinedTo: -at }),
    })),
    lines: diagram.lines.map(({ from, to, type }) => ({
      from: from + 1,
      to: to + 1,
      field: named.halves[type]!.field,
    })),
  };
}

/** Everything of a diagram that names are needed for, beside what was stored. */
export function namedDiagram(
  named: NamedTheory,
  legNames: readonly string[],
  diagram: Diagram & { readonly numberings: readonly Numbering[] },
  stored: Omit<CompactDiagram, 'position' | 'body' | 'order' | 'picture'>,
): DiagramDTO {
  return {
    id: diagramId({ bare: stored.label, numberings: diagram.numberings }, namesOf(named)),
    bare: stored.label,
    ...namedParts(named, legNames, diagram),
    order: orderOf(named, contentOf(diagram, named.kinds.length)),
    loops: stored.loops,
    symmetryFactor: stored.symmetryFactor,
    weight: stored.weight,
    pairings: stored.pairings,
    connected: has(stored.flags, FLAGS.connected),
    onePI: has(stored.flags, FLAGS.onePI),
    hasSelfContraction: has(stored.flags, FLAGS.selfContraction),
    hasTadpole: has(stored.flags, FLAGS.tadpole),
    shape: stored.shape,
  };
}

/** A stored diagram in the words of the request's model. */
export const renderDiagram = (prepared: Prepared, compact: CompactDiagram): DiagramDTO =>
  namedDiagram(prepared.names, prepared.names.legs, unpackBody(compact.body), compact);

export const renderLedger = (prepared: Prepared, body: LedgerBody): LedgerDTO =>
  namedLedger(prepared.names, prepared.canonical.request, body);

export const renderSummary = ({ names }: Prepared, body: SummaryBody): Summary => ({
  ...body,
  excluded: [...new Set(body.excluded.map((kind) => names.kinds[kind]!.name))].sort(),
});

/** The result without its diagrams: what `--summary` prints and a stored expansion shows first. */
export const expansionHead = (prepared: Prepared, end: RunEnd): Omit<ExpansionResult, 'diagrams'> => ({
  summary: renderSummary(prepared, end.summary),
  ledger: renderLedger(prepared, end.ledger),
  rules: prepared.rules,
  conventions: prepared.conventions,
  engine: ENGINE,
});

/** "two vertices joined by three lines, …": the picture in words, in the model's names. */
export const describeDiagram = ({ names }: Prepared, compact: CompactDiagram): string =>
  describe(unpackBody(compact.body), names.theory, { halves: names.halves.map(({ text }) => text), legs: names.legs });

/** Rules of the propagators and vertices that occur in a diagram. */
export function rulesUsed(prepared: Prepared, compact: CompactDiagram): RulesDTO {
  const { kinds, lines } = unpackBody(compact.body);
  const { names, rules } = prepared;
  const used = new Set(kinds.map((kind) => names.kinds[kind]!.index));
  const fields = new Set(lines.map(({ type }) => names.halves[type]!.field));
  return {
    propagators: rules.propagators.filter(({ field }) => fields.has(field)),
    vertices: rules.vertices.filter((_, index) => used.has(index)),
  };
}

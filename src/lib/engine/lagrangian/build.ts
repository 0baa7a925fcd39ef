import { InputError } from '../errors.ts';
import { BOUNDS } from './bounds.ts';
import { canonical } from './canonical.ts';
import { conjugateTermsMissing } from './conjugates.ts';
import { NO_SETTING, type Settings } from './input.ts';
import { kindsOf, parameterBase } from './kinds.ts';
import type { Field, Model, Note, Parameter, Propagator, Span, Term } from './model.ts';
import { conjugateMonomial, type Monomial, monomialKey } from './monomial.ts';
import type { NormalForm } from './normal.ts';
import { diagonalField, propagatorOf } from './propagating.ts';
import type { Source } from './source.ts';
import { nameLatex } from './symbols.ts';

/** What is known about the names of a Lagrangian before its terms are sorted. */
export interface Declared {
  readonly fields: ReadonlySet<string>;
  readonly complex: ReadonlySet<string>;
  readonly first: ReadonlyMap<string, Span>;
}

const NOWHERE: Span = { start: 0, end: 0 };
const asMonomial = ({ number, parameters, factors, derivatives }: Term): Monomial => ({
  number,
  powers: [...parameters],
  factors,
  pairs: derivatives,
  open: [],
});

/** Builds the model from its terms: propagators, kinds, parameters and their roles, with every refusal that the terms call for. */
export class ModelBuilder {
  private readonly fields: ReadonlyMap<string, Field>;

  constructor(
    private readonly source: Source,
    private readonly declared: Declared,
    private readonly settings: Settings,
    private readonly form: NormalForm,
  ) {
    const names = [...declared.fields].sort();
    this.fields = new Map(
      names.map((name) => [
        name,
        { name, latex: nameLatex(name), kind: declared.complex.has(name) ? 'complex' : 'real' },
      ]),
    );
  }

  build(notes: readonly Note[]): Model {
    const diagonal = new Map<string, Term[]>([...this.fields.keys()].map((name) => [name, []]));
    const interaction: Term[] = [];
    const mixing: Term[] = [];
    for (const term of this.form.terms) {
      const field = diagonalField(term, this.fields);
      if (field && !this.isInsertion(term)) diagonal.get(field.name)!.push(term);
      else interaction.push(term);
      if (!field && term.factors.length === 2 && !this.isInsertion(term)) mixing.push(term);
    }
    this.refuseMissingKinetic(diagonal);
    this.refuseNonHermitian();
    const { conventions } = this.settings;
    const propagators = [...this.fields.values()].map((field) =>
      propagatorOf(this.source, field, diagonal.get(field.name)!, conventions),
    );
    const loops = new Map([...this.settings.parameters].map(([name, { loops }]) => [name, loops]));
    const kinds = kindsOf(interaction, loops);
    const parameters = this.parameters(interaction, propagators);
    const all = [...notes, ...this.form.notes, ...mixing.map((term) => mixingNote(term))];
    return { fields: [...this.fields.values()], parameters, propagators, kinds, conventions, notes: all };
  }

  /** A quadratic term is a two-point vertex if one of its parameters is marked so or carries a loop order. */
  private isInsertion(term: Term): boolean {
    return [...term.parameters.keys()].some((name) => {
      const { vertex, loops } = this.settings.parameters.get(parameterBase(name)) ?? NO_SETTING;
      return vertex || loops > 0;
    });
  }

  private refuseMissingKinetic(diagonal: ReadonlyMap<string, readonly Term[]>): void {
    for (const [name, terms] of diagonal) {
      if (terms.some(({ derivatives }) => derivatives.length > 0)) continue;
      const kinetic = this.declared.complex.has(name) ? `(d ${name}^*)(d ${name})` : `1/2 (d ${name})^2`;
      const span = this.declared.first.get(name);
      const message = `${name} has no kinetic term such as ${kinetic}, so it has no propagator; every field needs one.`;
      throw span ? this.source.fault('no-kinetic-term', message, span) : new InputError('no-kinetic-term', message);
    }
  }

  private refuseNonHermitian(): void {
    const [missing] = conjugateTermsMissing(this.form.terms.map(asMonomial), this.declared.complex);
    if (!missing) return;
    const key = monomialKey(canonical(conjugateMonomial(missing, this.declared.complex)));
    const culprit = this.form.terms.find((term) => monomialKey(canonical(asMonomial(term))) === key);
    const span = culprit?.span ?? NOWHERE;
    const piece = culprit?.span ? `"${this.source.quote(culprit.span)}"` : 'One term';
    throw this.source.fault(
      'not-hermitian',
      `The Lagrangian is not hermitian: ${piece} stands without its conjugate. Add it, or write "+ h.c.".`,
      span,
    );
  }

  private parameters(interaction: readonly Term[], propagators: readonly Propagator[]): Parameter[] {
    const namesOf = (terms: readonly Term[]): Set<string> =>
      new Set(terms.flatMap(({ parameters }) => [...parameters.keys()].map(parameterBase)));
    const couplings = namesOf(interaction);
    const inert = namesOf(propagators.flatMap(({ terms }) => terms));
    const names = [...new Set([...couplings, ...inert])].sort();
    this.checkNames(names);
    return names.map((name) => {
      const { weight, loops, vertex } = this.settings.parameters.get(name) ?? NO_SETTING;
      const role = !couplings.has(name) ? 'propagator' : inert.has(name) ? 'both' : 'coupling';
      return { name, latex: nameLatex(name), complex: this.declared.complex.has(name), weight, loops, vertex, role };
    });
  }

  private checkNames(names: readonly string[]): void {
    const spanOf = (name: string): Span => this.declared.first.get(name) ?? NOWHERE;
    const reserved = names.find((name) => name === 'total' || name === 'loops');
    if (reserved)
      throw this.source.fault(
        'unsupported',
        `"${reserved}" cannot name a parameter: it is a word of the order of an expansion.`,
        spanOf(reserved),
      );
    if (names.length > BOUNDS.parameters)
      throw this.source.limit(
        `The Lagrangian has ${names.length} parameters; at most ${BOUNDS.parameters} are read.`,
        BOUNDS.parameters,
        names.length,
        spanOf(names[BOUNDS.parameters]!),
      );
    if (this.fields.size > BOUNDS.fields)
      throw this.source.limit(
        `The Lagrangian has ${this.fields.size} fields; at most ${BOUNDS.fields} are read.`,
        BOUNDS.fields,
        this.fields.size,
        spanOf([...this.fields.keys()][BOUNDS.fields]!),
      );
    for (const name of this.settings.parameters.keys())
      if (!names.includes(name) && !this.declared.first.has(name))
        throw new InputError(
          'unknown-name',
          `The parameter table names "${name}", which does not stand in the Lagrangian.`,
        );
  }
}

function mixingNote(term: Term): Note {
  const names = [...new Set(term.factors.map(({ field }) => field))].join(' and ');
  return {
    code: 'mixing',
    message: `A quadratic term mixes ${names}; it is treated as a two-point vertex.`,
    span: term.span,
  };
}

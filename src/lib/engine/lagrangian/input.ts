import { InputError } from '../errors.ts';
import { parse as parseRational, type Rational } from '../exact/rational.ts';
import type { Conventions, Signature } from './model.ts';
import { readName } from './names.ts';
import { readDimension } from './spacetime.ts';

export type Table<T> = Readonly<Record<string, T>> | ReadonlyMap<string, T>;

export interface FieldChoice {
  readonly kind?: 'real' | 'complex' | undefined;
  readonly multiplet?: string | number | undefined;
}

export interface ParameterChoice {
  readonly kind?: 'real' | 'complex' | undefined;
  readonly weight?: string | number | undefined;
  readonly loops?: number | undefined;
  readonly vertex?: boolean | undefined;
}

export interface StructuredTerm {
  readonly coefficient: string;
  readonly fields: readonly string[];
  /** Contracted derivative pairs of 1-based positions in `fields`; [i, i] is a d'Alembertian. */
  readonly derivatives?: readonly (readonly [number, number])[] | undefined;
}

/** A model as it is given: a text or a list of terms, and what inference must be overruled in. */
export interface ModelSource {
  readonly lagrangian?: string | undefined;
  readonly model?: { readonly terms: readonly StructuredTerm[] } | undefined;
  readonly fields?: Table<FieldChoice> | undefined;
  readonly parameters?: Table<ParameterChoice> | undefined;
  readonly mixing?: 'vertex' | 'diagonalise' | undefined;
  readonly conventions?: { readonly signature: Signature; readonly dimension: string } | undefined;
}

/** What the user set for one parameter. */
export interface ParameterSetting {
  readonly complex: boolean | null;
  readonly weight: Rational | null;
  readonly loops: number;
  readonly vertex: boolean;
}

export const NO_SETTING: ParameterSetting = { complex: null, weight: null, loops: 0, vertex: false };

/** The tables of a model with canonical names. */
export interface Settings {
  readonly fields: ReadonlyMap<string, 'real' | 'complex' | null>;
  readonly parameters: ReadonlyMap<string, ParameterSetting>;
  readonly conventions: Conventions;
  readonly diagonalise: boolean;
}

const entries = <T>(table: Table<T> | undefined): [string, T][] => {
  if (table === undefined) return [];
  return table instanceof Map ? [...table.entries()] : Object.entries(table as Readonly<Record<string, T>>);
};

function nameOf(text: string, what: string): string {
  const name = readName(text);
  if (!name || name.conjugate)
    throw new InputError('unknown-name', `The ${what} table names "${text.slice(0, 40)}", which is not a name.`);
  return name.field;
}

function weightOf(name: string, weight: string | number | undefined): Rational | null {
  if (weight === undefined) return null;
  try {
    return parseRational(String(weight));
  } catch {
    throw new InputError('bad-request', `The weight of ${name} must be an exact number such as 2 or "1/2".`);
  }
}

function setting(name: string, choice: ParameterChoice): ParameterSetting {
  const loops = choice.loops ?? 0;
  if (!Number.isInteger(loops) || loops < 0 || loops > 20)
    throw new InputError('bad-request', `The loop order of ${name} must be a whole number from 0 to 20.`);
  return {
    complex: choice.kind === undefined ? null : choice.kind === 'complex',
    weight: weightOf(name, choice.weight),
    loops,
    vertex: choice.vertex ?? false,
  };
}

/** Reads the tables and conventions. @throws InputError for names that are none, multiplets, weights and dimensions that cannot be. */
export function readSettings(input: ModelSource): Settings {
  const fields = new Map<string, 'real' | 'complex' | null>();
  for (const [text, choice] of entries(input.fields)) {
    const name = nameOf(text, 'field');
    if (choice.multiplet !== undefined && String(choice.multiplet) !== '1')
      throw new InputError(
        'unsupported',
        `${name} is declared as a multiplet. Multiplets are not read yet: write the components as fields of their own.`,
      );
    fields.set(name, choice.kind ?? null);
  }
  const parameters = new Map<string, ParameterSetting>();
  for (const [text, choice] of entries(input.parameters)) {
    const name = nameOf(text, 'parameter');
    if (fields.has(name))
      throw new InputError('bad-request', `${name} stands in both tables, as a field and as a parameter.`);
    parameters.set(name, setting(name, choice));
  }
  const conventions = input.conventions ?? { signature: '+---', dimension: '4' };
  readDimension(conventions.dimension);
  const { signature, dimension } = conventions;
  return { fields, parameters, conventions: { signature, dimension }, diagonalise: input.mixing === 'diagonalise' };
}

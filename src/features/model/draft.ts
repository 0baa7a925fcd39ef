import type { ModelInput } from '#contract/request.ts';

type Signature = ModelInput['conventions']['signature'];
export type FieldOverride = ModelInput['fields'][string];
export type ParameterOverride = ModelInput['parameters'][string];

/** What the editor holds: everything a person can change, as plain data. Changes make a new value. */
export interface Draft {
  readonly title: string;
  readonly description: string;
  readonly lagrangian: string;
  readonly signature: Signature;
  readonly dimension: string;
  readonly mixing: ModelInput['mixing'];
  /** As entries and not as an object, so that a coupling called `__proto__` is a name like any other. */
  readonly fields: readonly (readonly [string, FieldOverride])[];
  readonly parameters: readonly (readonly [string, ParameterOverride])[];
}

export const EMPTY: Draft = {
  title: '',
  description: '',
  lagrangian: '',
  signature: '+---',
  dimension: '4',
  mixing: 'vertex',
  fields: [],
  parameters: [],
};

export const signatures: readonly { readonly value: Signature; readonly label: string; readonly short: string }[] = [
  { value: '+---', label: 'Minkowski (+,−,−,−)', short: '(+,−,−,−)' },
  { value: '-+++', label: 'Minkowski (−,+,+,+)', short: '(−,+,+,+)' },
  { value: 'euclidean', label: 'Euclidean', short: 'Euclidean' },
];

/** Dimensions offered; any other number or number − number·eps may be typed. */
export const dimensions: readonly string[] = ['4', '4-2eps', '4-eps', '6', '6-2eps', '3', '3-2eps', '2', '1'];

export function draftOf(input: ModelInput, title = '', description = ''): Draft {
  return {
    title,
    description,
    lagrangian: input.lagrangian ?? '',
    signature: input.conventions.signature,
    dimension: input.conventions.dimension,
    mixing: input.mixing,
    fields: Object.entries(input.fields),
    parameters: Object.entries(input.parameters),
  };
}

/** The request that previews and stores this draft. Overrides that say nothing are left out. */
export function inputOf(draft: Draft): ModelInput {
  return {
    lagrangian: draft.lagrangian,
    fields: record(draft.fields),
    parameters: record(draft.parameters),
    mixing: draft.mixing,
    conventions: { signature: draft.signature, dimension: draft.dimension.trim() || '4' },
  };
}

function record<T extends object>(entries: readonly (readonly [string, T])[]): Record<string, T> {
  return Object.fromEntries(entries.filter(([, value]) => Object.keys(value).length > 0));
}

/** Sets or, with `undefined`, clears one property of one name's overrides. */
export function override<T extends object>(
  entries: readonly (readonly [string, T])[],
  name: string,
  change: Partial<T>,
): readonly (readonly [string, T])[] {
  const old = entries.find(([key]) => key === name)?.[1];
  const merged = Object.fromEntries(
    Object.entries({ ...old, ...change }).filter(([, value]) => value !== undefined),
  ) as T;
  const others = entries.filter(([key]) => key !== name);
  return Object.keys(merged).length === 0 ? others : [...others, [name, merged] as const];
}

export const overrideOf = <T extends object>(entries: readonly (readonly [string, T])[], name: string): T | undefined =>
  entries.find(([key]) => key === name)?.[1];

export const sameDraft = (one: Draft, other: Draft): boolean => JSON.stringify(one) === JSON.stringify(other);

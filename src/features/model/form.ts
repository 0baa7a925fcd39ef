import { type Draft, dimensions, EMPTY, type FieldOverride, type ParameterOverride, signatures } from './draft.ts';

/**
 * The draft in a submitted form (the editor without JavaScript). Names of overrides stand in the field's name:
 * `field:kind:phi`, `parameter:weight:v`, `parameter:loops:dm`, `parameter:vertex:dm`. Empty values say nothing.
 */
export function draftFromForm(form: { readonly get: FormData['get']; readonly entries: FormData['entries'] }): Draft {
  const text = (name: string): string => {
    const value = form.get(name);
    return typeof value === 'string' ? value : '';
  };
  const fields = new Map<string, FieldOverride>();
  const parameters = new Map<string, ParameterOverride>();
  for (const [key, value] of form.entries()) {
    const [, table, column, name] = /^(field|parameter):(kind|weight|loops|vertex):([\s\S]+)$/.exec(key) ?? [];
    if (name === undefined || typeof value !== 'string' || value.trim() === '') continue;
    if (table === 'field') fields.set(name, { ...fields.get(name), ...kindOf(value) });
    else parameters.set(name, { ...parameters.get(name), ...parameterOf(column!, value.trim()) });
  }
  return {
    title: text('title').trim(),
    description: text('description').trim(),
    lagrangian: text('lagrangian').replace(/\r\n?/g, '\n'),
    signature: signatures.find(({ value }) => value === text('signature'))?.value ?? EMPTY.signature,
    dimension: text('dimension').trim() || dimensions[0]!,
    mixing: text('mixing') === 'diagonalise' ? 'diagonalise' : 'vertex',
    fields: [...fields].filter(([, value]) => Object.keys(value).length > 0),
    parameters: [...parameters].filter(([, value]) => Object.keys(value).length > 0),
  };
}

function kindOf(value: string): FieldOverride {
  return value === 'real' || value === 'complex' ? { kind: value } : {};
}

function parameterOf(column: string, value: string): ParameterOverride {
  if (column === 'kind') return kindOf(value) as ParameterOverride;
  if (column === 'weight') return { weight: value.replace('−', '-') };
  if (column === 'vertex') return { vertex: true };
  const loops = Number(value);
  return Number.isInteger(loops) && loops > 0 ? { loops } : {};
}

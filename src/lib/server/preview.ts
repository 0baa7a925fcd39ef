import type { ModelPreview } from '#contract/api.ts';
import { errorObject } from '#contract/errors.ts';
import type { ModelInput } from '#contract/request.ts';
import { previewModel as enginePreview } from '#engine/index.ts';
import { mathml } from '../typeset/mathml.ts';

/** What the editor shows of a model while it is typed: the engine's reading of it, typeset. Never throws for a text. */
export function previewModel(input: ModelInput): ModelPreview {
  const { error, fields, parameters, rules, ...rest } = enginePreview(input);
  return {
    ...rest,
    ok: error === null,
    error: error && errorObject(error),
    mathml: rest.latex === '' ? '' : mathml(rest.latex, { display: true }),
    fields: fields.map((field) => ({ ...field, mathml: mathml(field.latex) })),
    parameters: parameters.map((parameter) => ({ ...parameter, mathml: mathml(parameter.latex) })),
    rules: {
      ...rules,
      mathml: {
        propagators: rules.propagators.map(({ latex }) => mathml(latex, { display: true })),
        vertices: rules.vertices.map(({ latex }) => mathml(latex, { display: true })),
      },
    },
  };
}

import type { InputError, LimitError } from '../errors.ts';
import { format, ONE } from '../exact/rational.ts';
import { modelChecks } from '../lagrangian/checks.ts';
import type { ModelSource } from '../lagrangian/input.ts';
import { couplingDimensions, fieldDimension, parameterDimensions } from '../lagrangian/massDimension.ts';
import type { Model, Note } from '../lagrangian/model.ts';
import { coefficientText, modelLatex, modelText } from '../lagrangian/print.ts';
import { previewModel as readPreview } from '../lagrangian/read.ts';
import { linearText } from '../lagrangian/spacetime.ts';
import { modelRules } from '../rules/rules.ts';
import type { RulesDTO } from '../rules/types.ts';

export interface FieldPreview {
  readonly name: string;
  readonly latex: string;
  readonly kind: 'real' | 'complex';
  readonly mass: string;
  readonly dimension: string;
  readonly inferred: boolean;
}

export interface ParameterPreview {
  readonly name: string;
  readonly latex: string;
  readonly role: 'coupling' | 'propagator' | 'both';
  readonly dimension: string;
  readonly renormalisability: string;
  readonly weight: string;
  readonly loops: number;
}

export interface CheckPreview {
  readonly code: string;
  readonly title: string;
  readonly verdict: 'good' | 'note' | 'caution' | 'bad';
  readonly text: string;
}

/** What is shown of a model while it is typed. With an error, `latex` is the good part and the rest is empty. */
export interface EnginePreview {
  readonly error: InputError | LimitError | null;
  readonly latex: string;
  readonly normalText: string;
  readonly normalLatex: string;
  readonly fields: FieldPreview[];
  readonly parameters: ParameterPreview[];
  readonly rules: RulesDTO;
  readonly checks: CheckPreview[];
  readonly notes: { code: string; message: string; start: number | null; end: number | null }[];
}

const note = ({ code, message, span }: Note) => ({
  code,
  message,
  start: span?.start ?? null,
  end: span?.end ?? null,
});

function fieldsOf(model: Model, declared: ReadonlySet<string>): FieldPreview[] {
  const dimension = linearText(fieldDimension(model));
  return model.fields.map(({ name, latex, kind }) => {
    const propagator = model.propagators.find(({ field }) => field === name);
    return {
      name,
      latex,
      kind,
      mass: propagator ? coefficientText(propagator.massSquared) : '0',
      dimension,
      inferred: !declared.has(name),
    };
  });
}

function parametersOf(model: Model): ParameterPreview[] {
  const { known } = parameterDimensions(model);
  const couplings = new Map(couplingDimensions(model).map((entry) => [entry.name, entry]));
  return model.parameters.map(({ name, latex, role, weight, loops }) => {
    const dimension = known.get(name);
    return {
      name,
      latex,
      role,
      dimension: dimension ? linearText(dimension) : 'not fixed',
      renormalisability: couplings.get(name)?.renormalisability ?? '',
      weight: format(weight ?? ONE),
      loops,
    };
  });
}

const EMPTY = {
  normalText: '',
  normalLatex: '',
  fields: [],
  parameters: [],
  rules: { propagators: [], vertices: [] },
  checks: [],
  notes: [],
};

/** Reads a model for display while it is typed. Never throws for any text: what is wrong is part of the answer. */
export function previewModel(source: ModelSource): EnginePreview {
  const { model, good, error } = readPreview(source);
  if (!model) return { ...EMPTY, error, latex: good };
  const normalLatex = modelLatex(model);
  const declared = source.fields instanceof Map ? source.fields.keys() : Object.keys(source.fields ?? {});
  return {
    error: null,
    latex: good || normalLatex,
    normalText: modelText(model),
    normalLatex,
    fields: fieldsOf(model, new Set(declared)),
    parameters: parametersOf(model),
    rules: modelRules(model),
    checks: modelChecks(model).map(({ code, title, verdict, text }) => ({ code, title, verdict, text })),
    notes: model.notes.map(note),
  };
}

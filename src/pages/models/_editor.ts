import type { AstroGlobal } from 'astro';
import type { ModelPreview, ModelRecord } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import { errorObject } from '#contract/errors.ts';
import { modelSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { type Draft, draftOf, EMPTY, inputOf } from '#features/model/draft.ts';
import { exampleById } from '#features/model/examples.ts';
import { expandAddress } from '#features/model/expand.ts';
import { draftFromForm } from '#features/model/form.ts';
import { createModel, updateModel } from '#server/models.ts';
import { previewModel } from '#server/preview.ts';
import { errorOf, isAnswer } from '#server/refusal.ts';

/** What the editor page shows, or where it goes. */
export interface EditorPage {
  readonly draft: Draft;
  readonly preview: ModelPreview;
  /** Why a save was refused. */
  readonly refused: ErrorObject | null;
  readonly goTo: string | null;
}

/** One request to the editor, with or without JavaScript: read the draft, act on the button pressed, preview. */
export async function editorPage(astro: AstroGlobal, model: ModelRecord | null): Promise<EditorPage> {
  const start = startOf(astro, model);
  if (astro.request.method !== 'POST') return { draft: start, preview: previewOf(start), refused: null, goTo: null };
  const form = await astro.request.formData();
  const draft = draftFromForm(form);
  const page = { draft, preview: previewOf(draft), refused: null, goTo: null };
  try {
    return { ...page, goTo: act(astro, model, draft, form.get('intent')) };
  } catch (error) {
    return { ...page, refused: answerOf(error) };
  }
}

/** Saves or goes on, as the pressed button says; null: only read it. */
function act(astro: AstroGlobal, model: ModelRecord | null, draft: Draft, intent: unknown): string | null {
  if (intent === 'save') return `/models/${store(astro, model, draft).id}`;
  if (intent !== 'expand') return null;
  return expandAddress(astro.locals.user ? store(astro, model, draft).id : null, draft);
}

function store({ locals }: AstroGlobal, model: ModelRecord | null, draft: Draft): ModelRecord {
  const change = {
    title: draft.title || 'Untitled model',
    description: draft.description,
    input: validate(modelSchema, inputOf(draft)),
  };
  return model?.mine ? updateModel(locals.viewer, model.id, change) : createModel(locals.viewer, change);
}

function startOf({ url }: AstroGlobal, model: ModelRecord | null): Draft {
  if (model) return draftOf(model.input, model.title, model.description);
  const example = exampleById(url.searchParams.get('example'));
  return example ? draftOf(example.input, example.title) : EMPTY;
}

/** The preview of any draft; what the contract refuses is told as the editor tells every mistake. */
function previewOf(draft: Draft): ModelPreview {
  try {
    return previewModel(validate(modelSchema, inputOf(draft)));
  } catch (error) {
    return { ...NOTHING, error: answerOf(error) };
  }
}

/** The error object of a refusal; a defect is thrown on. */
function answerOf(error: unknown): ErrorObject {
  const known = errorObject(error);
  if (known) return known;
  if (!isAnswer(error)) throw error;
  return errorOf(error);
}

const NOTHING: ModelPreview = {
  ok: false,
  error: null,
  latex: '',
  mathml: '',
  normalText: '',
  normalLatex: '',
  fields: [],
  parameters: [],
  rules: { propagators: [], vertices: [], mathml: { propagators: [], vertices: [] } },
  checks: [],
  notes: [],
};

import type { AstroGlobal } from 'astro';
import type { ModelPreview, ModelRecord } from '#contract/api.ts';
import { type ErrorObject, errorObject } from '#contract/errors.ts';
import { LIMITS } from '#contract/limits.ts';
import { expansionRequestSchema, type ModelInput, modelSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { type Ask, askOf, askOfRequest, FIRST_ASK, requestOf } from '#features/compose/ask.ts';
import type { Known } from '#features/compose/hooks.ts';
import type { StoredModel } from '#features/compose/ModelPart.tsx';
import { firstLegs } from '#features/compose/operators.ts';
import { EMPTY, inputOf } from '#features/model/draft.ts';
import { draftFromForm } from '#features/model/form.ts';
import { createExpansion, estimateExpansion, getExpansion } from '#server/expansions.ts';
import { stableJson } from '#server/ids.ts';
import { getModel, getRevision, listRevisions } from '#server/models.ts';
import { previewModel } from '#server/preview.ts';
import { errorOf, isAnswer } from '#server/refusal.ts';
import { runtime } from '#server/runtime.ts';

/** What the composer's page shows, or where it goes. */
export interface ComposerPage {
  readonly model: StoredModel | null;
  readonly input: ModelInput;
  readonly preview: ModelPreview;
  readonly ask: Ask;
  readonly known: Known;
  readonly refused: ErrorObject | null;
  readonly goTo: string | null;
}

/** What a question starts from. */
interface Start {
  readonly model: StoredModel | null;
  readonly input: ModelInput;
  readonly ask: Ask;
  readonly refused: ErrorObject | null;
}

/**
 * One request to the composer, with or without JavaScript: read the question, run it when the button says so, else count.
 *
 * @throws Refusal not-found for a model, revision or expansion that the viewer may not see.
 */
export async function composerPage(astro: AstroGlobal): Promise<ComposerPage> {
  const form = astro.request.method === 'POST' ? await astro.request.formData() : null;
  const start = startOf(astro, form);
  const preview = previewModel(start.input);
  const ask = form
    ? askOf(form, FIRST_ASK)
    : askOf(astro.url.searchParams, { ...start.ask, legs: start.ask.legs || firstLegs(preview.fields) });
  const page = { ...start, preview, ask, known: NOTHING, goTo: null };
  if (start.refused) return page;
  try {
    if (form?.get('intent') === 'expand') return { ...page, goTo: run(astro, start, ask) };
    return { ...page, known: preview.ok ? count(astro, start.input, ask) : NOTHING };
  } catch (error) {
    return { ...page, refused: answerOf(error) };
  }
}

const NOTHING: Known = { estimate: null, refused: null };

function startOf(astro: AstroGlobal, form: FormData | null): Start {
  const { url, locals } = astro;
  const nothing = { ask: FIRST_ASK, refused: null };
  const from = url.searchParams.get('from');
  if (from) {
    const { request, modelId } = getExpansion(locals.viewer, from);
    return { ...nothing, model: null, ...sameModel(astro, request, modelId), ask: askOfRequest(request) };
  }
  const id = url.searchParams.get('model');
  if (id) return { ...nothing, ...storedModel(getModel(locals.viewer, id), astro) };
  if (form?.has('lagrangian')) return { ...nothing, model: null, ...checkedInput(inputOf(draftFromForm(form))) };
  const typed = url.searchParams.get('input');
  return { ...nothing, model: null, ...(typed === null ? { input: inputOf(EMPTY) } : checkedInput(parsed(typed))) };
}

function storedModel(record: ModelRecord, { url, locals }: AstroGlobal): Pick<Start, 'model' | 'input'> {
  const asked = Number(url.searchParams.get('revision') ?? record.revision);
  const revision = asked === record.revision ? record : getRevision(locals.viewer, record.id, asked);
  return {
    model: { id: record.id, title: record.title, revision: asked, newest: record.revision },
    input: revision.input,
  };
}

/** The model of a stored expansion: the revision it was made of where that can be seen, else the text as it was. */
function sameModel(
  { locals }: AstroGlobal,
  request: ModelInput,
  modelId: string | null,
): Partial<Start> & { input: ModelInput } {
  const { lagrangian, model, fields, parameters, mixing, conventions } = request;
  const input: ModelInput = {
    ...(lagrangian === undefined ? {} : { lagrangian }),
    ...(model === undefined ? {} : { model }),
    fields,
    parameters,
    mixing,
    conventions,
  };
  try {
    const record = modelId === null ? null : getModel(locals.viewer, modelId);
    const same = record && listRevisions(locals.viewer, record.id).find((one) => sameInput(one.input, input));
    if (record && same)
      return {
        input,
        model: { id: record.id, title: record.title, revision: same.number, newest: record.revision },
      };
  } catch (error) {
    if (!isAnswer(error)) throw error;
  }
  return { input };
}

const sameInput = (one: ModelInput, other: ModelInput): boolean => stableJson(one) === stableJson(other);

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return text;
  }
}

/** A model from outside, checked; what the contract refuses leaves an empty one and says why. */
function checkedInput(input: unknown): Pick<Start, 'input' | 'refused'> {
  try {
    return { input: validate(modelSchema, input), refused: null };
  } catch (error) {
    return { input: inputOf(EMPTY), refused: answerOf(error) };
  }
}

function count({ locals }: AstroGlobal, input: ModelInput, ask: Ask): Known {
  try {
    const estimate = estimateExpansion(locals.viewer, validate(expansionRequestSchema, requestOf(input, ask)));
    return { estimate, refused: null };
  } catch (error) {
    return { estimate: null, refused: answerOf(error) };
  }
}

/** Creates the expansion. @returns the address it has. */
function run({ locals }: AstroGlobal, { input, model }: Start, ask: Ask): string {
  const request = validate(expansionRequestSchema, requestOf(input, ask));
  if (!locals.viewer.user) {
    locals.becomeVisitor();
    const { perHour } = LIMITS.visitor;
    runtime().rates.take(
      `visitor runs ${locals.viewer.address}`,
      perHour,
      3_600,
      `Visitors run at most ${perHour} expansions an hour from one address. Sign up to run more.`,
    );
  }
  const asked = { request, modelId: model?.id ?? null, ...(ask.title === '' ? {} : { title: ask.title }) };
  return `/expansions/${createExpansion(locals.viewer, asked).expansion.id}`;
}

/** The error object of a refusal; a defect is thrown on. */
function answerOf(error: unknown): ErrorObject {
  const known = errorObject(error);
  if (known) return known;
  if (!isAnswer(error)) throw error;
  return errorOf(error);
}

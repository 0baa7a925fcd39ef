import { type FormEvent, useEffect, useState } from 'react';
import { type Draft, draftOf, inputOf } from '#features/model/draft.ts';
import { useAlive, usePreview, useRested } from '#features/model/hooks.ts';
import { type Ask, requestOf } from './ask.ts';
import type { ComposerProps } from './Composer.tsx';
import { useAddress, useEstimate } from './hooks.ts';
import { firstLegs, operatorsOf } from './operators.ts';
import { placeOf, sentenceOf } from './refusals.ts';
import { countWords } from './words.ts';

/** The question and the Lagrangian typed here as they stand, with the reading of it. */
function useQuestion({ model, input: firstInput, preview: firstPreview, ask: firstAsk }: ComposerProps) {
  const [ask, setAsk] = useState(firstAsk);
  const [firstDraft] = useState(() => draftOf(firstInput));
  const [draft, setDraft] = useState(firstDraft);
  const [another, setAnother] = useState(false);
  const { preview, current } = usePreview(draft, { draft: firstDraft, preview: firstPreview });
  // Another Lagrangian has other fields and couplings: the question starts anew as soon as they are known.
  useEffect(() => {
    if (!another || !current || !preview.ok) return;
    setAnother(false);
    setAsk((old) => ({ ...old, legs: firstLegs(preview.fields), powers: [] }));
  }, [another, current, preview]);
  const input = model ? firstInput : inputOf(draft);
  return {
    ask,
    edit: (part: Partial<Ask>) => setAsk((old) => ({ ...old, ...part })),
    draft,
    editDraft: (part: Partial<Draft>) => setDraft((old) => ({ ...old, ...part })),
    replaceDraft: (next: Draft) => {
      setDraft(next);
      setAnother(true);
    },
    input,
    preview,
    readable: preview.ok && (input.model !== undefined || (input.lagrangian ?? '').trim() !== ''),
    untouched: ask === firstAsk && draft === firstDraft,
  };
}

/** Whether the form is under way; coming back to the page as it was left, it no longer is. */
function useSending() {
  const [sending, setSending] = useState(false);
  useEffect(() => {
    const back = () => setSending(false);
    window.addEventListener('pageshow', back);
    return () => window.removeEventListener('pageshow', back);
  }, []);
  return [sending, setSending] as const;
}

/** All that the composer knows and can do. */
export function useComposer(props: ComposerProps) {
  const { model, known: firstKnown, ask: firstAsk, refused } = props;
  const alive = useAlive();
  const question = useQuestion(props);
  const { ask, input, readable } = question;
  const [first] = useState(() => ({
    ...firstKnown,
    body: JSON.stringify(requestOf(input, { ...firstAsk, title: '' })),
  }));
  const { known, current, failed } = useEstimate(input, ask, first, readable);
  const address = useAddress(model && { model: model.id, revision: String(model.revision) }, input, ask);
  const [sending, setSending] = useSending();
  const { estimate } = known;
  const spoken = useRested(current && estimate ? countWords(estimate.classes, estimate.quality) : '', 900);
  const error = known.refused ?? (question.untouched ? refused : null);
  const blocked = alive && (!readable || (current && (known.refused !== null || estimate?.allowed === false)));
  return {
    ...question,
    ...{ alive, known, current, failed, address, sending, blocked },
    spoken: alive ? spoken : '',
    operators: operatorsOf(question.preview.fields),
    /** The refusal that concerns a part of the form, as a sentence. */
    errorAt: (place: 'legs' | 'order') => (error && placeOf(error) === place ? sentenceOf(error) : null),
    send: (event: FormEvent) => {
      if (!blocked) return setSending(true);
      event.preventDefault();
      document.querySelector<HTMLElement>('#composer [aria-invalid="true"]')?.focus();
    },
  };
}

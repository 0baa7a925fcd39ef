import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { type FormEvent, useEffect, useState } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import type { ModelInput } from '#contract/request.ts';
import { draftOf, inputOf } from '#features/model/draft.ts';
import { useAlive, usePreview, useRested } from '#features/model/hooks.ts';
import { Asked } from './Asked.tsx';
import { type Ask, requestOf } from './ask.ts';
import { Choices } from './Choices.tsx';
import { Expected } from './Expected.tsx';
import { Facts } from './Facts.tsx';
import { type Known, useAddress, useEstimate } from './hooks.ts';
import { Legs } from './Legs.tsx';
import { Stored, type StoredModel, Typed } from './ModelPart.tsx';
import { Order } from './Order.tsx';
import { operatorsOf } from './operators.ts';
import { placeOf, sentenceOf } from './refusals.ts';
import { countWords } from './words.ts';

export interface ComposerProps {
  /** The stored model, or null when the Lagrangian is typed here. */
  readonly model: StoredModel | null;
  readonly input: ModelInput;
  readonly preview: ModelPreview;
  readonly ask: Ask;
  /** What the server knew of the cost when it wrote the page. */
  readonly known: Known;
  /** Why the form that was sent was refused. */
  readonly refused: ErrorObject | null;
  readonly signedIn: boolean;
}

export default function Composer(props: ComposerProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Form {...props} />
    </QueryClientProvider>
  );
}

function Form({
  model,
  input: firstInput,
  preview: firstPreview,
  ask: firstAsk,
  known: firstKnown,
  refused,
  signedIn,
}: ComposerProps) {
  const alive = useAlive();
  const [ask, setAsk] = useState(firstAsk);
  const edit = (part: Partial<Ask>) => setAsk((old) => ({ ...old, ...part }));
  const [firstDraft] = useState(() => draftOf(firstInput));
  const [draft, setDraft] = useState(firstDraft);
  const [sending, setSending] = useSending();
  const { preview } = usePreview(draft, { draft: firstDraft, preview: firstPreview });
  const input = model ? firstInput : inputOf(draft);
  const readable = preview.ok && (input.model !== undefined || (input.lagrangian ?? '').trim() !== '');
  const [first] = useState(() => ({
    ...firstKnown,
    body: JSON.stringify(requestOf(input, { ...firstAsk, title: '' })),
  }));
  const { known, current, failed } = useEstimate(input, ask, first, readable);
  useAddress(model && { model: model.id, revision: String(model.revision) }, input, ask);

  const untouched = ask === firstAsk && draft === firstDraft;
  const error = known.refused ?? (untouched ? refused : null);
  const at = (place: 'legs' | 'order' | 'title') => (error && placeOf(error) === place ? sentenceOf(error) : null);
  const blocked = alive && current && (known.refused !== null || known.estimate?.allowed === false);
  const spoken = useRested(
    current && known.estimate ? countWords(known.estimate.classes, known.estimate.quality) : '',
    900,
  );
  const operators = operatorsOf(preview.fields);

  const send = (event: FormEvent) => {
    if (!blocked && readable) return setSending(true);
    event.preventDefault();
    document.querySelector<HTMLElement>('#composer [aria-invalid="true"]')?.focus();
  };

  return (
    <form method="post" id="composer" className="editor composer" onSubmit={send}>
      <div className="editor-main">
        {model ? (
          <Stored model={model} preview={preview} />
        ) : (
          <Typed
            draft={draft}
            edit={(part) => setDraft((old) => ({ ...old, ...part }))}
            preview={preview}
            alive={alive}
          />
        )}
        <Legs operators={operators} value={ask.legs} onChange={(legs) => edit({ legs })} error={at('legs')} />
        <Order ask={ask} edit={edit} parameters={preview.parameters} error={at('order')} />
        <Choices ask={ask} edit={edit} />
        <TitleField ask={ask} edit={edit} />
      </div>
      <div className="composer-aside">
        <div className="composer-stick">
          <div className="savebar composer-bar">
            <Asked ask={ask} operators={operators} order={requestOf(input, ask).order} />
            <Expected {...{ known, current, failed, ask, readable }} rules={preview.rules} />
            <span role="status" className="sr-only">
              {alive ? spoken : ''}
            </span>
            <div className="row">
              <button
                type="submit"
                name="intent"
                value="expand"
                className="btn btn-primary"
                aria-disabled={blocked || (alive && !readable) || undefined}
              >
                {sending ? 'Expanding …' : 'Expand'}
              </button>
              {/* After the other one: Enter in a field presses the first button of a form, seen or not. */}
              <button type="submit" name="intent" value="estimate" className="btn only-scriptless">
                Count first
              </button>
            </div>
          </div>
          <Facts input={input} preview={preview} signedIn={signedIn} />
        </div>
      </div>
    </form>
  );
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

function TitleField({ ask, edit }: { readonly ask: Ask; readonly edit: (part: Partial<Ask>) => void }) {
  return (
    <div className="field">
      <label htmlFor="title">
        Title <span className="quiet">optional</span>
      </label>
      <input
        id="title"
        name="title"
        className="input"
        maxLength={200}
        value={ask.title}
        placeholder="Made from the request"
        onChange={({ target }) => edit({ title: target.value })}
      />
    </div>
  );
}

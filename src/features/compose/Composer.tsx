import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import type { ErrorObject } from '#contract/errors.ts';
import type { ModelInput } from '#contract/request.ts';
import { Asked } from './Asked.tsx';
import { type Ask, requestOf } from './ask.ts';
import { Choices } from './Choices.tsx';
import { Expected } from './Expected.tsx';
import { Facts } from './Facts.tsx';
import type { Known } from './hooks.ts';
import { Legs } from './Legs.tsx';
import { Stored, type StoredModel, Typed } from './ModelPart.tsx';
import { Order } from './Order.tsx';
import { useComposer } from './useComposer.ts';

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

function Form(props: ComposerProps) {
  const { model, signedIn } = props;
  const { ask, edit, preview, operators, ...composer } = useComposer(props);
  return (
    <form method="post" id="composer" className="editor composer" onSubmit={composer.send}>
      <div className="editor-main">
        {model ? (
          <Stored model={model} preview={preview} />
        ) : (
          <Typed
            draft={composer.draft}
            edit={composer.editDraft}
            replace={composer.replaceDraft}
            preview={preview}
            alive={composer.alive}
          />
        )}
        <Legs
          operators={operators}
          value={ask.legs}
          onChange={(legs) => edit({ legs })}
          error={composer.errorAt('legs')}
        />
        <Order ask={ask} edit={edit} parameters={preview.parameters} error={composer.errorAt('order')} />
        <Choices ask={ask} edit={edit} />
        <TitleField ask={ask} edit={edit} />
      </div>
      <div className="composer-aside">
        <div className="composer-stick">
          <div className="savebar composer-bar">
            <Asked ask={ask} operators={operators} order={requestOf(composer.input, ask).order} />
            <Expected
              known={composer.known}
              current={composer.current}
              failed={composer.failed}
              readable={composer.readable}
              ask={ask}
              rules={preview.rules}
            />
            <span role="status" className="sr-only">
              {composer.spoken}
            </span>
            <Buttons blocked={composer.blocked} sending={composer.sending} />
          </div>
          <Facts input={composer.input} preview={preview} signedIn={signedIn} address={composer.address} />
        </div>
      </div>
    </form>
  );
}

function Buttons({ blocked, sending }: { readonly blocked: boolean; readonly sending: boolean }) {
  return (
    <div className="row">
      <button
        type="submit"
        name="intent"
        value="expand"
        className="btn btn-primary"
        aria-disabled={blocked || undefined}
      >
        {sending ? 'Expanding …' : 'Expand'}
      </button>
      {/* After the other one: Enter in a field presses the first button of a form, seen or not. */}
      <button type="submit" name="intent" value="estimate" className="btn only-scriptless">
        Count first
      </button>
    </div>
  );
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

import { QueryClient, QueryClientProvider, useMutation } from '@tanstack/react-query';
import { type KeyboardEvent, useEffect, useRef, useState } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import { ApiError, saveModel } from './api.ts';
import { Checks } from './Checks.tsx';
import { ConventionFields } from './ConventionFields.tsx';
import { type Draft, draftOf, inputOf, sameDraft } from './draft.ts';
import { Examples } from './Examples.tsx';
import { expandAddress } from './expand.ts';
import { useAlive, useDraft, usePreview, useRested } from './hooks.ts';
import { forgetKept, useKept } from './keep.ts';
import { LagrangianInput } from './LagrangianInput.tsx';
import { Mistake } from './Mistake.tsx';
import { type Mark, offsetsOf, replaceStretch } from './marks.ts';
import { KeptNotice, Reading } from './Reading.tsx';
import { Rules } from './Rules.tsx';
import { SaveBar } from './SaveBar.tsx';
import { FieldTable, ParameterTable } from './Tables.tsx';

export interface EditorProps {
  readonly draft: Draft;
  readonly preview: ModelPreview;
  /** The stored model, or null for a new one. */
  readonly model: { readonly id: string; readonly revision: number; readonly mine: boolean } | null;
  readonly signedIn: boolean;
}

export default function Editor(props: EditorProps) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Form {...props} />
    </QueryClientProvider>
  );
}

function Form({ draft: first, preview: firstPreview, model, signedIn }: EditorProps) {
  const alive = useAlive();
  const { draft, edit, canUndo, canRedo, undo, redo } = useDraft(first);
  const [saved, setSaved] = useState({
    draft: first,
    revision: model?.revision ?? 0,
    id: model?.mine ? model.id : null,
  });
  const { preview, current, failed } = usePreview(draft, { draft: first, preview: firstPreview });
  const kept = useKept(saved.id, saved.revision, draft, saved.draft);
  const [lit, setLit] = useState<readonly { readonly start: number | null; readonly end: number | null }[]>([]);
  const input = useRef<HTMLTextAreaElement>(null);
  const dirty = !sameDraft(draft, saved.draft);
  const wrong = preview.error !== null && draft.lagrangian.trim() !== '';
  // Spoken when typing rests, so that a screen reader is not interrupted at each key.
  const spoken = useRested(wrong ? preview.error!.message : '', 900);

  const saving = useMutation({
    mutationFn: () =>
      saveModel({
        id: saved.id,
        revision: saved.id === null ? null : saved.revision,
        title: draft.title || 'Untitled model',
        description: draft.description,
        input: inputOf(draft),
      }),
    onSuccess: (record) => {
      forgetKept(saved.id);
      setSaved({ draft, revision: record.revision, id: record.id });
      if (saved.id === null) window.history.replaceState(null, '', `/models/${record.id}`);
    },
  });
  const save = () => signedIn && (dirty || saved.id === null) && !saving.isPending && saving.mutate();
  const expand = async () => {
    const stored = saved.id ?? model?.id ?? null;
    const id = !dirty ? stored : signedIn ? (await saving.mutateAsync()).id : null;
    window.location.assign(expandAddress(id, draft));
  };

  // For the moment until the new answer the old marks stand, so that they do not flicker at each key.
  const place = preview.error ? offsetsOf(draft.lagrangian, preview.error) : null;
  const select = (start: number, end: number) => {
    input.current?.focus();
    input.current?.setSelectionRange(start, end);
  };
  const fix = (suggestion: string) => {
    if (!place || !current) return;
    const fixed = replaceStretch(draft.lagrangian, place, suggestion);
    edit({ lagrangian: fixed.text });
    requestAnimationFrame(() => select(fixed.caret, fixed.caret));
  };
  const keys = useKeys({ save, undo, redo });

  return (
    <form
      method="post"
      className="editor"
      onKeyDown={keys}
      onSubmit={(event) => {
        event.preventDefault();
        save();
      }}
    >
      <div className="editor-main">
        {kept.found && (
          <KeptNotice
            kept={kept.found}
            stale={kept.found.revision !== saved.revision}
            onTake={() => {
              edit(kept.found!.draft);
              kept.accept();
            }}
            onDrop={kept.dismiss}
          />
        )}
        <TitleFields draft={draft} edit={edit} />
        <div className="editor-text">
          <div className="editor-label">
            <label className="label" htmlFor="lagrangian">
              Lagrangian
            </label>
            <ConventionFields draft={draft} edit={edit} />
          </div>
          <LagrangianInput
            value={draft.lagrangian}
            onChange={(lagrangian) => edit({ lagrangian }, 'lagrangian')}
            marks={marksOf(preview, draft.lagrangian, place, lit)}
            invalid={wrong}
            inputRef={input}
          />
          <p id="lagrangian-hint" className="hint">
            As on paper, in text, Unicode or LaTeX: <code>1/2 (d phi)^2</code>, <code>½(∂φ)²</code>,{' '}
            <code>{'\\frac12(\\partial\\phi)^2'}</code>. The conjugate of <code>phi</code> is <code>phi^*</code>.
          </p>
          {wrong && (
            <Mistake
              error={preview.error!}
              text={draft.lagrangian}
              onFix={fix}
              onGo={() => place && select(place.start, place.end)}
              alive={alive && place !== null}
            />
          )}
          <span role="alert" className="sr-only">
            {alive ? spoken : ''}
          </span>
          <Examples onChoose={({ input: chosen, title }) => edit({ ...draftOf(chosen, title, draft.description) })} />
        </div>
        <Reading preview={preview} failed={failed instanceof ApiError ? failed.message : null} />
        <FieldTable preview={preview} draft={draft} edit={edit} />
        <ParameterTable preview={preview} draft={draft} edit={edit} />
      </div>
      <SaveBar
        copy={model !== null && !model.mine && saved.id === null}
        {...{ alive, signedIn, dirty, canUndo, canRedo, undo, redo, save, expand }}
        saving={saving.isPending}
        savedAt={saved.id}
        failed={saving.error instanceof ApiError ? saving.error : null}
      />
      <div className="editor-side">
        <Rules
          preview={preview}
          light={setLit}
          go={({ start, end }) => start !== null && select(start, end ?? start)}
        />
        <Checks preview={preview} />
      </div>
    </form>
  );
}

function TitleFields({ draft, edit }: { draft: Draft; edit: (part: Partial<Draft>, tag?: string) => void }) {
  return (
    <div className="field">
      <label htmlFor="title">Title</label>
      <input
        id="title"
        name="title"
        className="input"
        maxLength={120}
        value={draft.title}
        placeholder="Untitled model"
        onChange={({ target }) => edit({ title: target.value }, 'title')}
      />
    </div>
  );
}

/** The stretches to draw under: the mistake, notes, and what a rule lights. */
function marksOf(
  preview: ModelPreview,
  text: string,
  place: { readonly start: number; readonly end: number } | null,
  lit: readonly { readonly start: number | null; readonly end: number | null }[],
): readonly Mark[] {
  const notes = preview.notes.map(({ start, end }) => ({ start, end, kind: 'note' as const }));
  const lights = lit.map(({ start, end }) => ({ start, end, kind: 'lit' as const }));
  const marks = [...notes, ...lights].flatMap(({ start, end, kind }) =>
    start === null || end === null || end > text.length ? [] : [{ start, end, kind }],
  );
  return place ? [...marks, { ...place, kind: 'mistake' as const }] : marks;
}

/** Ctrl or ⌘ with S saves, with Z undoes, with Shift+Z or Y redoes: in every field of the form alike. */
function useKeys({ save, undo, redo }: { save: () => void; undo: () => void; redo: () => void }) {
  const latest = useRef({ save, undo, redo });
  useEffect(() => {
    latest.current = { save, undo, redo };
  });
  return (event: KeyboardEvent) => {
    if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
    const key = event.key.toLowerCase();
    const command =
      key === 's' ? 'save' : key === 'z' ? (event.shiftKey ? 'redo' : 'undo') : key === 'y' ? 'redo' : null;
    if (command === null) return;
    event.preventDefault();
    latest.current[command]();
  };
}

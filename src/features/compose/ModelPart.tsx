import { useRef } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import { ConventionFields } from '#features/model/ConventionFields.tsx';
import { type Draft, draftOf } from '#features/model/draft.ts';
import { Examples } from '#features/model/Examples.tsx';
import { LagrangianInput } from '#features/model/LagrangianInput.tsx';
import { Mistake } from '#features/model/Mistake.tsx';
import { offsetsOf, replaceStretch } from '#features/model/marks.ts';
import { Formula } from '#features/model/parts.tsx';
import { Scroll } from './Scroll.tsx';

export interface StoredModel {
  readonly id: string;
  readonly title: string;
  readonly revision: number;
  readonly newest: number;
}

/** The stored model the question is about: typeset, with a way to change it. */
export function Stored({ model, preview }: { readonly model: StoredModel; readonly preview: ModelPreview }) {
  return (
    <section className="ask-model" aria-labelledby="model-title">
      <div className="ask-model-head">
        <h2 id="model-title">
          <a href={`/models/${model.id}`}>{model.title}</a>
        </h2>
        <span className="quiet">
          revision {model.revision}
          {model.revision < model.newest && (
            <>
              {' '}
              of {model.newest}, <a href={`/expansions/new?model=${model.id}`}>take the newest</a>
            </>
          )}
        </span>
      </div>
      <Scroll label="Lagrangian, typeset">
        {preview.mathml === '' ? <code>{preview.normalText}</code> : <Formula html={preview.mathml} />}
      </Scroll>
      {preview.error && <p className="error">{preview.error.message} Mend it in the model first.</p>}
    </section>
  );
}

interface TypedProps {
  readonly draft: Draft;
  readonly edit: (part: Partial<Draft>) => void;
  /** Takes another Lagrangian altogether. */
  readonly replace: (draft: Draft) => void;
  readonly preview: ModelPreview;
  readonly alive: boolean;
}

/** A Lagrangian typed here, for a question without a stored model. */
export function Typed({ draft, edit, replace, preview, alive }: TypedProps) {
  const input = useRef<HTMLTextAreaElement>(null);
  const wrong = preview.error !== null && draft.lagrangian.trim() !== '';
  const place = preview.error ? offsetsOf(draft.lagrangian, preview.error) : null;
  const select = (start: number, end: number) => {
    input.current?.focus();
    input.current?.setSelectionRange(start, end);
  };
  return (
    <section className="ask-model" aria-labelledby="model-label">
      <div className="editor-label">
        <label id="model-label" className="label" htmlFor="lagrangian">
          Lagrangian
        </label>
        <ConventionFields draft={draft} edit={edit} />
      </div>
      <LagrangianInput
        value={draft.lagrangian}
        onChange={(lagrangian) => edit({ lagrangian })}
        marks={place ? [{ ...place, kind: 'mistake' }] : []}
        invalid={wrong}
        inputRef={input}
      />
      <p id="lagrangian-hint" className="hint">
        As on paper, in text, Unicode or LaTeX. The conjugate of <code>phi</code> is <code>phi^*</code>.
      </p>
      {wrong && (
        <Mistake
          error={preview.error!}
          text={draft.lagrangian}
          onFix={(suggestion) => {
            if (!place) return;
            const fixed = replaceStretch(draft.lagrangian, place, suggestion);
            edit({ lagrangian: fixed.text });
            requestAnimationFrame(() => select(fixed.caret, fixed.caret));
          }}
          onGo={() => place && select(place.start, place.end)}
          alive={alive && place !== null}
        />
      )}
      {preview.mathml !== '' && (
        <Scroll label="Lagrangian, typeset">
          <Formula html={preview.mathml} />
        </Scroll>
      )}
      <Examples onChoose={({ input: chosen }) => replace(draftOf(chosen))} />
      <Overrides draft={draft} />
    </section>
  );
}

/** What the draft says of single names goes with the plain form too. */
function Overrides({ draft }: { readonly draft: Draft }) {
  const entries = [
    ...draft.fields.flatMap(([name, { kind }]) => (kind ? [[`field:kind:${name}`, kind]] : [])),
    ...draft.parameters.flatMap(([name, { kind, weight, loops, vertex }]) => [
      ...(kind ? [[`parameter:kind:${name}`, kind]] : []),
      ...(weight === undefined ? [] : [[`parameter:weight:${name}`, String(weight)]]),
      ...(loops === undefined ? [] : [[`parameter:loops:${name}`, String(loops)]]),
      ...(vertex ? [[`parameter:vertex:${name}`, 'yes']] : []),
    ]),
    ['mixing', draft.mixing],
  ];
  return entries.map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />);
}

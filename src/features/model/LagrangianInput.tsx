import type { Ref } from 'react';
import { type Mark, segments } from './marks.ts';

interface Props {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly marks: readonly Mark[];
  readonly invalid: boolean;
  readonly inputRef: Ref<HTMLTextAreaElement>;
}

/** The text with what is wrong underlined where it stands: the marks lie in a copy of the text behind the input. */
export function LagrangianInput({ value, onChange, marks, invalid, inputRef }: Props) {
  // Two stretches with one text need keys of their own: the offset is one.
  let offset = 0;
  return (
    <div className="lagrangian">
      <pre aria-hidden="true">
        {segments(value, marks).map(({ text, kinds }) => {
          const key = offset;
          offset += text.length;
          return kinds.length === 0 ? (
            text
          ) : (
            <mark key={key} className={kinds.join(' ')}>
              {text}
            </mark>
          );
        })}
        {/* Not a bare newline: the first one of a <pre> is dropped by the parser, and an empty text would not hydrate. */}
        {' \n'}
      </pre>
      <textarea
        ref={inputRef}
        id="lagrangian"
        name="lagrangian"
        className="textarea"
        rows={4}
        value={value}
        onChange={(event) => onChange(event.target.value)}
        aria-invalid={invalid}
        aria-describedby={invalid ? 'mistake lagrangian-hint' : 'lagrangian-hint'}
        spellCheck={false}
        autoCapitalize="off"
        autoComplete="off"
        autoCorrect="off"
      />
    </div>
  );
}

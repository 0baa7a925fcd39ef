import type { ModelPreview } from '#contract/api.ts';
import { Panel } from './parts.tsx';

/** Each verdict as a mark and a word, so that colour is not the only sign. */
const VERDICTS = {
  good: { mark: '✓', word: 'good', className: 'ok' },
  note: { mark: '·', word: 'note', className: 'quiet' },
  caution: { mark: '!', word: 'caution', className: 'caution' },
  bad: { mark: '×', word: 'wrong', className: 'bad' },
} as const;

export function Checks({ preview }: { readonly preview: ModelPreview }) {
  if (preview.checks.length + preview.notes.length === 0) return null;
  return (
    <Panel title="Checks">
      <ul className="checks">
        {preview.checks.map((check) => {
          const { mark, word, className } = VERDICTS[check.verdict];
          return (
            <li key={check.code + check.text}>
              <span className={className} aria-hidden="true">
                {mark}
              </span>
              <p>
                <b>{check.title}</b>
                <span className="sr-only"> ({word})</span>. {check.text}
              </p>
            </li>
          );
        })}
        {preview.notes.map((note) => (
          <li key={note.code + note.message}>
            <span className="quiet" aria-hidden="true">
              ·
            </span>
            <p>{note.message}</p>
          </li>
        ))}
      </ul>
    </Panel>
  );
}

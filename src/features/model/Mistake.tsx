import type { ErrorObject } from '#contract/errors.ts';

interface Props {
  readonly error: ErrorObject;
  readonly text: string;
  readonly onFix: (suggestion: string) => void;
  readonly onGo: () => void;
  readonly alive: boolean;
}

/** What is wrong: the line with a caret under it, the sentence, and the fix where one can be told. */
export function Mistake({ error, text, onFix, onGo, alive }: Props) {
  const line = error.line === null ? undefined : text.split('\n')[error.line - 1];
  return (
    <div id="mistake" className="notice notice-bad mistake-card">
      {line !== undefined && error.column !== null && (
        <pre className="scroll-x" aria-hidden="true">
          {line}
          {'\n'}
          {' '.repeat(error.column - 1)}
          <b className="bad">{'^'.repeat(Math.max(1, Math.min(error.length ?? 1, line.length - error.column + 1)))}</b>
        </pre>
      )}
      <p>
        {error.message}
        {error.line !== null && error.column !== null && (
          <span className="quiet">
            {' '}
            Line {error.line}, column {error.column}.
          </span>
        )}
      </p>
      {alive && error.line !== null && (
        <div className="row">
          {error.suggestion !== undefined && (
            <button type="button" className="btn btn-small" onClick={() => onFix(error.suggestion!)}>
              Write <code>{error.suggestion === '' ? 'nothing' : error.suggestion}</code> instead
            </button>
          )}
          <button type="button" className="btn btn-small" onClick={onGo}>
            Go to it
          </button>
        </div>
      )}
    </div>
  );
}

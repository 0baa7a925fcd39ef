import type { ModelPreview } from '#contract/api.ts';
import type { Kept } from './keep.ts';
import { Copy, Formula } from './parts.tsx';

/** The Lagrangian as it was read, typeset: the good part also when something is wrong. */
export function Reading({ preview, failed }: { readonly preview: ModelPreview; readonly failed: string | null }) {
  return (
    <section className="plate" aria-label="As read">
      <div className="plate-head">
        <b>{preview.ok ? 'As read' : 'As far as it could be read'}</b>
        {preview.latex !== '' && <Copy text={preview.normalLatex || preview.latex} what="the Lagrangian" />}
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: keys scroll a wide formula only when it takes the focus */}
      <div className="plate-body reading scroll-x" tabIndex={0}>
        {preview.mathml === '' ? (
          <p className="quiet">The Lagrangian appears here, typeset, as you type.</p>
        ) : (
          <Formula html={preview.mathml} />
        )}
      </div>
      {failed && <p className="plate-foot error">{failed}</p>}
    </section>
  );
}

interface KeptProps {
  readonly kept: Kept;
  /** The stored model has moved on since the draft was made. */
  readonly stale: boolean;
  readonly onTake: () => void;
  readonly onDrop: () => void;
}

/** A draft that this device kept: offered, not imposed. */
export function KeptNotice({ kept, stale, onTake, onDrop }: KeptProps) {
  return (
    <div className="notice notice-caution">
      <p>
        This device kept an unsaved draft of {new Date(kept.at).toLocaleString('en-GB')}
        {stale && ', made before the stored model was last changed'}.
      </p>
      <div className="row">
        <button type="button" className="btn btn-small" onClick={onTake}>
          Take the draft
        </button>
        <button type="button" className="btn btn-small btn-quiet" onClick={onDrop}>
          Drop it
        </button>
      </div>
    </div>
  );
}

import type { ApiError } from './api.ts';

interface Props {
  readonly alive: boolean;
  readonly signedIn: boolean;
  /** The stored model belongs to someone else: saving makes a model of one's own. */
  readonly copy: boolean;
  readonly dirty: boolean;
  readonly saving: boolean;
  readonly savedAt: string | null;
  readonly failed: ApiError | null;
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly undo: () => void;
  readonly redo: () => void;
  readonly save: () => void;
  readonly expand: () => void;
}

/** What stands between the draft and the next step: undo, save, expand, and how the last save went. */
export function SaveBar(props: Props) {
  const { alive, signedIn, copy, dirty, saving, savedAt, failed } = props;
  return (
    <div className="savebar">
      <p role="status" className="hint">
        {stateOf(props)}
      </p>
      {failed && <p className="error">{failed.message}</p>}
      <div className="row">
        {alive ? (
          <>
            <button type="button" className="btn btn-quiet" onClick={props.undo} disabled={!props.canUndo}>
              Undo
            </button>
            <button type="button" className="btn btn-quiet" onClick={props.redo} disabled={!props.canRedo}>
              Redo
            </button>
          </>
        ) : (
          <button type="submit" name="intent" value="preview" className="btn">
            Read it
          </button>
        )}
        {signedIn && (
          <button
            type="submit"
            name="intent"
            value="save"
            className="btn"
            disabled={alive && (saving || (!dirty && savedAt !== null))}
          >
            {saving ? 'Saving …' : copy ? 'Save a copy' : 'Save'}
          </button>
        )}
        {!signedIn && (
          <a className="btn" href="/signup?next=/models/new">
            Sign up to save
          </a>
        )}
        <button
          type="submit"
          name="intent"
          value="expand"
          className="btn btn-primary"
          onClick={(event) => {
            if (!alive) return;
            event.preventDefault();
            props.expand();
          }}
        >
          Expand
        </button>
      </div>
    </div>
  );
}

function stateOf({ alive, dirty, saving, savedAt, signedIn }: Props): string {
  if (!alive) return '';
  if (saving) return 'Saving …';
  if (dirty) return signedIn ? 'Unsaved changes, kept on this device.' : 'Kept on this device.';
  if (!signedIn) return '';
  return savedAt === null ? '' : 'Saved.';
}

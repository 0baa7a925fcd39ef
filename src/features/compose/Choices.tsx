import { type Ask, DROPS, KEEPS } from './ask.ts';
import { DROP_WORDS, KEEP_WORDS } from './words.ts';

interface Props {
  readonly ask: Ask;
  readonly edit: (part: Partial<Ask>) => void;
}

/** What to keep and what to drop, each with what it means. */
export function Choices({ ask, edit }: Props) {
  return (
    <div className="ask-choices">
      <fieldset className="ask-part">
        <legend>
          Keep <Whole id="keep" of="what to keep" />
        </legend>
        {KEEPS.map((keep) => (
          <label key={keep} className="check">
            <input type="radio" name="keep" value={keep} checked={ask.keep === keep} onChange={() => edit({ keep })} />
            <span>
              <b>{KEEP_WORDS[keep].label}</b> <span className="quiet">{KEEP_WORDS[keep].text}</span>
            </span>
          </label>
        ))}
      </fieldset>
      <fieldset className="ask-part">
        <legend>
          Drop <Whole id="self-contraction" of="what to drop" />
        </legend>
        {DROPS.map((drop) => (
          <label key={drop} className="check">
            <input
              type="checkbox"
              name="drop"
              value={drop}
              checked={ask.drop.includes(drop)}
              onChange={({ target }) =>
                edit({
                  drop: DROPS.filter((other) => (other === drop ? target.checked : ask.drop.includes(other))),
                })
              }
            />
            <span>
              <b>{DROP_WORDS[drop].label}</b> <span className="quiet">{DROP_WORDS[drop].text}</span>
            </span>
          </label>
        ))}
      </fieldset>
    </div>
  );
}

const Whole = ({ id, of }: { readonly id: string; readonly of: string }) => (
  <a className="ask-more" href={`/conventions#${id}`} target="_blank" rel="noopener">
    definitions<span className="sr-only"> of {of}, in a new tab</span>
  </a>
);

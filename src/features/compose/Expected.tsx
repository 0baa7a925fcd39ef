import type { ModelPreview } from '#contract/api.ts';
import { type Ask, legsOf } from './ask.ts';
import type { Known } from './hooks.ts';
import { placeOf, sentenceOf } from './refusals.ts';
import { whyNone } from './vanish.ts';
import { countWords, timeWords } from './words.ts';

interface Props {
  readonly known: Known;
  readonly current: boolean;
  readonly failed: string | null;
  readonly rules: ModelPreview['rules'];
  readonly ask: Ask;
  readonly readable: boolean;
}

/** What the expansion will hold and cost, before it runs. */
export function Expected({ known: { estimate, refused }, current, failed, rules, ask, readable }: Props) {
  if (!readable) return <p className="quiet">Write a Lagrangian first: the count appears here.</p>;
  if (failed) return <p className="error">{failed} The request can be sent all the same.</p>;
  if (refused) return <p className="bad">{FIRST_FIX[placeOf(refused)] ?? sentenceOf(refused)}</p>;
  if (!estimate) return <p className="loading">Counting …</p>;
  const none = estimate.classes === 0 && estimate.quality === 'exact';
  return (
    <div className="expected" aria-busy={!current}>
      <p className="expected-count">{none ? 'No diagram' : countWords(estimate.classes, estimate.quality)}</p>
      {none ? (
        <p>{whyNone(rules, legsOf(ask.legs)) ?? 'None exist at this order: counted, not cut off.'}</p>
      ) : (
        <p className="led">
          <span>{estimate.quality === 'exact' ? 'counted' : 'estimated'}</span>
          {estimate.weight !== '' && (
            <span>
              <span className="m">Σ 1/S = {estimate.weight}</span>
            </span>
          )}
          <span>{timeWords(estimate.seconds)}</span>
        </p>
      )}
      {estimate.stored && (
        <p>
          Computed already: <a href={`/expansions/${estimate.stored}`}>open the stored list</a>.
        </p>
      )}
      {!estimate.allowed && <p className="bad">{estimate.reason}</p>}
    </div>
  );
}

const FIRST_FIX: Readonly<Partial<Record<ReturnType<typeof placeOf>, string>>> = {
  model: 'The Lagrangian cannot be read yet.',
  legs: 'The legs need a look first.',
  order: 'The order needs a look first.',
};

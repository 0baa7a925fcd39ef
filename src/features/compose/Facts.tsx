import type { ModelPreview } from '#contract/api.ts';
import { LIMITS } from '#contract/limits.ts';
import type { ModelInput } from '#contract/request.ts';
import { signatures } from '#features/model/draft.ts';
import { Formula } from '#features/model/parts.tsx';
import { Scroll } from './Scroll.tsx';
import { monomialWords, timeWords } from './words.ts';

interface Props {
  readonly input: ModelInput;
  readonly preview: ModelPreview;
  readonly signedIn: boolean;
  /** Where signing up comes back to. */
  readonly address: string;
}

const MOST_VERTICES = 12;

/** What bears on the question: conventions, the vertices to count powers of, and what one may run. */
export function Facts({ input: { conventions }, preview: { rules }, signedIn, address }: Props) {
  const { classes, seconds } = signedIn ? LIMITS.member : LIMITS.visitor;
  const signature = signatures.find(({ value }) => value === conventions.signature);
  return (
    <div className="composer-facts">
      <section aria-labelledby="facts-model">
        <h2 id="facts-model" className="eyebrow">
          Conventions
        </h2>
        <dl className="facts">
          <dt>Signature</dt>
          <dd className="m">{signature?.short}</dd>
          <dt>Dimension</dt>
          <dd className="m">{conventions.dimension.replace('eps', 'ε').replace('-', ' − ')}</dd>
        </dl>
      </section>
      {rules.vertices.length > 0 && (
        <section aria-labelledby="facts-vertices">
          <h2 id="facts-vertices" className="eyebrow">
            Vertices
          </h2>
          <Scroll label="Vertices and their factors">
            <ul className="vertex-list">
              {rules.vertices.slice(0, MOST_VERTICES).map(({ fields, factor }, at) => (
                <li key={`${fields.join(' ')} ${factor}`}>
                  <span className="m">{monomialWords(fields)}</span>{' '}
                  <Formula html={inline(rules.mathml.vertices[at] ?? '')} />
                </li>
              ))}
            </ul>
          </Scroll>
          {rules.vertices.length > MOST_VERTICES && (
            <p className="hint">and {rules.vertices.length - MOST_VERTICES} more</p>
          )}
        </section>
      )}
      <section aria-labelledby="facts-limits">
        <h2 id="facts-limits" className="eyebrow">
          Limits
        </h2>
        <p className="hint">
          {signedIn ? 'One expansion' : 'Without an account one expansion'} may have {classes.toLocaleString('en-GB')}{' '}
          diagrams and take {timeWords(seconds).replace('about ', '')}.
          {!signedIn && (
            <>
              {' '}
              It is kept for {LIMITS.visitor.keepHours} hours;{' '}
              <a href={`/signup?next=${encodeURIComponent(address)}`}>sign up</a> for more.
            </>
          )}
        </p>
      </section>
    </div>
  );
}

/** A formula of its own line, set in a line of text. */
const inline = (mathml: string): string => mathml.replace(' display="block"', '');

import { Fragment } from 'react';
import type { ModelPreview } from '#contract/api.ts';
import { Copy, Formula, Panel } from './parts.tsx';

/** A stretch of the text; null for a term that arose from multiplying out. */
type Term = ModelPreview['rules']['vertices'][number]['terms'][number];

interface Lighting {
  /** Lights the stretches that a rule came from; an empty list puts the light out. */
  readonly light: (terms: readonly Term[]) => void;
  /** Selects the stretch in the input. */
  readonly go: (term: Term) => void;
}

/** The terms that a rule came from, as typed: focus lights them in the input, a click goes there. */
function Origin({ terms, light, go }: Lighting & { readonly terms: readonly Term[] }) {
  return (
    <span className="origin">
      from{' '}
      {terms.map((term, index) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: terms of one rule have no identity but their place
        <Fragment key={index}>
          {index > 0 && ' and '}
          <button
            type="button"
            className="link-btn"
            disabled={term.start === null}
            onFocus={() => light([term])}
            onBlur={() => light([])}
            onClick={() => go(term)}
          >
            <code>{term.text}</code>
          </button>
        </Fragment>
      ))}
    </span>
  );
}

type Fields = ModelPreview['fields'];

/** Half-lines of a rule as on paper: h h φ φ*. */
function Names({ names, fields }: { readonly names: readonly string[]; readonly fields: Fields }) {
  return (
    <span className="rule-name">
      {names.map((name, index) => {
        const conjugate = name.endsWith('^*');
        const field = fields.find((one) => one.name === name.replace('^*', ''));
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: equal half-lines have no identity but their place
          <span key={index}>
            {field ? <Formula html={field.mathml} /> : name}
            {field && conjugate && '*'}
          </span>
        );
      })}
    </span>
  );
}

interface RuleProps extends Lighting {
  readonly names: readonly string[];
  readonly fields: Fields;
  readonly mathml: string;
  readonly latex: string;
  readonly terms: readonly Term[];
  readonly permutations: readonly string[];
}

function Rule({ names, fields, mathml, latex, terms, permutations, light, go }: RuleProps) {
  return (
    // Hovering is a convenience: the same is done by focusing the button inside.
    <li className="rule" onPointerEnter={() => light(terms)} onPointerLeave={() => light([])}>
      <Names names={names} fields={fields} />
      <Formula html={mathml} className="rule-factor scroll-x" />
      <span className="rule-foot">
        <Origin terms={terms} light={light} go={go} />
        <Copy text={latex} what={`rule of ${names.join(' ')}`} />
      </span>
      {permutations.length > 1 && (
        <details className="rule-foot">
          <summary className="quiet">{permutations.length} assignments of identical fields, summed</summary>
          <ul>
            {permutations.map((line, index) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: two assignments may give one line
              <li key={index}>
                <code>{line}</code>
              </li>
            ))}
          </ul>
        </details>
      )}
    </li>
  );
}

export function Rules({ preview, ...lighting }: Lighting & { readonly preview: ModelPreview }) {
  const { rules, fields } = preview;
  if (rules.propagators.length + rules.vertices.length === 0)
    return (
      <Panel title="Feynman rules">
        <p className="quiet">The rules appear here as soon as a kinetic term is read.</p>
      </Panel>
    );
  return (
    <>
      <Panel title="Propagators">
        <ul>
          {rules.propagators.map((rule, index) => (
            <Rule
              key={rule.field}
              names={[rule.field]}
              fields={fields}
              mathml={rules.mathml.propagators[index] ?? ''}
              latex={rule.latex}
              terms={rule.terms}
              permutations={[]}
              {...lighting}
            />
          ))}
        </ul>
      </Panel>
      <Panel title="Vertices">
        {rules.vertices.length === 0 && <p className="quiet">A free theory: no vertices.</p>}
        <ul>
          {rules.vertices.map((rule, index) => (
            <Rule
              key={`${rule.coupling} ${rule.fields.join(' ')}`}
              names={rule.fields}
              fields={fields}
              mathml={rules.mathml.vertices[index] ?? ''}
              latex={rule.latex}
              terms={rule.terms}
              permutations={rule.permutations}
              {...lighting}
            />
          ))}
        </ul>
      </Panel>
    </>
  );
}

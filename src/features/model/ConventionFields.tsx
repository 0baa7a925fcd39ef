import { type Draft, dimensions, signatures } from './draft.ts';

interface Props {
  readonly draft: Draft;
  readonly edit: (part: Partial<Draft>, tag?: string) => void;
}

export function ConventionFields({ draft, edit }: Props) {
  return (
    <div className="convention-fields">
      <fieldset className="strip">
        <legend className="sr-only">Signature</legend>
        {signatures.map(({ value, label, short }) => (
          <label key={value}>
            <input
              type="radio"
              name="signature"
              value={value}
              aria-label={label}
              checked={draft.signature === value}
              onChange={() => edit({ signature: value })}
            />
            <span aria-hidden="true" className="m">
              {short}
            </span>
          </label>
        ))}
      </fieldset>
      <label className="dimension" htmlFor="dimension">
        <span className="m">d =</span>
        <span className="sr-only"> space-time dimension</span>
        <input
          id="dimension"
          name="dimension"
          className="input input-small"
          list="dimensions"
          size={8}
          value={draft.dimension}
          onChange={({ target }) => edit({ dimension: target.value }, 'dimension')}
          spellCheck={false}
          autoComplete="off"
        />
        <datalist id="dimensions">
          {dimensions.map((dimension) => (
            <option key={dimension} value={dimension} />
          ))}
        </datalist>
      </label>
      <a href="/conventions#signature">What these mean</a>
    </div>
  );
}

import { type KeyboardEvent, useRef, useState } from 'react';
import { LIMITS } from '#contract/limits.ts';
import { Formula } from '#features/model/parts.tsx';
import { legsOf } from './ask.ts';
import { moved, type Operator, operatorFor, without } from './operators.ts';

interface Props {
  readonly operators: readonly Operator[];
  readonly value: string;
  readonly onChange: (legs: string) => void;
  readonly error: string | null;
}

/** The legs of the correlator: by buttons of the field operators, by keys, or typed. */
export function Legs({ operators, value, onChange, error }: Props) {
  const legs = legsOf(value);
  const full = legs.length >= LIMITS.legs;
  return (
    <fieldset className="ask-part" id="part-legs">
      <legend>Legs</legend>
      {operators.length > 0 && (
        <div className="needs-script leg-part">
          <LegList operators={operators} legs={legs} onChange={(next) => onChange(next.join(' '))} />
          <fieldset className="row leg-add">
            <legend className="sr-only">Add a leg</legend>
            {operators.map(({ name, mathml, spoken }) => (
              <button
                key={name}
                type="button"
                className="btn leg-btn"
                disabled={full}
                aria-label={`Add ${spoken}`}
                onClick={() => onChange([...legs, name].join(' '))}
              >
                <span aria-hidden="true">+</span> <Formula html={mathml} />
              </button>
            ))}
            {legs.length > 0 && (
              <button type="button" className="btn btn-quiet" onClick={() => onChange('')}>
                Clear
              </button>
            )}
          </fieldset>
        </div>
      )}
      <div className="field">
        <label htmlFor="legs">Field operators, in order</label>
        <input
          id="legs"
          name="legs"
          className="input mono"
          value={value}
          onChange={({ target }) => onChange(target.value)}
          autoComplete="off"
          autoCapitalize="off"
          spellCheck={false}
          aria-invalid={error ? true : undefined}
          aria-describedby={error ? 'legs-error legs-hint' : 'legs-hint'}
        />
        {error && (
          <p id="legs-error" className="error">
            {error}
          </p>
        )}
        <p id="legs-hint" className="hint">
          {operators.length > 0 && <>Fields: {operators.map(({ name }) => name).join(', ')}. </>}
          All momenta flow in; none is a vacuum diagram; at most {LIMITS.legs}.
        </p>
      </div>
    </fieldset>
  );
}

interface ListProps {
  readonly operators: readonly Operator[];
  readonly legs: readonly string[];
  readonly onChange: (legs: readonly string[]) => void;
}

/** The legs in order. One is chosen at a time; what can be done with it stands beside, and on keys. */
function LegList({ operators, legs, onChange }: ListProps) {
  const [chosen, setChosen] = useState<number | null>(null);
  const list = useRef<HTMLOListElement>(null);
  const at = chosen !== null && chosen < legs.length ? chosen : null;
  const focus = (index: number) => {
    setChosen(index);
    requestAnimationFrame(() => list.current?.querySelectorAll('button')[index]?.focus());
  };
  const move = (from: number, by: -1 | 1) => {
    onChange(moved(legs, from, by));
    focus(Math.min(legs.length - 1, Math.max(0, from + by)));
  };
  const remove = (index: number) => {
    onChange(without(legs, index));
    if (legs.length > 1) focus(Math.min(index, legs.length - 2));
    else setChosen(null);
  };
  const keys = (event: KeyboardEvent, index: number) => {
    const by = event.key === 'ArrowLeft' ? -1 : event.key === 'ArrowRight' ? 1 : 0;
    if (event.key === 'Delete' || event.key === 'Backspace') remove(index);
    else if (by !== 0 && (event.altKey || event.shiftKey)) move(index, by);
    else if (by !== 0) focus(Math.min(legs.length - 1, Math.max(0, index + by)));
    else return;
    event.preventDefault();
  };
  const spoken = (leg: string) => operatorFor(operators, leg)?.spoken ?? leg;
  if (legs.length === 0) return <p className="quiet legs-none">No legs: vacuum diagrams.</p>;
  return (
    <>
      <ol className="legs" ref={list} aria-label="Legs in order">
        {legs.map((leg, index) => {
          const known = operatorFor(operators, leg);
          return (
            // biome-ignore lint/suspicious/noArrayIndexKey: a leg is its place
            <li key={index}>
              <button
                type="button"
                className={known ? 'leg' : 'leg leg-unknown'}
                aria-pressed={at === index}
                aria-label={`Leg ${index + 1}, ${spoken(leg)}${known ? '' : ', no field of this model'}`}
                onClick={() => setChosen(at === index ? null : index)}
                onKeyDown={(event) => keys(event, index)}
              >
                {known ? <Formula html={known.mathml} /> : <code>{leg}</code>}
                <sub aria-hidden="true">{index + 1}</sub>
              </button>
            </li>
          );
        })}
      </ol>
      {at === null ? (
        <p className="hint leg-tools">Choose a leg to move or remove it; ← → go, Shift ← → move, Delete removes.</p>
      ) : (
        <fieldset className="row leg-tools">
          <legend className="sr-only">
            Leg {at + 1}, {spoken(legs[at]!)}
          </legend>
          <button type="button" className="btn btn-small" disabled={at === 0} onClick={() => move(at, -1)}>
            ← Earlier
          </button>
          <button type="button" className="btn btn-small" disabled={at === legs.length - 1} onClick={() => move(at, 1)}>
            Later →
          </button>
          <button type="button" className="btn btn-small" onClick={() => remove(at)}>
            Remove
          </button>
        </fieldset>
      )}
    </>
  );
}

import type { ModelPreview } from '#contract/api.ts';
import { Formula } from '#features/model/parts.tsx';
import { type Ask, ORDERS, type OrderBy } from './ask.ts';
import { ORDER_WORDS } from './words.ts';

interface Props {
  readonly ask: Ask;
  readonly edit: (part: Partial<Ask>) => void;
  readonly parameters: ModelPreview['parameters'];
  readonly error: string | null;
}

/** The order: loops, powers of couplings one by one, or their total; exactly, or with every lower one. */
export function Order({ ask, edit, parameters, error }: Props) {
  const couplings = couplingsOf(parameters, ask.powers);
  const described = error ? 'order-error' : undefined;
  return (
    <fieldset className="ask-part ask-order" id="part-order">
      <legend>Order</legend>
      <div className="strip" role="radiogroup" aria-label="Order by">
        {ORDERS.map((by) => (
          <label key={by}>
            <input type="radio" name="by" value={by} checked={ask.by === by} onChange={() => edit({ by })} />
            {ORDER_WORDS[by].label}
          </label>
        ))}
      </div>
      <Numeral by="loops" label="Number of loops" ask={ask} edit={edit} described={described} />
      <Numeral by="total" label="Total power" ask={ask} edit={edit} described={described} />
      <div className="order-powers">
        {couplings.length === 0 && <p className="quiet">This model has no coupling.</p>}
        {couplings.map(({ name, mathml }) => (
          <label key={name} className="power">
            {mathml === null ? <code className="bad">{name}</code> : <Formula html={mathml} />}
            <span className="sr-only">power of {name}</span>
            <input
              name={`power:${name}`}
              className="input"
              inputMode="numeric"
              autoComplete="off"
              placeholder="0"
              value={ask.powers.find(([known]) => known === name)?.[1] ?? ''}
              onChange={({ target }) => edit({ powers: withPower(ask.powers, name, target.value) })}
              onKeyDown={(event) => {
                const step = event.key === 'ArrowUp' ? 1 : event.key === 'ArrowDown' ? -1 : 0;
                if (step === 0) return;
                event.preventDefault();
                edit({ powers: withPower(ask.powers, name, stepped(event.currentTarget.value, step)) });
              }}
              aria-invalid={error && ask.by === 'powers' ? true : undefined}
              aria-describedby={described}
            />
          </label>
        ))}
      </div>
      <p className="hint order-hint">{ORDER_WORDS[ask.by].text}.</p>
      {error && (
        <p id="order-error" className="error">
          {error}
        </p>
      )}
      <label className="check">
        <input
          type="checkbox"
          name="through"
          value="yes"
          checked={ask.through}
          onChange={({ target }) => edit({ through: target.checked })}
        />
        <span>All lower orders too</span>
      </label>
    </fieldset>
  );
}

/** The couplings that may bear a power, and names that bear one without being a coupling: those must be seen to be cleared. */
function couplingsOf(parameters: ModelPreview['parameters'], powers: Ask['powers']) {
  const known = parameters.filter(({ role, weight }) => role !== 'propagator' && weight !== '0');
  const strangers = powers.filter(([name]) => known.every((coupling) => coupling.name !== name));
  return [
    ...known.map(({ name, mathml }) => ({ name, mathml })),
    ...strangers.map(([name]) => ({ name, mathml: null })),
  ];
}

interface NumeralProps {
  readonly by: Exclude<OrderBy, 'powers'>;
  readonly label: string;
  readonly ask: Ask;
  readonly edit: (part: Partial<Ask>) => void;
  readonly described: string | undefined;
}

/** A number with a step down and a step up: the native arrows are too small for a thumb. */
function Numeral({ by, label, ask, edit, described }: NumeralProps) {
  const step = (change: 1 | -1) => edit({ [by]: stepped(ask[by], change) });
  return (
    <div className={`order-${by} stepper`}>
      <button type="button" className="btn" aria-label={`${label}: one less`} onClick={() => step(-1)}>
        −
      </button>
      <input
        name={by}
        className="input"
        inputMode="numeric"
        autoComplete="off"
        aria-label={label}
        value={ask[by]}
        onChange={({ target }) => edit({ [by]: target.value })}
        onKeyDown={(event) => {
          const change = event.key === 'ArrowUp' ? 1 : event.key === 'ArrowDown' ? -1 : 0;
          if (change === 0) return;
          event.preventDefault();
          step(change);
        }}
        aria-invalid={described && ask.by === by ? true : undefined}
        aria-describedby={described}
      />
      <button type="button" className="btn" aria-label={`${label}: one more`} onClick={() => step(1)}>
        +
      </button>
    </div>
  );
}

/** One more or one less, never below 0; what is no whole number starts from 0. */
function stepped(value: string, by: 1 | -1): string {
  const number = /^\d{1,4}$/.test(value.trim()) ? Number(value) : 0;
  return String(Math.max(0, number + by));
}

function withPower(powers: Ask['powers'], name: string, value: string): Ask['powers'] {
  const others = powers.filter(([known]) => known !== name);
  return value.trim() === '' ? others : [...others, [name, value.trim()]];
}

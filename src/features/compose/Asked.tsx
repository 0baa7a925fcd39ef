import { Formula } from '#features/model/parts.tsx';
import { type Ask, legsOf } from './ask.ts';
import { type Operator, operatorFor, spokenCorrelator } from './operators.ts';
import { keepWords, orderWords } from './words.ts';

interface AskedProps {
  readonly ask: Ask;
  readonly operators: readonly Operator[];
  readonly order: Parameters<typeof orderWords>[0];
}

/** The question in words of the trade: "⟨h h s s⟩ 1PI, one loop". */
export function Asked({ ask, operators, order }: AskedProps) {
  const legs = legsOf(ask.legs);
  return (
    <div className="asked">
      <p className="asked-legs">
        <span className="sr-only">{spokenCorrelator(operators, legs)}</span>
        <span aria-hidden="true" className="m correlator">
          {legs.length === 0 && operators.length > 0 ? (
            'vacuum'
          ) : (
            <>
              ⟨{legs.length === 0 && '…'}
              {legs.map((leg, index) => {
                const known = operatorFor(operators, leg);
                // biome-ignore lint/suspicious/noArrayIndexKey: a leg is its place
                return known ? <Formula key={index} html={known.mathml} /> : <span key={index}>{leg}</span>;
              })}
              ⟩
            </>
          )}
        </span>
      </p>
      <p className="asked-words">
        {keepWords(ask.keep, ask.drop)}, {orderWords(order, ask.through)}
      </p>
    </div>
  );
}

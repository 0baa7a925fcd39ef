import { InputError } from '../errors.ts';
import { format, isZero, parse, type Rational, sum, ZERO } from '../exact/rational.ts';
import type { Order } from '../graph/theory.ts';
import type { NamedTheory } from './theory.ts';

/** The order of a request as it is written: one of total, loops, or a power for each coupling (those not named are 0). */
export type OrderInput = Readonly<Record<string, string | number>>;

const RESERVED = ['total', 'loops'];

function exact(value: string | number, what: string): Rational {
  try {
    return parse(String(value));
  } catch {
    throw new InputError(
      'wrong-order',
      `The order of ${what} must be an exact number such as 2 or "1/2", not "${value}".`,
    );
  }
}

/** The total weight of each kind, one component. */
function totalOrder(named: NamedTheory, value: string | number, through: boolean): Order {
  const weights = named.kinds.map((kind) => [sum(kind.weights.values())]);
  return { by: 'powers', weights, bound: [exact(value, 'the total')], through };
}

function loopsOrder(named: NamedTheory, value: string | number, through: boolean): Order {
  const bound = Number(value);
  if (!Number.isInteger(bound) || bound < 0 || bound > 60)
    throw new InputError('wrong-order', `"loops" must be a whole number from 0 to 60, not "${value}".`);
  for (const kind of named.kinds)
    if (!Number.isInteger(kind.loops))
      throw new InputError(
        'wrong-order',
        `The vertex ${kind.name} has loop order ${kind.loops}, which is no whole number: bound its power instead.`,
      );
  return { by: 'loops', kindLoops: named.kinds.map((kind) => kind.loops), bound, through };
}

function powersOrder(named: NamedTheory, input: OrderInput, through: boolean): Order {
  for (const name of Object.keys(input)) {
    if (named.couplings.includes(name)) continue;
    if (RESERVED.includes(name))
      throw new InputError(
        'wrong-order',
        `"${name}" stands alone in an order; it cannot be combined with powers of couplings.`,
      );
    const known = named.couplings.length > 0 ? `its couplings are ${named.couplings.join(', ')}` : 'it has no coupling';
    throw new InputError('unknown-name', `The order names "${name}", which is not a coupling of this model: ${known}.`);
  }
  const asked = new Map(Object.entries(input));
  const bound = named.couplings.map((name) => (asked.has(name) ? exact(asked.get(name)!, name) : ZERO));
  const weights = named.kinds.map((kind) => named.couplings.map((name) => kind.weights.get(name) ?? ZERO));
  return { by: 'powers', weights, bound, through };
}

/**
 * The order of a request in integers and rationals: which vertex contents belong to it (physics: "order").
 *
 * Coupling names in `input` must be canonical. @throws InputError wrong-order, unknown-name.
 */
export function readOrder(named: NamedTheory, input: OrderInput, through: boolean): Order {
  const names = Object.keys(input);
  if (names.length === 1 && names[0] === 'total') return totalOrder(named, input.total!, through);
  if (names.length === 1 && names[0] === 'loops') return loopsOrder(named, input.loops!, through);
  return powersOrder(named, input, through);
}

/** "one loop", "λ²", "total order 3": an order in words, for headings. */
export function orderWords(input: OrderInput, through: boolean): string {
  const words = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten'];
  const prefix = through ? 'through ' : '';
  if (input.loops !== undefined) {
    const n = Number(input.loops);
    return n === 0 ? 'tree level' : `${prefix}${words[n] ?? n} loop${n === 1 ? '' : 's'}`;
  }
  if (input.total !== undefined) return `${prefix}total order ${input.total}`;
  const powers = Object.entries(input).filter(([, power]) => !isZero(parse(String(power))));
  if (powers.length === 0) return `${prefix}order zero`;
  return `${prefix}order ${powers.map(([name, power]) => (String(power) === '1' ? name : `${name}^${format(parse(String(power)))}`)).join(' ')}`;
}

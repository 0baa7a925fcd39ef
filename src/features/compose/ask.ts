import type { ExpansionRequest, ModelInput } from '#contract/request.ts';

export type Keep = ExpansionRequest['keep'];
export type Drop = ExpansionRequest['drop'][number];
export type OrderBy = 'loops' | 'total' | 'powers';

/**
 * What the composer holds: the question about a model, as its fields hold it (so numbers are text, and may be wrong).
 * The same names serve the form's fields and the address.
 */
export interface Ask {
  readonly title: string;
  /** Field operators as typed, "h h s s". */
  readonly legs: string;
  readonly by: OrderBy;
  readonly loops: string;
  readonly total: string;
  /** Powers as entries and not as an object, so that a coupling called `__proto__` is a name like any other. */
  readonly powers: readonly (readonly [string, string])[];
  readonly through: boolean;
  readonly keep: Keep;
  readonly drop: readonly Drop[];
}

export const KEEPS: readonly Keep[] = ['1PI', 'connected', 'normalised', 'all'];
export const DROPS: readonly Drop[] = ['self-contractions', 'tadpoles', 'scaleless'];
export const ORDERS: readonly OrderBy[] = ['loops', 'powers', 'total'];

export const FIRST_ASK: Ask = {
  title: '',
  legs: '',
  by: 'loops',
  loops: '1',
  total: '2',
  powers: [],
  through: false,
  keep: '1PI',
  drop: [],
};

/** Field operators in a text such as "⟨h h s s⟩" or "phi, phi^*". */
export const legsOf = (text: string): string[] => text.split(/[\s,;⟨⟩<>]+/u).filter((leg) => leg !== '');

interface Source {
  get(name: string): unknown;
  getAll(name: string): readonly unknown[];
  has(name: string): boolean;
  keys(): Iterable<string>;
}

const POWER = 'power:';

/** The question in an address or a submitted form; what is missing is as in `otherwise`. */
export function askOf(source: Source, otherwise: Ask = FIRST_ASK): Ask {
  const text = (name: string, instead: string): string => {
    const value = source.get(name);
    return typeof value === 'string' ? value.trim() : instead;
  };
  const one = <T extends string>(name: string, choices: readonly T[], instead: T): T =>
    choices.find((choice) => choice === source.get(name)) ?? instead;
  const drops = source.getAll('drop');
  const powers = [...source.keys()]
    .filter((key) => key.startsWith(POWER))
    .map((key) => [key.slice(POWER.length), text(key, '')] as const)
    .filter(([name, power]) => name !== '' && power !== '');
  return {
    title: text('title', otherwise.title).slice(0, 200),
    legs: text('legs', otherwise.legs),
    by: one('by', ORDERS, otherwise.by),
    loops: text('loops', otherwise.loops),
    total: text('total', otherwise.total),
    powers: powers.length > 0 || source.has('by') ? powers : otherwise.powers,
    through: source.has('by') ? source.get('through') === 'yes' : otherwise.through,
    keep: one('keep', KEEPS, otherwise.keep),
    drop: source.has('keep') ? DROPS.filter((drop) => drops.includes(drop)) : otherwise.drop,
  };
}

/** The question as the query of an address; `askOf` reads it back. Only the order that is asked by is written. */
export function queryOf(ask: Ask): URLSearchParams {
  const query = new URLSearchParams({ legs: legsOf(ask.legs).join(' '), by: ask.by });
  if (ask.by === 'powers') for (const [name, power] of ask.powers) query.set(POWER + name, power);
  else query.set(ask.by, ask[ask.by]);
  if (ask.through) query.set('through', 'yes');
  query.set('keep', ask.keep);
  for (const drop of ask.drop) query.append('drop', drop);
  if (ask.title !== '') query.set('title', ask.title);
  return query;
}

/** A power as the contract wants it: a whole number, else the text itself ("1/2"); nothing typed is no power. */
const power = (text: string): string | number => (/^[+-]?\d{1,4}$/.test(text) ? Number(text) : text.replace('−', '-'));

function orderOf({ by, loops, total, powers }: Ask): ExpansionRequest['order'] {
  if (by === 'total') return { total: power(total) };
  if (by === 'loops') return { loops: /^\d+$/.test(loops) ? Number(loops) : Number.NaN };
  return Object.fromEntries(powers.filter(([, text]) => text !== '').map(([name, text]) => [name, power(text)]));
}

/** The expansion that is asked for. Not yet checked: the numbers are what was typed. */
export function requestOf(input: ModelInput, ask: Ask): ExpansionRequest {
  return {
    ...input,
    legs: legsOf(ask.legs),
    order: orderOf(ask),
    through: ask.through,
    keep: ask.keep,
    drop: [...ask.drop],
    with: [],
  };
}

/** The question that a stored request answered: to ask again with a change. */
export function askOfRequest(request: ExpansionRequest): Ask {
  const entries = Object.entries(request.order).map(([name, value]) => [name, String(value)] as const);
  const alone = entries.length === 1 ? entries[0]! : undefined;
  const by: OrderBy = alone?.[0] === 'loops' ? 'loops' : alone?.[0] === 'total' ? 'total' : 'powers';
  return {
    ...FIRST_ASK,
    legs: request.legs.join(' '),
    by,
    ...(by === 'powers' ? { powers: entries } : { [by]: alone![1] }),
    through: request.through,
    keep: request.keep,
    drop: request.drop,
  };
}

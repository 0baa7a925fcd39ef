import type { ExpansionRequest } from '#contract/request.ts';
import type { Drop, Keep, OrderBy } from './ask.ts';

interface Choice {
  readonly label: string;
  readonly text: string;
}

export const KEEP_WORDS: Readonly<Record<Keep, Choice>> = {
  '1PI': { label: '1PI', text: 'Γ: connected, amputated, in one piece when any one internal line is cut' },
  connected: { label: 'Connected', text: 'W: one piece' },
  normalised: { label: 'Normalised', text: 'Z[J]/Z[0]: every piece has an external point' },
  all: { label: 'All', text: 'Z[J]: vacuum pieces included' },
};

export const DROP_WORDS: Readonly<Record<Drop, Choice>> = {
  'self-contractions': {
    label: 'Self-contractions',
    text: 'lines with both ends on one vertex (normal ordering)',
  },
  tadpoles: { label: 'Tadpoles', text: 'lines whose cut leaves a piece without external legs' },
  scaleless: { label: 'Scaleless pieces', text: 'zero for massless fields in dimensional regularisation' },
};

export const ORDER_WORDS: Readonly<Record<OrderBy, Choice>> = {
  loops: { label: 'Loops', text: 'L = I − V + C; loop orders of counterterms included' },
  powers: { label: 'Powers of couplings', text: 'The exact power of each; empty is 0' },
  total: { label: 'Total power', text: 'The sum of all powers, weighted' },
};

/** Greek letters by their names. */
export const GREEK: Readonly<Record<string, string>> = Object.fromEntries(
  (
    'alpha α beta β gamma γ delta δ epsilon ε zeta ζ eta η theta θ iota ι kappa κ lambda λ mu μ nu ν xi ξ pi π rho ρ ' +
    'sigma σ tau τ upsilon υ phi φ chi χ psi ψ omega ω Gamma Γ Delta Δ Theta Θ Lambda Λ Xi Ξ Pi Π Sigma Σ Phi Φ Psi Ψ Omega Ω'
  )
    .match(/\S+ \S+/gu)!
    .map((pair) => pair.split(' ') as [string, string]),
);

/** "lambda" → "λ", "lambda_3" → "λ_3": a name as one reads it. */
export const nameWords = (name: string): string => name.replace(/^[A-Za-z]+/, (word) => GREEK[word] ?? word);

const COUNTS = ['tree level', 'one loop', 'two loops', 'three loops', 'four loops', 'five loops', 'six loops'];
const RAISED: Readonly<Record<string, string>> = Object.fromEntries(
  [...'0123456789-/'].map((digit, at) => [digit, [...'⁰¹²³⁴⁵⁶⁷⁸⁹⁻⸍'][at]!]),
);
export const raised = (power: string): string => [...power].map((digit) => RAISED[digit] ?? digit).join('');

/** "h h s s" as "h² s²", "phi phi^*" as "φ φ*": the fields of a vertex. */
export function monomialWords(fields: readonly string[]): string {
  const counts = new Map<string, number>();
  for (const field of fields) counts.set(field, (counts.get(field) ?? 0) + 1);
  return [...counts]
    .map(([field, n]) => nameWords(field).replace('^*', '*') + (n === 1 ? '' : raised(String(n))))
    .join(' ');
}

/** "through two loops", "order lambda²": an order in words. */
export function orderWords(order: ExpansionRequest['order'], through: boolean): string {
  const entries = Object.entries(order).map(([name, value]) => [name, String(value)] as const);
  const only = entries.length === 1 ? entries[0] : undefined;
  const prefix = through ? 'through ' : '';
  if (only?.[0] === 'loops') return prefix + (COUNTS[Number(only[1])] ?? `${only[1]} loops`);
  if (only?.[0] === 'total') return `${prefix}total power ${only[1]}`;
  const powers = entries
    .filter(([, power]) => power !== '0')
    .map(([name, power]) => nameWords(name) + (power === '1' ? '' : raised(power)));
  return powers.length === 0 ? `${prefix}order zero` : `${prefix}order ${powers.join(' ')}`;
}

const KEPT: Readonly<Record<Keep, string>> = {
  '1PI': '1PI',
  connected: 'connected',
  normalised: 'normalised',
  all: 'all diagrams',
};

export function keepWords(keep: Keep, drop: readonly Drop[]): string {
  const without = drop.map((name) => (name === 'scaleless' ? 'scaleless pieces' : name));
  return KEPT[keep] + (without.length === 0 ? '' : `, without ${without.join(' or ')}`);
}

const DIGITS = new Intl.NumberFormat('en-GB');

/** "1 diagram", "about 12,000 diagrams": an estimate is rounded to what it can mean. */
export function countWords(classes: number, quality: 'exact' | 'estimate'): string {
  const exact = quality === 'exact';
  const scale = 10 ** Math.max(0, Math.floor(Math.log10(Math.max(1, classes))) - 1);
  const shown = exact ? classes : Math.round(classes / scale) * scale;
  if (shown > 1e15) return `about 10${raised(String(Math.round(Math.log10(shown))))} diagrams`;
  return `${exact ? '' : 'about '}${DIGITS.format(Math.round(shown))} ${shown === 1 ? 'diagram' : 'diagrams'}`;
}

/** "under a second", "about 40 s", "about 3 min". */
export function timeWords(seconds: number): string {
  if (seconds < 1) return 'under a second';
  if (seconds < 90) return `about ${Math.ceil(seconds)} s`;
  if (seconds < 5400) return `about ${Math.round(seconds / 60)} min`;
  return `about ${DIGITS.format(Math.round(seconds / 3600))} h`;
}

/** Time gone by: "0 s", "1 min 20 s". */
export function elapsedWords(milliseconds: number): string {
  const seconds = Math.max(0, Math.round(milliseconds / 1000));
  if (seconds < 60) return `${seconds} s`;
  const minutes = Math.floor(seconds / 60);
  if (minutes < 60) return `${minutes} min ${seconds % 60} s`;
  return `${Math.floor(minutes / 60)} h ${minutes % 60} min`;
}

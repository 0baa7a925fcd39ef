import type { ExpansionRequest } from '#contract/request.ts';

const WORDS = ['tree level', 'one loop', 'two loops', 'three loops', 'four loops', 'five loops', 'six loops'];

function orderWords(order: ExpansionRequest['order'], through: boolean): string {
  const prefix = through ? 'through ' : '';
  const powers = Object.entries(order);
  const [name, value] = powers[0] ?? ['total', 0];
  if (powers.length === 1 && name === 'loops') return `${prefix}${WORDS[Number(value)] ?? `${value} loops`}`;
  if (powers.length === 1 && name === 'total') return `${prefix}total order ${value}`;
  const words = powers
    .filter(([, power]) => String(power) !== '0')
    .map(([coupling, power]) => (String(power) === '1' ? coupling : `${coupling}^${power}`));
  return `${prefix}order ${words.join(' ') || 'zero'}`;
}

/** "⟨h h s s⟩, one loop, 1PI": the title of an expansion that was given none. */
export function titleOf(request: ExpansionRequest): string {
  const legs = request.legs.length > 0 ? `⟨${request.legs.join(' ')}⟩` : 'Vacuum diagrams';
  const drop = request.drop.length > 0 ? `, without ${request.drop.join(', ')}` : '';
  const keep = request.keep === 'all' ? 'all diagrams' : request.keep;
  return `${legs}, ${orderWords(request.order, request.through)}, ${keep}${drop}`.slice(0, 200);
}

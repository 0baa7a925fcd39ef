import type { CountingRequest } from '../graph/theory.ts';

/** One or two sentences that say what the independent sum is, for the ledger's heading. */
export function methodText({ keep, drop, order }: CountingRequest): string {
  const parts = [
    {
      all: 'Perfect matchings of all half-lines: the coefficients of the zero-dimensional generating function Z.',
      normalised: 'Coefficients of the zero-dimensional ratio Z[J]/Z[0].',
      connected: 'Coefficients of the zero-dimensional logarithm W = log Z.',
      '1PI': 'Coefficients of the zero-dimensional Legendre transform Γ at φ = 0, less the free quadratic part.',
    }[keep],
  ];
  if (drop.includes('scaleless'))
    parts.push(
      'Pieces without external legs that hang on one vertex or line are subtracted by vertices whose expectation is the bare vertex.',
    );
  else if (drop.includes('self-contractions'))
    parts.push('Self-contractions are subtracted by normal-ordered vertices.');
  if (drop.includes('tadpoles') && keep !== '1PI')
    parts.push('Tadpoles are subtracted by the source that makes ⟨φ⟩ vanish.');
  if (order.by === 'loops' && (keep === 'all' || keep === 'normalised'))
    parts.push('Loops are counted by exponentiating the connected sums, graded by loop number.');
  return parts.join(' ');
}

import { greekLetter } from './symbols.ts';

/** A canonical name with its Greek letter: "phi" → "φ", "m_h" stays, "phi_1" → "φ₁". */
export function nameLetters(name: string): string {
  const [base = '', ...rest] = name.split('_');
  const lowered = rest.join(',').replace(/\d/g, (digit) => '₀₁₂₃₄₅₆₇₈₉'[Number(digit)]!);
  return (greekLetter(base) ?? base) + lowered;
}

/** Spellings of symbols: one canonical ASCII name each, and how that name is typeset. */

const LOWER =
  'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma tau upsilon phi chi psi omega';
const UPPER = 'Gamma Delta Theta Lambda Xi Pi Sigma Upsilon Phi Psi Omega';

/** Greek names with a LaTeX command of their own. */
export const GREEK: ReadonlySet<string> = new Set(`${LOWER} ${UPPER}`.split(' ').filter((name) => name !== 'omicron'));

/** Variant commands that are the same symbol in another cut of the letter. */
export const VARIANTS: ReadonlyMap<string, string> = new Map([
  ['varphi', 'phi'],
  ['varepsilon', 'epsilon'],
  ['vartheta', 'theta'],
  ['varrho', 'rho'],
  ['varsigma', 'sigma'],
  ['varkappa', 'kappa'],
  ['varpi', 'pi'],
]);

const GREEK_CHARACTERS = new Map<string, string>([
  ...[...'αβγδεζηθικλμνξοπρστυφχψω'].map((c, i): [string, string] => [c, LOWER.split(' ')[i]!]),
  ...[...'ΓΔΘΛΞΠΣΥΦΨΩ'].map((c, i): [string, string] => [c, UPPER.split(' ')[i]!]),
  ['ϕ', 'phi'],
  ['ϵ', 'epsilon'],
  ['ϑ', 'theta'],
  ['ϱ', 'rho'],
  ['ϰ', 'kappa'],
  ['ς', 'sigma'],
  ['ϖ', 'pi'],
  ['µ', 'mu'],
  ['ℓ', 'ell'],
  ['ħ', 'hbar'],
]);

/** Other symbols that have a LaTeX command of the same name. */
const NAMED_COMMANDS: ReadonlySet<string> = new Set(['ell', 'hbar']);

export const isNamedCommand = (command: string): boolean => GREEK.has(command) || NAMED_COMMANDS.has(command);

const LETTERS = new Map([...GREEK_CHARACTERS].reverse().map(([character, name]) => [name, character]));
/** The character of a Greek name, or null. */
export const greekLetter = (name: string): string | null => LETTERS.get(name) ?? null;

/** The name of a Greek (or ℓ, ħ) character, or null. */
export const greekName = (character: string): string | null => GREEK_CHARACTERS.get(character) ?? null;

/** Characters of mathematical alphabets as their plain letters (𝜙 → φ, 𝑚 → m); anything else unchanged. */
export function plainCharacter(character: string): string {
  const code = character.codePointAt(0)!;
  return code >= 0x1d400 && code <= 0x1d7ff ? character.normalize('NFKC') : character;
}

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';
/** Digit of a superscript character, or −1. */
export const superscriptDigit = (c: string): number => (c === '' ? -1 : SUPERSCRIPTS.indexOf(c));
export const subscriptDigit = (c: string): number => (c === '' ? -1 : SUBSCRIPTS.indexOf(c));

/** Numerator and denominator of a fraction character. */
export const FRACTIONS: ReadonlyMap<string, readonly [number, number]> = new Map([
  ['½', [1, 2]],
  ['⅓', [1, 3]],
  ['⅔', [2, 3]],
  ['¼', [1, 4]],
  ['¾', [3, 4]],
  ['⅕', [1, 5]],
  ['⅖', [2, 5]],
  ['⅗', [3, 5]],
  ['⅘', [4, 5]],
  ['⅙', [1, 6]],
  ['⅚', [5, 6]],
  ['⅐', [1, 7]],
  ['⅛', [1, 8]],
  ['⅜', [3, 8]],
  ['⅝', [5, 8]],
  ['⅞', [7, 8]],
  ['⅑', [1, 9]],
  ['⅒', [1, 10]],
]);

/** Splits a name into Greek names and other runs: "phichi" → phi, chi; null when it is not Greek names throughout. */
function greekRun(text: string): string[] | null {
  if (text === '') return [];
  for (const name of GREEK) {
    if (!text.startsWith(name)) continue;
    const rest = greekRun(text.slice(name.length));
    if (rest) return [name, ...rest];
  }
  return null;
}

function subscriptLatex(text: string): string {
  const greek = text.length <= 40 ? greekRun(text) : null;
  return greek ? greek.map((name) => `\\${name}`).join(' ') : text.replaceAll('_', '\\_');
}

/** How a canonical name is typeset; reading it back gives the same name. "phi" → \phi, "m_h" → m_{h}, "dZ" → \mathit{dZ}. */
export function nameLatex(name: string): string {
  const underscore = name.indexOf('_');
  const base = underscore < 0 ? name : name.slice(0, underscore);
  const command = isNamedCommand(base);
  const baseLatex = command ? `\\${base}` : base.length === 1 ? base : `\\mathit{${base}}`;
  return underscore < 0 ? baseLatex : `${baseLatex}_{${subscriptLatex(name.slice(underscore + 1))}}`;
}

/** Lorentz indices: what may stand at a ∂ and marks anything else as a vector or tensor. */
export const LORENTZ: ReadonlySet<string> = new Set([
  'mu',
  'nu',
  'rho',
  'sigma',
  'kappa',
  'tau',
  'alpha',
  'beta',
  'gamma',
  'delta',
  'lambda',
]);

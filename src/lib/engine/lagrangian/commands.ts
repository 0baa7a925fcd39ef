import { GREEK, isNamedCommand, VARIANTS } from './symbols.ts';

/** What a LaTeX command means to the reader. */
export type Meaning =
  | { readonly is: 'name'; readonly name: string }
  | { readonly is: 'mark'; readonly mark: string }
  | { readonly is: 'word'; readonly kind: 'derivative' | 'box' | 'sqrt' | 'conj' | 'frac' | 'over' }
  /** Skipped: spacing, sizes, fonts. */
  | { readonly is: 'skip' }
  /** Skipped with its argument in braces. */
  | { readonly is: 'skip-argument' }
  /** Its argument spells one name. */
  | { readonly is: 'spelling' }
  | { readonly is: 'refused'; readonly message: string };

const words = (text: string): string[] => text.split(' ');
const SKIPPED = [
  ...words(', ; : ! / > ( ) [ ]'),
  ...words('quad qquad left right big Big bigg Bigg bigl bigr Bigl Bigr biggl biggr Biggl Biggr'),
  ...words('displaystyle textstyle scriptstyle limits nolimits nonumber notag rm it bf cal mathstrut allowbreak'),
  ...words('thinspace medspace hfill newline space'),
];
const WITH_ARGUMENT = words('label tag begin end hspace vspace hphantom phantom');
const SPELLINGS = words('mathrm mathit mathcal mathscr mathsf text textrm textit operatorname mbox hbox');
const FUNCTIONS = words('sin cos tan cot sinh cosh tanh exp log ln det lim');
const MULTIPLETS = words('vec boldsymbol mathbf bm textbf');
const DECORATIONS = words('tilde hat check breve acute grave widetilde widehat prime');

const FIXED: ReadonlyMap<string, Meaning> = new Map<string, Meaning>([
  ...SKIPPED.map((c): [string, Meaning] => [c, { is: 'skip' }]),
  ...WITH_ARGUMENT.map((c): [string, Meaning] => [c, { is: 'skip-argument' }]),
  ...SPELLINGS.map((c): [string, Meaning] => [c, { is: 'spelling' }]),
  [' ', { is: 'skip' }],
  ['\n', { is: 'skip' }],
  ['\\', { is: 'skip' }],
  ['{', { is: 'mark', mark: '(' }],
  ['}', { is: 'mark', mark: ')' }],
  ['%', { is: 'refused', message: 'A per cent sign has no meaning in a Lagrangian.' }],
  ...words('lvert rvert vert mid').map((c): [string, Meaning] => [c, { is: 'mark', mark: '|' }]),
  ...words('cdot times ast star cdotp').map((c): [string, Meaning] => [c, { is: 'mark', mark: '*' }]),
  ['div', { is: 'mark', mark: '/' }],
  ['slash', { is: 'mark', mark: '/' }],
  ['dagger', { is: 'mark', mark: '†' }],
  ['dag', { is: 'mark', mark: '†' }],
  ['equiv', { is: 'mark', mark: '=' }],
  ['lbrace', { is: 'mark', mark: '(' }],
  ['rbrace', { is: 'mark', mark: ')' }],
  ['partial', { is: 'word', kind: 'derivative' }],
  ...words('Box square').map((c): [string, Meaning] => [c, { is: 'word', kind: 'box' }]),
  ['sqrt', { is: 'word', kind: 'sqrt' }],
  ...words('bar overline').map((c): [string, Meaning] => [c, { is: 'word', kind: 'conj' }]),
  ...words('frac tfrac dfrac cfrac nicefrac sfrac').map((c): [string, Meaning] => [c, { is: 'word', kind: 'frac' }]),
  ['over', { is: 'word', kind: 'over' }],
  ...FUNCTIONS.map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: `\\${c} is not polynomial; expand it in powers of the field first.` },
  ]),
  ...MULTIPLETS.map((c): [string, Meaning] => [
    c,
    {
      is: 'refused',
      message: `\\${c} marks a multiplet. Multiplets are not read yet: write the components as fields of their own.`,
    },
  ]),
  ...DECORATIONS.map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: `\\${c} is not part of a name here; use a subscript instead.` },
  ]),
  ...words('int sum prod oint').map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: `\\${c} is not read: give the Lagrangian density itself, as a sum of monomials.` },
  ]),
  ...words('dots ldots cdots').map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: 'Dots leave terms unsaid; write every term.' },
  ]),
  ...words('slashed not').map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: `\\${c} belongs to fermions, which are out of scope: only scalar fields are read.` },
  ]),
  ...words('dot ddot').map((c): [string, Meaning] => [
    c,
    { is: 'refused', message: `\\${c} is not read: write a derivative as d phi or \\partial\\phi.` },
  ]),
  ['nabla', { is: 'refused', message: 'Write derivatives as \\partial_\\mu … \\partial^\\mu; ∇ is not read.' }],
  ['pm', { is: 'refused', message: 'A sign must be + or −, not ±.' }],
  ['mp', { is: 'refused', message: 'A sign must be + or −, not ∓.' }],
]);

/** Environments that wrap a formula. */
export const ENVIRONMENTS: ReadonlySet<string> = new Set(
  words('equation align aligned alignat gather gathered multline split eqnarray displaymath math array').flatMap(
    (name) => [name, `${name}*`],
  ),
);

/** Every command of letters that has a meaning or a refusal of its own. */
export const knownCommands = (): readonly string[] =>
  [...GREEK, ...VARIANTS.keys(), ...FIXED.keys()].filter((name) => /^[A-Za-z]/.test(name));

/** The meaning of the command \name, or null when the language does not know it. */
export function meaningOf(name: string): Meaning | null {
  const variant = VARIANTS.get(name);
  if (variant) return { is: 'name', name: variant };
  if (isNamedCommand(name)) return { is: 'name', name };
  return FIXED.get(name) ?? null;
}

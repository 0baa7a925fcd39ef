import algebrite from 'algebrite';
import { format, parse, type Rational } from '#engine/exact/rational.ts';
import type { Model, VertexKind } from '#engine/index.ts';
import { plainVertexNumber } from '#engine/index.ts';

/**
 * The one place where the general computer algebra system is spoken to. It is a single global workspace whose answers and errors
 * are both text, so: never a user's text, only names made here; the workspace is cleared around each use; small inputs only; and
 * what comes back is parsed again.
 */

/** Kinds of one model, and half-lines of one vertex, that are checked: larger ones are left out, not half done. */
const MOST_KINDS = 60;
const MOST_FIELDS = 12;
/** Terms of one kind: derivatives of a long sum would take the job's time. */
const MOST_TERMS = 20;

const RATIONAL = /^-?\d+(\/\d+)?$/;

function run(script: string): string {
  try {
    algebrite.run('clearall');
    return algebrite.run(script);
  } finally {
    algebrite.run('clearall');
  }
}

/** The rational number that a script comes to. @throws Error when the answer is anything else. */
function evaluate(script: string): Rational {
  const answer = run(script).trim();
  if (!RATIONAL.test(answer)) throw new Error(`the computer algebra system answered "${answer.slice(0, 80)}"`);
  return parse(answer);
}

/** What came of one kind: null where derivative couplings or irrational numbers are beyond this check. */
export interface RuleCheck {
  readonly kind: number;
  readonly agrees: boolean | null;
}

/** The names a1, a2, … for the half-lines of a vertex, equal ones alike. */
function generatedNames({ fields }: VertexKind): string[] {
  const names = new Map<string, string>();
  return fields.map(({ field, conjugate }) => {
    const key = `${field} ${conjugate}`;
    if (!names.has(key)) names.set(key, `a${names.size + 1}`);
    return names.get(key)!;
  });
}

/**
 * Whether a number is what repeated differentiation of a kind's terms leaves: i and couplings taken out. null where this check does
 * not reach: irrational numbers, too many half-lines or terms.
 */
export function derivativeAgrees(kind: VertexKind, number: Rational): boolean | null {
  const numbers = kind.terms.map((term) => (term.number.parts.length === 1 ? term.number.parts[0]! : null));
  if (kind.fields.length > MOST_FIELDS || kind.terms.length > MOST_TERMS) return null;
  if (numbers.some((part) => part?.root !== 1n || part.im.num !== 0n || part.pi.num !== 0n)) return null;
  const names = generatedNames(kind);
  const monomial = names.join('*');
  const polynomial = numbers.map((part) => `(${format(part!.re)})*${monomial}`).join('+');
  const derivative = names.reduce((inner, name) => `d(${inner},${name})`, polynomial);
  const theirs = evaluate(derivative);
  return theirs.num * number.den === number.num * theirs.den;
}

function checkKind(kind: VertexKind): boolean | null {
  const own = plainVertexNumber(kind);
  return own === null ? null : derivativeAgrees(kind, own);
}

/**
 * Checks the number of every vertex rule without derivative couplings: the potential term is differentiated, half-line by
 * half-line, by the computer algebra system, and compared exactly with the engine's.
 */
export const checkRules = ({ kinds }: Model): RuleCheck[] =>
  kinds.slice(0, MOST_KINDS).map((kind, at) => ({ kind: at, agrees: checkKind(kind) }));

/** @throws Error naming the vertex when a rule disagrees with its independent derivative: a defect, never a user's mistake. */
export function assertRules(model: Model): void {
  for (const { kind, agrees } of checkRules(model))
    if (agrees === false) throw new Error(`the rule of the vertex ${model.kinds[kind]!.coupling} failed its check`);
}

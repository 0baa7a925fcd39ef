import type { ExpansionRecord } from '#contract/api.ts';
import { GREEK, keepWords, orderWords } from '#features/compose/words.ts';

/** What a list shows of an expansion. */
export interface ExpansionRow {
  readonly id: string;
  readonly title: string;
  /** LaTeX of the correlator; null for vacuum diagrams. */
  readonly correlator: string | null;
  readonly order: string;
  readonly keep: string;
  readonly state: ExpansionRecord['state'];
  /** Diagrams of the list: known when it is complete, so far while it runs. */
  readonly classes: number | null;
  readonly createdAt: string;
}

export const STATE_WORDS: Readonly<Record<ExpansionRecord['state'], string>> = {
  queued: 'waiting',
  running: 'running',
  complete: 'complete',
  failed: 'failed',
  cancelled: 'cancelled',
  interrupted: 'interrupted',
  unbalanced: 'unbalanced',
};

/** A name of a field operator as LaTeX: Greek names as letters, digits and what follows "_" lowered, "*" raised. */
export function operatorLatex(name: string): string {
  const conjugate = name.endsWith('^*');
  const [base = '', ...lowered] = (conjugate ? name.slice(0, -2) : name).split('_');
  const [, letters = base, digits = ''] = /^(.*?)(\d*)$/su.exec(base) ?? [];
  const index = [digits, ...lowered].filter((part) => part !== '').map(letterLatex);
  const field = letterLatex(letters) + (index.length === 0 ? '' : `_{${index.join(',')}}`);
  return conjugate ? `${field}^{*}` : field;
}

function letterLatex(word: string): string {
  if (Object.hasOwn(GREEK, word)) return `\\${word}`;
  return word.length <= 1 || /^\d+$/.test(word) ? word : `\\mathrm{${word}}`;
}

export function rowOf({ id, title, request, state, summary, progress, createdAt }: ExpansionRecord): ExpansionRow {
  const legs = request.legs.map(operatorLatex);
  return {
    id,
    title,
    correlator: legs.length === 0 ? null : `\\langle ${legs.join('\\,')}\\rangle`,
    order: orderWords(request.order, request.through),
    keep: keepWords(request.keep, request.drop),
    state,
    classes: summary?.classes ?? (state === 'running' ? progress.classes : null),
    createdAt,
  };
}

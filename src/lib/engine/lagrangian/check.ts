/** One thing that was looked at in a model, and how it came out. */
export interface Check {
  readonly code: string;
  readonly title: string;
  readonly verdict: 'good' | 'note' | 'caution' | 'bad';
  readonly text: string;
}

/** Lists longer than this are cut, and say so. */
export const SHOWN = 8;

export const listed = (items: readonly string[], mark = ', '): string =>
  items.length > SHOWN ? `${items.slice(0, SHOWN).join(mark)} and ${items.length - SHOWN} more` : items.join(mark);

import { expansionChapter } from './expansion.ts';
import { ledgerChapter } from './ledger.ts';
import { modelChapter } from './model.ts';
import type { Chapter, Entry } from './types.ts';

/** Every definition of the program, in the order of the conventions page. Pop-overs show `short` and link to the anchor. */
export const chapters: readonly Chapter[] = [modelChapter, expansionChapter, ledgerChapter];

const entries = new Map(chapters.flatMap((chapter) => chapter.entries.map((entry) => [entry.id, entry] as const)));

/** The definition with this anchor. @throws Error for an unknown id: a defect of the page that asks. */
export function definition(id: string): Entry {
  const entry = entries.get(id);
  if (!entry) throw new Error(`the glossary has no entry "${id}"`);
  return entry;
}

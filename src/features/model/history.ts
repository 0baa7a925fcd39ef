/** Undo and redo as data: past states, the present one, future ones. Every function returns a new value. */
export interface History<T> {
  readonly past: readonly T[];
  readonly present: T;
  readonly future: readonly T[];
  /** What the last change was and when: typing in one place within a second is one step. */
  readonly last: { readonly tag: string; readonly at: number } | null;
}

/** Steps that are kept. */
export const STEPS = 200;
const TOGETHER_MS = 1000;

export const begin = <T>(present: T): History<T> => ({ past: [], present, future: [], last: null });

/** Records a change. Changes with one non-empty tag that follow each other within a second become one step. */
export function change<T>(history: History<T>, present: T, tag: string, at: number): History<T> {
  const joins = tag !== '' && history.last?.tag === tag && at - history.last.at < TOGETHER_MS;
  const past = joins ? history.past : [...history.past, history.present].slice(-STEPS);
  return { past, present, future: [], last: { tag, at } };
}

export function undo<T>(history: History<T>): History<T> {
  const previous = history.past.at(-1);
  if (previous === undefined) return history;
  return {
    past: history.past.slice(0, -1),
    present: previous,
    future: [history.present, ...history.future],
    last: null,
  };
}

export function redo<T>(history: History<T>): History<T> {
  const [next, ...future] = history.future;
  if (next === undefined) return history;
  return { past: [...history.past, history.present], present: next, future, last: null };
}

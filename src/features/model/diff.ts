export interface DiffLine {
  readonly kind: 'same' | 'gone' | 'new';
  readonly text: string;
}

/**
 * Lines of two texts beside each other: a longest common subsequence is "same", the rest "gone" or "new".
 * O(n·m) in the numbers of lines; Lagrangians have few.
 */
export function lineDiff(before: string, after: string): readonly DiffLine[] {
  const old = before.split('\n');
  const now = after.split('\n');
  const lengths = common(old, now);
  const lines: DiffLine[] = [];
  let i = 0;
  let j = 0;
  while (i < old.length || j < now.length) {
    if (i < old.length && j < now.length && old[i] === now[j]) {
      lines.push({ kind: 'same', text: old[i]! });
      i++;
      j++;
    } else if (j >= now.length || (i < old.length && lengths[i + 1]![j]! >= lengths[i]![j + 1]!))
      lines.push({ kind: 'gone', text: old[i++]! });
    else lines.push({ kind: 'new', text: now[j++]! });
  }
  return lines;
}

/** lengths[i][j]: length of the longest common subsequence of old[i…] and now[j…]. */
function common(old: readonly string[], now: readonly string[]): readonly (readonly number[])[] {
  const lengths = Array.from({ length: old.length + 1 }, () => new Array<number>(now.length + 1).fill(0));
  for (let i = old.length - 1; i >= 0; i--)
    for (let j = now.length - 1; j >= 0; j--)
      lengths[i]![j] =
        old[i] === now[j] ? lengths[i + 1]![j + 1]! + 1 : Math.max(lengths[i + 1]![j]!, lengths[i]![j + 1]!);
  return lengths;
}

/** A stretch of the Lagrangian text to be drawn under: offsets in UTF-16 code units, end exclusive. */
export interface Mark {
  readonly start: number;
  readonly end: number;
  readonly kind: 'mistake' | 'note' | 'lit';
}

export interface Segment {
  readonly text: string;
  readonly kinds: readonly Mark['kind'][];
}

/** Offsets of a place given as 1-based line and column; a place beyond the text is its last character. */
export function offsetsOf(
  text: string,
  place: { readonly line: number | null; readonly column: number | null; readonly length?: number | undefined },
): { readonly start: number; readonly end: number } | null {
  if (place.line === null || place.column === null) return null;
  const lines = text.split('\n');
  const before = lines.slice(0, place.line - 1).reduce((sum, line) => sum + line.length + 1, 0);
  const start = Math.min(before + place.column - 1, Math.max(0, text.length - 1));
  return { start, end: Math.min(Math.max(start + (place.length ?? 1), start + 1), text.length) };
}

/** The text cut at every edge of a mark. Joining the segments gives the text back. */
export function segments(text: string, marks: readonly Mark[]): readonly Segment[] {
  const edges = new Set([0, text.length]);
  for (const { start, end } of marks) {
    edges.add(Math.min(Math.max(0, start), text.length));
    edges.add(Math.min(Math.max(0, end), text.length));
  }
  const cuts = [...edges].sort((one, other) => one - other);
  return cuts.slice(0, -1).map((start, index) => ({
    text: text.slice(start, cuts[index + 1]),
    kinds: marks.filter((mark) => mark.start <= start && mark.end >= cuts[index + 1]!).map((mark) => mark.kind),
  }));
}

/** The text with a stretch replaced, and where the caret then stands. */
export function replaceStretch(
  text: string,
  stretch: { readonly start: number; readonly end: number },
  by: string,
): { readonly text: string; readonly caret: number } {
  return { text: text.slice(0, stretch.start) + by + text.slice(stretch.end), caret: stretch.start + by.length };
}

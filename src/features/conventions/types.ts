/** One definition. `$…$` in any text is LaTeX. */
export interface Entry {
  /** Anchor on the conventions page. */
  readonly id: string;
  readonly term: string;
  /** One sentence: what a pop-over shows. */
  readonly short: string;
  /** The whole definition, in paragraphs; `display` formulas stand on a line of their own. */
  readonly body: readonly (string | { readonly display: string })[];
  /** Published sources, or "common practice". */
  readonly sources: readonly string[];
}

export interface Chapter {
  readonly id: string;
  readonly title: string;
  readonly entries: readonly Entry[];
}

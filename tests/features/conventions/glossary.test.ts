import { describe, expect, it } from 'vitest';
import { chapters, definition } from '#features/conventions/glossary.ts';
import { escapeHtml, mathml } from '#typeset/mathml.ts';

const entries = chapters.flatMap((chapter) => chapter.entries);

describe('glossary', () => {
  it('has one anchor for each definition', () => {
    const ids = [...chapters.map((chapter) => chapter.id), ...entries.map((entry) => entry.id)];
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^[a-z][a-z-]*$/);
  });

  it('gives every definition a short form of at most 160 characters and a source', () => {
    for (const entry of entries) {
      expect(entry.short.length, entry.id).toBeLessThanOrEqual(160);
      expect(entry.sources.length, entry.id).toBeGreaterThan(0);
    }
  });

  it('typesets every formula', () => {
    for (const entry of entries)
      for (const part of [entry.short, ...entry.body]) {
        const formulas =
          typeof part === 'string' ? part.split('$').filter((_, index) => index % 2 === 1) : [part.display];
        if (typeof part === 'string') expect(part.split('$').length % 2, entry.id).toBe(1);
        for (const formula of formulas) expect(mathml(formula), formula).toMatch(/^<math/);
      }
  });

  it('refuses an unknown anchor', () => {
    expect(() => definition('nothing')).toThrow(/nothing/);
  });
});

describe('mathml', () => {
  it('draws a script L as the letter itself', () => {
    expect(mathml('\\mathcal{L}')).toContain('ℒ');
  });

  it('carries no inline style, link, script or source annotation', () => {
    for (const latex of [
      '\\frac{\\lambda}{4!}\\phi^4',
      '\\href{javascript:alert(1)}{x}',
      '\\htmlStyle{color:red}{x}',
      '\\rule{9999em}{1em}',
    ])
      expect(mathml(latex)).not.toMatch(/style=|href=|<script|annotation|9999/);
  });

  it('answers wrong, long and deep LaTeX with its escaped source', () => {
    const deep = '{'.repeat(900) + '}'.repeat(900);
    expect(mathml('\\frac{<b>')).toBe('<code>\\frac{&#60;b&#62;</code>');
    expect(mathml('x'.repeat(2001))).toMatch(/^<code>x{2001}<\/code>$/);
    expect(mathml(deep)).toMatch(/^<(math|code)>/);
  });

  it('does not let a macro of one formula reach the next', () => {
    mathml('\\gdef\\phi{1}x');
    expect(mathml('\\phi')).toContain('ϕ');
  });

  it('escapes the five marks of HTML', () => {
    expect(escapeHtml(`<a href="x">&'`)).toBe('&#60;a href=&#34;x&#34;&#62;&#38;&#39;');
  });
});

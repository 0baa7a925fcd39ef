import katex from 'katex';

/** Longest LaTeX that is typeset; anything longer is shown as source (rendering is superlinear in length). */
export const MATH_LENGTH = 2000;

const UNICODE = new Set(['unknownSymbol', 'unicodeTextInMathMode']);

export interface MathOptions {
  /** A formula on its own line. */
  readonly display?: boolean;
}

/**
 * LaTeX as MathML, the one place where mathematics is typeset.
 *
 * MathML needs no inline styles (a strict content security policy holds), is read by screen readers and is a tenth of the
 * size of the HTML form. `\mathcal{L}` becomes U+2112, because MathML Core draws script letters as italics.
 *
 * @returns markup that starts with `<math`; for LaTeX that is too long or wrong, the escaped source in `<code>`. Never throws:
 * deep nesting makes the typesetter throw a RangeError even when it is told not to throw.
 */
export function mathml(latex: string, options: MathOptions = {}): string {
  if (latex.length > MATH_LENGTH) return source(latex);
  try {
    const html = katex.renderToString(latex, {
      output: 'mathml',
      displayMode: options.display ?? false,
      throwOnError: true,
      trust: false,
      // Letters typed in Unicode are welcome; every other departure from LaTeX is an error.
      strict: (code: string) => (UNICODE.has(code) ? 'ignore' : 'error'),
      maxSize: 10,
      maxExpand: 200,
      // A fresh object for each call: \gdef in one formula must not reach another.
      macros: {},
    });
    return unwrap(html);
  } catch {
    return source(latex);
  }
}

/** Drops the wrapper and the LaTeX annotation (pages offer the source by a copy button), and mends script letters. */
function unwrap(html: string): string {
  const start = html.indexOf('<math');
  const end = html.lastIndexOf('</math>');
  if (start < 0 || end < 0) return '';
  return html
    .slice(start, end + 7)
    .replace(/<annotation[\s\S]*?<\/annotation>/g, '')
    .replace(/<\/?semantics>/g, '')
    .replace(' xmlns="http://www.w3.org/1998/Math/MathML"', '')
    .replace(/<mi mathvariant="script">L<\/mi>/g, '<mi mathvariant="normal">ℒ</mi>');
}

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (mark) => `&#${mark.charCodeAt(0)};`);
}

function source(latex: string): string {
  return `<code>${escapeHtml(latex)}</code>`;
}

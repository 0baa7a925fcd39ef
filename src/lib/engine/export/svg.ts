import type { DrawingDTO } from '../drawing/types.ts';

const DASHES = { solid: '', dashed: '5 3.5', dotted: '0.1 4', dashdot: '7 3 0.1 3' } as const;

const escaped = (text: string): string =>
  text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c]!);

/** What a file says of itself. */
export interface SvgWords {
  readonly title: string;
  /** The drawing in words, and what a reader must know of it. */
  readonly description: string;
}

/** A drawing as an SVG file of its own: ink and vermilion of the light theme, no style sheet, no script, no font file. */
export function svgOf({ width, height, paths, dots, labels }: DrawingDTO, words: SvgWords): string {
  const strokes = paths.map(({ d, style, leg }) => {
    const dash = DASHES[style] === '' ? '' : ` stroke-dasharray="${DASHES[style]}"`;
    return `<path d="${d}" stroke="${leg ? '#b93a25' : '#1c2733'}"${dash}/>`;
  });
  const texts = labels.map(
    ({ x, y, text, anchor }) => `<text x="${x}" y="${y}" text-anchor="${anchor}">${escaped(text)}</text>`,
  );
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}" role="img">`,
    `<title>${escaped(words.title)}</title>`,
    `<desc>${escaped(words.description)}</desc>`,
    `<g fill="none" stroke-width="1.6" stroke-linecap="round">${strokes.join('')}</g>`,
    `<path d="${dots}" fill="#1c2733"/>`,
    `<g font-family="Latin Modern Math, STIX Two Math, serif" font-size="12" fill="#51606f">${texts.join('')}</g>`,
    '</svg>',
    '',
  ].join('\n');
}

import { layout, usualSides } from '../drawing/layout.ts';
import { unpackLayout } from '../drawing/packed.ts';
import type { Manner } from '../drawing/toDrawing.ts';
import { drawingOfPicture, toPicture } from '../drawing/toDrawing.ts';
import type { DrawingDTO, LineStyle, Picture } from '../drawing/types.ts';
import { nameLetters } from '../lagrangian/letters.ts';
import { type CompactDiagram, unpackBody } from './compact.ts';
import type { Prepared } from './prepare.ts';
import type { NamedTheory } from './theory.ts';

const STYLES: readonly LineStyle[] = ['solid', 'dashed', 'dotted', 'dashdot'];

/** Line styles by field: charged fields first (solid, with arrows), then the others. Beyond four fields they repeat; labels tell them apart. */
function styleOf({ halves, theory }: NamedTheory): (type: number) => LineStyle {
  const rank = (at: number): string => `${theory.partner[at] === at ? 1 : 0} ${halves[at]!.field}`;
  const fields = [...new Set(halves.map((_, at) => rank(at)))].sort();
  return (type) => STYLES[fields.indexOf(rank(type)) % STYLES.length]!;
}

const LOWERED = '₀₁₂₃₄₅₆₇₈₉';

/** "h₁", "φ*₂": external points are labelled, so each leg carries its number where there are several. */
function legLabel(name: string, at: number, count: number): string {
  const letters = name.endsWith('^*') ? `${nameLetters(name.slice(0, -2))}*` : nameLetters(name);
  const number = [...String(at + 1)].map((digit) => LOWERED[Number(digit)]).join('');
  return count > 1 ? letters + number : letters;
}

/** How a model's diagrams are drawn. */
export const mannerOf = (named: NamedTheory, legTypes: readonly number[], legNames: readonly string[]): Manner => ({
  legTypes,
  legLabels: legNames.map((name, at) => legLabel(name, at, legNames.length)),
  styleOf: styleOf(named),
});

/** A stored diagram part by part, with the line styles and labels of its model; laid out anew where no layout was kept. */
export function pictureOf({ names, canonical }: Prepared, compact: CompactDiagram): Picture {
  const diagram = unpackBody(compact.body);
  const placed = compact.picture
    ? unpackLayout(compact.picture, diagram, usualSides(diagram.legs.length))
    : layout(diagram);
  return toPicture(diagram, names.theory, mannerOf(names, canonical.request.legs, names.legs), placed);
}

/** A stored diagram ready to stroke. */
export const drawingOf = (prepared: Prepared, compact: CompactDiagram): DrawingDTO =>
  drawingOfPicture(pictureOf(prepared, compact));

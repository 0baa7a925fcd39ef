import type { Diagram } from '../graph/diagram.ts';
import type { Theory } from '../graph/theory.ts';
import { arrowOn, type Curve, crossAt, dotAt, pathOf, pointOn, round } from './geometry.ts';
import { type Layout, layout } from './layout.ts';
import type { DrawingDTO, LineStyle, Picture, Side } from './types.ts';

/** How types are drawn and legs are called. */
export interface Manner {
  /** Half-line type of each leg (the operator's). */
  readonly legTypes: readonly number[];
  readonly legLabels: readonly string[];
  readonly styleOf: (type: number) => LineStyle;
  readonly sides?: readonly Side[] | undefined;
}

const DOT = 3.2;
const CROSS = 4;
const LABEL_GAP = 5;
/** From the middle of a letter to its baseline. */
const BASELINE = 4;

const isCharged = (theory: Theory, type: number): boolean => theory.partner[type] !== type;
const valence = (theory: Theory, kind: number): number => theory.kinds[kind]!.reduce((a, b) => a + b, 0);

function legCurve(from: { x: number; y: number }, end: { x: number; y: number }): Curve {
  // A bow between two ends on one side bulges into the drawing.
  const bow = from.x === end.x && from.y !== end.y;
  return { from, to: end, sagitta: bow ? 26 : 0, loop: null };
}

/** The drawing of a diagram part by part. Numbers are rounded to a tenth, so equal diagrams give equal text. */
export function toPicture(
  diagram: Diagram,
  theory: Theory,
  manner: Manner,
  placed: Layout = layout(diagram, manner.sides),
): Picture {
  return {
    width: Math.ceil(placed.width),
    height: Math.ceil(placed.height),
    vertices: placed.vertices.map(({ x, y }, v) => ({
      x: round(x),
      y: round(y),
      mark: valence(theory, diagram.kinds[v]!) <= 2 ? 'cross' : 'dot',
    })),
    lines: placed.curves.map((curve, line) => {
      const { type } = diagram.lines[line]!;
      const { x, y } = pointOn(curve, 0.5);
      return {
        d: pathOf(curve),
        style: manner.styleOf(type),
        middle: { x: round(x), y: round(y) },
        arrow: isCharged(theory, type) ? arrowOn(curve) : '',
      };
    }),
    legs: placed.legs.map(({ from, end, side }, leg) => {
      const type = manner.legTypes[leg]!;
      const at = diagram.legs[leg]!;
      const second = at < 0 && -1 - at < leg;
      const curve = legCurve(from, end);
      // φ ends on a φ* half-line: charge runs towards the end of a leg φ and away from that of a leg φ*.
      const arrow = isCharged(theory, type) && !second ? arrowOn(curve, type > theory.partner[type]!, 0.55) : '';
      return {
        d: second ? '' : pathOf(curve),
        style: manner.styleOf(Math.min(type, theory.partner[type]!)),
        end: { x: round(end.x), y: round(end.y) },
        arrow,
        label: manner.legLabels[leg]!,
        anchor: side === 'in' ? 'end' : 'start',
      };
    }),
  };
}

const dotOf = ({ x, y, mark }: Picture['vertices'][number]): string => (mark === 'dot' ? dotAt({ x, y }, DOT) : '');

/** A picture put together into few paths, one for each manner of stroke. */
export function drawingOfPicture({ width, height, vertices, lines, legs }: Picture): DrawingDTO {
  const strokes = new Map<string, { d: string; style: LineStyle; leg: boolean }>();
  const stroke = (d: string, style: LineStyle, leg: boolean): void => {
    const key = `${style} ${leg}`;
    const known = strokes.get(key);
    if (known) known.d += d;
    else if (d !== '') strokes.set(key, { d, style, leg });
  };
  for (const { d, style } of lines) stroke(d, style, false);
  for (const vertex of vertices) if (vertex.mark === 'cross') stroke(crossAt(vertex, CROSS), 'solid', false);
  for (const { d, style } of legs) stroke(d, style, true);
  return {
    width,
    height,
    paths: [...strokes.values()],
    dots: [...vertices.map(dotOf), ...lines.map(({ arrow }) => arrow), ...legs.map(({ arrow }) => arrow)].join(''),
    labels: legs.map(({ end, label, anchor }) => ({
      x: round(end.x + (anchor === 'end' ? -LABEL_GAP : LABEL_GAP)),
      y: round(end.y + BASELINE),
      text: label,
      anchor,
    })),
  };
}

/** A diagram ready to stroke. */
export const toDrawing = (diagram: Diagram, theory: Theory, manner: Manner): DrawingDTO =>
  drawingOfPicture(toPicture(diagram, theory, manner));

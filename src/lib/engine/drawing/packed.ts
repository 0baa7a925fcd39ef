import type { Diagram } from '../graph/diagram.ts';
import { type Curve, round } from './geometry.ts';
import type { Layout } from './layout.ts';
import type { Point } from './types.ts';

/** [width, height, vertices x y …, one entry for each line, legs x y …]: a line's sagitta, or its loop's [angle, radius]. */
type Packed = [number, number, number[], (number | [number, number])[], number[]];

const flat = (points: readonly Point[]): number[] => points.flatMap(({ x, y }) => [round(x), round(y)]);

function points(numbers: readonly number[]): Point[] {
  return Array.from({ length: numbers.length / 2 }, (_, i) => ({ x: numbers[2 * i]!, y: numbers[2 * i + 1]! }));
}

/** A layout as short text, free of names, to be kept beside a stored diagram. */
export function packLayout({ width, height, vertices, curves, legs }: Layout): string {
  const heights = curves.map(({ sagitta, loop }): number | [number, number] =>
    loop ? [Math.round(loop.angle * 1000) / 1000, loop.radius] : round(sagitta),
  );
  const packed: Packed = [round(width), round(height), flat(vertices), heights, flat(legs.map(({ end }) => end))];
  return JSON.stringify(packed);
}

/** The layout of a diagram from its text. Sides follow from the order of the legs, as when it was made. */
export function unpackLayout(text: string, diagram: Diagram, sides: Layout['legs'][number]['side'][]): Layout {
  const [width, height, places, heights, tips] = JSON.parse(text) as Packed;
  const vertices = points(places);
  const ends = points(tips);
  return {
    width,
    height,
    vertices,
    curves: diagram.lines.map(({ from, to }, line): Curve => {
      const mark = heights[line]!;
      const loop = typeof mark === 'number' ? null : { angle: mark[0], radius: mark[1] };
      return { from: vertices[from]!, to: vertices[to]!, sagitta: typeof mark === 'number' ? mark : 0, loop };
    }),
    legs: diagram.legs.map((at, leg) => ({
      from: at >= 0 ? vertices[at]! : ends[-1 - at]!,
      end: ends[leg]!,
      side: sides[leg]!,
    })),
  };
}

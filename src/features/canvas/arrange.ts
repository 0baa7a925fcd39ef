import type { DiagramRow, Plate } from '#contract/api.ts';
import { numeral } from '#features/home/question.ts';

/** A plate with those of its diagrams that are on the canvas. */
export interface OpenPlate {
  readonly plate: Plate;
  readonly rows: readonly DiagramRow[];
}

/** Where one plate stands and how large it is; its diagrams in a grid of equal cells. */
export interface PlacedPlate extends OpenPlate {
  readonly title: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly cells: readonly { readonly row: DiagramRow; readonly x: number; readonly y: number }[];
}

export interface Arrangement {
  readonly plates: readonly PlacedPlate[];
  readonly cell: { readonly width: number; readonly height: number };
}

const HEAD = 44;
const PAD = 12;
const GAP = 28;
const CAPTION = 26;
const LEAST_WIDTH = 230;
/** Width over height of a plate that is filled evenly. */
const ASPECT = 1.6;
/** Rows of plates are about this many times as wide as the whole is high. */
const SHEET_ASPECT = 2.6;
const LAST_NUMERAL = 89;

function cellOf(plates: readonly OpenPlate[]): { width: number; height: number } {
  let [width, height] = [120, 80];
  for (const { rows } of plates)
    for (const { drawing } of rows) {
      width = Math.max(width, drawing.width);
      height = Math.max(height, drawing.height);
    }
  return { width: width + 16, height: height + CAPTION };
}

function sizeOf(
  count: number,
  cell: { width: number; height: number },
): { columns: number; width: number; height: number } {
  const columns = Math.max(1, Math.ceil(Math.sqrt((count * ASPECT * cell.height) / cell.width)));
  const lines = Math.ceil(count / columns);
  return {
    columns,
    width: Math.max(LEAST_WIDTH, Math.min(columns, count) * cell.width + 2 * PAD),
    height: HEAD + lines * cell.height + (count > 0 ? PAD : 0),
  };
}

/**
 * Lays plates out in rows, in their order, each diagram in a cell of the same size: the same list always looks the same.
 * Pure; O(diagrams).
 */
export function arrange(plates: readonly OpenPlate[]): Arrangement {
  const cell = cellOf(plates);
  const sizes = plates.map(({ rows }) => sizeOf(rows.length, cell));
  const area = sizes.reduce((sum, { width, height }) => sum + (width + GAP) * (height + GAP), 0);
  const widest = Math.max(900, Math.sqrt(area * SHEET_ASPECT));
  const placed: PlacedPlate[] = [];
  let [x, y, tallest] = [0, 0, 0];
  plates.forEach(({ plate, rows }, at) => {
    const { columns, width, height } = sizes[at]!;
    if (x > 0 && x + width > widest) [x, y, tallest] = [0, y + tallest + GAP, 0];
    const cells = rows.map((row, i) => ({
      row,
      x: PAD + (i % columns) * cell.width,
      y: HEAD + Math.floor(i / columns) * cell.height,
    }));
    const title = plates.length <= LAST_NUMERAL ? `Plate ${numeral(at + 1)}` : `No. ${at + 1}`;
    placed.push({ plate, rows, title, x, y, width, height, cells });
    x += width + GAP;
    tallest = Math.max(tallest, height);
  });
  return { plates: placed, cell };
}

/** The diagram next to one in a direction, among all that are placed; the same one where there is none. */
export function neighbour(
  { plates, cell }: Arrangement,
  position: number,
  direction: 'left' | 'right' | 'up' | 'down',
): number {
  const all = plates.flatMap((plate) =>
    plate.cells.map(({ row, x, y }) => ({ position: row.position, x: plate.x + x, y: plate.y + y })),
  );
  const from = all.find((one) => one.position === position) ?? all[0];
  if (!from) return position;
  const [dx, dy] = { left: [-1, 0], right: [1, 0], up: [0, -1], down: [0, 1] }[direction] as [number, number];
  let best = from;
  let least = Number.POSITIVE_INFINITY;
  for (const one of all) {
    const along = (one.x - from.x) * dx + (one.y - from.y) * dy;
    const across = Math.abs((one.x - from.x) * dy) + Math.abs((one.y - from.y) * dx);
    if (along < cell.height / 4) continue;
    const cost = along + 3 * across;
    if (cost < least) [best, least] = [one, cost];
  }
  return best.position;
}

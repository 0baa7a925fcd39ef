/** How a field's lines are stroked; fields differ by style and label, not by colour alone. */
export type LineStyle = 'solid' | 'dashed' | 'dotted' | 'dashdot';

/** A drawing ready to stroke: coordinates in a common unit (dots, strokes and loops have one size in every drawing). */
export interface DrawingDTO {
  width: number;
  height: number;
  /** SVG path data; `leg` for external legs. Crosses of two-point vertices are solid paths too. */
  paths: { d: string; style: LineStyle; leg: boolean }[];
  /** Filled marks: vertex dots and the arrowheads of charged lines. */
  dots: string;
  labels: { x: number; y: number; text: string; anchor: 'start' | 'middle' | 'end' }[];
}

export interface Point {
  readonly x: number;
  readonly y: number;
}

/** The geometry of a drawing part by part: lines[i] belongs to diagram.lines[i], vertices[v] and legs[k] likewise. */
export interface Picture {
  readonly width: number;
  readonly height: number;
  readonly vertices: readonly (Point & { readonly mark: 'dot' | 'cross' })[];
  readonly lines: readonly {
    readonly d: string;
    readonly style: LineStyle;
    readonly middle: Point;
    /** Filled arrowhead of a charged line, in the direction of charge; "" for a real field. */
    readonly arrow: string;
  }[];
  readonly legs: readonly {
    /** "" for the second of two legs that are joined to each other. */
    readonly d: string;
    readonly style: LineStyle;
    readonly end: Point;
    readonly arrow: string;
    readonly label: string;
    readonly anchor: 'start' | 'end';
  }[];
}

/** On which side of the drawing a leg ends: incoming left, outgoing right. */
export type Side = 'in' | 'out';

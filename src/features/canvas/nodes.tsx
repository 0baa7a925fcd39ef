import { memo } from 'react';
import type { NodeProps } from 'reactflow';
import type { DiagramRow } from '#contract/api.ts';

export interface DiagramData {
  readonly row: DiagramRow;
  /** Whether legs carry their numbers: one element more in each node, left out of large sheets. */
  readonly numbered: boolean;
}

/** All strokes of one manner as one path: a node keeps to a handful of elements, so that hundreds of them pan smoothly. */
const joined = (row: DiagramRow, leg: boolean, solid: boolean): string =>
  row.drawing.paths
    .filter((path) => path.leg === leg && (path.style === 'solid') === solid)
    .map(({ d }) => d)
    .join('');

/** Room for the number under a drawing. */
export const CAPTION = 20;

/**
 * The numbers of the legs as one text element, a place for each character; null without legs, or with more than nine.
 * Channels of equal legs differ by nothing else.
 */
export function legNumbers({ legs, drawing }: DiagramRow): { text: string; x: string; y: string } | null {
  if (legs.length === 0 || legs.length > 9) return null;
  const places = drawing.labels.map(({ x, y, text, anchor }) => ({
    digit: SUBSCRIPTS.indexOf(text.at(-1) ?? ''),
    x: anchor === 'end' ? x - DIGIT_WIDTH : x,
    y,
  }));
  if (places.some(({ digit }) => digit < 0)) return null;
  return {
    text: places.map(({ digit }) => digit).join(''),
    x: places.map(({ x }) => x).join(' '),
    y: places.map(({ y }) => y).join(' '),
  };
}
const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';
const DIGIT_WIDTH = 7;

export const DiagramNode = memo(function DiagramNode({ data }: NodeProps<DiagramData>) {
  const { row, numbered } = data;
  const { width, height, dots } = row.drawing;
  const plain = joined(row, false, true);
  const styled = joined(row, false, false);
  const legs = joined(row, true, true);
  const styledLegs = joined(row, true, false);
  const numbers = numbered ? legNumbers(row) : null;
  const tall = height + CAPTION;
  return (
    <svg className="diagram" width={width} height={tall} viewBox={`0 0 ${width} ${tall}`} aria-hidden="true">
      <path d={plain} />
      {styled !== '' && <path className="dashed" d={styled} />}
      {legs !== '' && <path className="leg" d={legs} />}
      {styledLegs !== '' && <path className="leg dashed" d={styledLegs} />}
      <path className="dots" d={dots} />
      {numbers && (
        <text x={numbers.x} y={numbers.y}>
          {numbers.text}
        </text>
      )}
      <text x={width / 2} y={tall - 5} textAnchor="middle">
        {`${row.position}\u2002S = ${row.symmetryFactor}`}
      </text>
    </svg>
  );
});

export interface PlateData {
  readonly title: string;
  readonly subject: string;
  readonly count: number;
  readonly shown: number;
  readonly open: (() => void) | null;
}

export const PlateNode = memo(function PlateNode({ data }: NodeProps<PlateData>) {
  const { title, subject, count, shown, open } = data;
  return (
    <div className="canvas-plate">
      <b>
        {title} — {subject}
      </b>
      <span>{shown < count ? `${shown} of ${count.toLocaleString('en-GB')}` : count.toLocaleString('en-GB')}</span>
      {open && (
        <button type="button" className="link-btn" onClick={open}>
          {shown === 0 ? 'Open' : 'More'}
        </button>
      )}
    </div>
  );
});

export const nodeTypes = { diagram: DiagramNode, plate: PlateNode };

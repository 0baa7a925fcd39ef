import { type CompactDiagram, unpackBody } from './compact.ts';
import type { Prepared } from './prepare.ts';

/** interim: vertices on a circle; replaced by engine/drawing when it lands */
export function drawingOf({ names }: Prepared, compact: CompactDiagram) {
  const { kinds, legs, lines } = unpackBody(compact.body);
  const n = kinds.length;
  const at = (v: number) => ({
    x: 70 + 40 * Math.cos((2 * Math.PI * v) / n),
    y: 60 + 40 * Math.sin((2 * Math.PI * v) / n),
  });
  const seen = new Map<string, number>();
  const paths = lines.map(({ from, to }) => {
    const [a, b] = [at(from), at(to)];
    const key = `${Math.min(from, to)},${Math.max(from, to)}`;
    const k = seen.get(key) ?? 0;
    seen.set(key, k + 1);
    const bend = (k % 2 ? -1 : 1) * 14 * Math.ceil(k / 2 + 0.5);
    const d =
      from === to
        ? `M${a.x} ${a.y}c20 -20 20 20 0 0`
        : `M${a.x} ${a.y}Q${(a.x + b.x) / 2 + bend} ${(a.y + b.y) / 2 + bend} ${b.x} ${b.y}`;
    return { d, style: 'solid' as const, leg: false };
  });
  const legPaths = legs.flatMap((v, k) =>
    v < 0
      ? []
      : [{ d: `M${at(v).x} ${at(v).y}L${k % 2 ? 130 : 10} ${15 + 20 * k}`, style: 'solid' as const, leg: true }],
  );
  const dots = kinds.map((_, v) => `M${at(v).x - 3} ${at(v).y}a3 3 0 1 0 6 0a3 3 0 1 0 -6 0`).join('');
  const labels = legs.map((_, k) => ({
    x: k % 2 ? 134 : 6,
    y: 15 + 20 * k,
    text: names.legs[k]!,
    anchor: k % 2 ? ('start' as const) : ('end' as const),
  }));
  return { width: 140, height: 120, paths: [...paths, ...legPaths], dots, labels };
}

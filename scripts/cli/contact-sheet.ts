import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expansionRequestSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { drawingOf, prepare, runExpansion } from '#engine/index.ts';

const PHI4 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';
const PHI3 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - g/3! phi^3';
const PORTAL = '1/2 (d h)^2 + 1/2 (d s)^2 - lambda/4! h^4 - kappa/4 h^2 s^2 - mu/2 h s^2 - rho/4! s^4';
const CHARGED = '(d phi^*)(d phi) - m^2 phi^* phi + 1/2 (d chi)^2 - g chi phi^* phi - lambda/4 (phi^* phi)^2 - t chi';

const legs = (n: number): string[] => new Array<string>(n).fill('phi');
const through = (loops: number) => ({ order: { loops }, through: true });

/** Lists that every change of the layout is judged by. */
const SHEETS: Record<string, object> = {
  'phi4-vacuum': { lagrangian: PHI4, legs: [], ...through(5) },
  'phi4-two-point': { lagrangian: PHI4, legs: legs(2), ...through(4), keep: '1PI' },
  'phi4-four-point': { lagrangian: PHI4, legs: legs(4), ...through(3), keep: '1PI' },
  'phi4-two-point-connected': { lagrangian: PHI4, legs: legs(2), ...through(3) },
  'phi3-vacuum': { lagrangian: PHI3, legs: [], ...through(4) },
  'phi3-two-point': { lagrangian: PHI3, legs: legs(2), ...through(2) },
  'phi3-three-point': { lagrangian: PHI3, legs: legs(3), ...through(1) },
  'phi3-four-point': { lagrangian: PHI3, legs: legs(4), ...through(1), keep: '1PI' },
  'phi3-one-point': { lagrangian: PHI3, legs: legs(1), ...through(3) },
  'phi3-trees': { lagrangian: PHI3, legs: legs(5), order: { loops: 0 } },
  'phi4-disconnected': { lagrangian: PHI4, legs: legs(2), order: { lambda: 2 }, keep: 'all' },
  portal: { lagrangian: PORTAL, legs: ['h', 'h', 's', 's'], order: { loops: 1 } },
  charged: { lagrangian: CHARGED, legs: ['phi', 'phi^*'], order: { g: 2, lambda: 1 } },
  'charged-four-point': { lagrangian: CHARGED, legs: ['phi', 'phi', 'phi^*', 'phi^*'], order: { g: 2 } },
};

const STYLE = `body{font:13px Inter,sans-serif;margin:16px;background:#faf8f3;color:#1c2733}main{display:flex;flex-wrap:wrap;align-items:stretch}
figure{margin:0;padding:8px;min-width:150px;border:1px solid #dcd6ca;text-align:center}path{fill:none;stroke:#1c2733;stroke-width:1.6}.leg{stroke:#b93a25}.dashed{stroke-dasharray:5 3.5}
.dotted{stroke-dasharray:.1 4;stroke-linecap:round}.dashdot{stroke-dasharray:7 3 .1 3;stroke-linecap:round}.dots{fill:#1c2733;stroke:none}text{font:12px serif;fill:#51606f}`;

function sheet(name: string, request: object): void {
  const prepared = prepare(validate(expansionRequestSchema, request));
  const figures: string[] = [];
  let [slowest, spent] = [0, 0];
  for (const diagram of runExpansion(prepared)) {
    const started = performance.now();
    const { width, height, paths, dots, labels } = drawingOf(prepared, diagram);
    const took = performance.now() - started;
    slowest = Math.max(slowest, took);
    spent += took;
    const strokes = paths.map(({ d, style, leg }) => `<path class="${style}${leg ? ' leg' : ''}" d="${d}"/>`).join('');
    const texts = labels.map(
      ({ x, y, text, anchor }) => `<text x="${x}" y="${y}" text-anchor="${anchor}">${text}</text>`,
    );
    figures.push(
      `<figure><svg width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${strokes}<path class="dots" d="${dots}"/>${texts.join('')}</svg><figcaption>${diagram.position} · S=${diagram.symmetryFactor}</figcaption></figure>`,
    );
  }
  const page = `<!doctype html><meta charset="utf-8"><title>${name}</title><style>${STYLE}</style><h1>${name}, ${figures.length}</h1><main>${figures.join('\n')}</main>`;
  writeFileSync(join('.cache', 'contact-sheets', `${name}.html`), page);
  console.log(
    `${name}: ${figures.length} drawings, ${(spent / Math.max(figures.length, 1)).toFixed(1)} ms each, slowest ${slowest.toFixed(0)} ms`,
  );
}

mkdirSync(join('.cache', 'contact-sheets'), { recursive: true });
const wanted = process.argv.slice(2);
for (const [name, request] of Object.entries(SHEETS))
  if (wanted.length === 0 || wanted.includes(name)) sheet(name, request);

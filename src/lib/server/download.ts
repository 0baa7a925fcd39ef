import type { ExpansionRecord } from '#contract/api.ts';
import type { StoredDiagram } from '#contract/job.ts';
import { type Prepared, renderDiagram } from '#engine/index.ts';
import { csvHead, csvRow } from './csv.ts';
import { storedRows } from './diagram-rows.ts';
import { preparedFor } from './diagrams.ts';
import { getExpansion, readable } from './expansions.ts';
import { notFound, Refusal } from './refusal.ts';
import type { Viewer } from './viewer.ts';

/** What a reader must know who finds the file alone. */
export const CAUTIONS = [
  'Results of perturbation theory hold within its range: the series is asymptotic, and scheme, scale and normalisation matter.',
  'The ledger proves that the list is complete and its weights are right; it proves counting, not physics.',
];

const FORMATS = {
  json: { type: 'application/json; charset=utf-8', write: jsonParts },
  csv: { type: 'text/csv; charset=utf-8; header=present', write: csvParts },
} as const;

function* jsonParts(expansion: ExpansionRecord, prepared: Prepared, bodyId: number): Generator<string> {
  const { title, request, summary, ledger, rules, conventions, engine, contentHash, createdAt } = expansion;
  const head = JSON.stringify({
    title,
    request,
    contentHash,
    createdAt,
    cautions: CAUTIONS,
    summary,
    ledger,
    rules,
    conventions,
    engine,
  });
  yield `${head.slice(0, -1)},"diagrams":[`;
  let first = true;
  for (const rows of storedRows(bodyId)) {
    const text = rows.map((row: StoredDiagram) => JSON.stringify(renderDiagram(prepared, row))).join(',\n');
    yield first ? `\n${text}` : `,\n${text}`;
    first = false;
  }
  yield ']}\n';
}

function* csvParts(expansion: ExpansionRecord, prepared: Prepared, bodyId: number): Generator<string> {
  yield csvHead(expansion, CAUTIONS);
  for (const rows of storedRows(bodyId))
    yield rows.map((row) => csvRow(row.position, renderDiagram(prepared, row))).join('');
}

/** A generator as a response body: the next part is made when the receiver has taken the last one. */
function streamOf(parts: Generator<string>): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  return new ReadableStream<Uint8Array>({
    async pull(controller) {
      // Others get a turn between two parts of a long file.
      await new Promise((resolve) => setImmediate(resolve));
      const { done, value } = parts.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
  });
}

/** A whole result as a file. @throws Refusal not-found for an unknown format, conflict when it is not complete. */
export function downloadExpansion(viewer: Viewer, id: string, format: string): Response {
  const chosen = Object.hasOwn(FORMATS, format) ? FORMATS[format as keyof typeof FORMATS] : null;
  if (!chosen) throw notFound('format');
  const row = readable(viewer, id);
  if (row.state !== 'complete' || row.bodyId === null)
    throw new Refusal('conflict', `This expansion is ${row.state}: only complete ones can be downloaded.`);
  const parts = chosen.write(getExpansion(viewer, id), preparedFor(row), row.bodyId);
  return new Response(streamOf(parts), {
    headers: {
      'content-type': chosen.type,
      'content-disposition': `attachment; filename="wickwork-${id}.${format}"`,
      'x-content-type-options': 'nosniff',
    },
  });
}

import type { ExpansionRecord } from '#contract/api.ts';
import type { DiagramDTO } from '#contract/result.ts';

const COLUMNS = [
  'position',
  'id',
  'loops',
  'symmetry_factor',
  'weight_numerator',
  'weight_denominator',
  'pairings',
  'connected',
  'one_particle_irreducible',
  'self_contraction',
  'tadpole',
  'order',
  'shape',
  'vertices',
  'legs',
  'lines',
];

/**
 * One field of a CSV file (RFC 4180). Text that a spreadsheet would run as a formula gets a leading apostrophe;
 * whole numbers stay bare, so that they can be computed with.
 */
export function csvField(value: string | number): string {
  const text = String(value);
  if (/^-?\d+$/.test(text)) return text;
  const safe = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

const line = (values: readonly (string | number)[]): string => `${values.map(csvField).join(',')}\r\n`;

/** Rows that begin with "#": what the numbers mean; then the names of the columns. */
export function csvHead(expansion: ExpansionRecord, cautions: readonly string[]): string {
  const { title, request, conventions, engine, summary, ledger, contentHash } = expansion;
  const facts: [string, string][] = [
    ['title', title],
    ['request', JSON.stringify(request)],
    ['content hash', contentHash],
    ['engine', `${engine.name} ${engine.version}`],
    ...Object.entries(conventions).map(([name, value]): [string, string] => [`convention: ${name}`, String(value)]),
    ['classes', String(summary?.classes ?? '')],
    [
      'ledger',
      `${ledger?.state ?? ''}; sum of 1/S over the list ${ledger?.weight ?? ''}; independently ${ledger?.independentWeight ?? 'not available'}`,
    ],
    ...cautions.map((caution): [string, string] => ['caution', caution]),
  ];
  return facts.map(([name, value]) => line([`# ${name}`, value])).join('') + line(COLUMNS);
}

export function csvRow(position: number, diagram: DiagramDTO): string {
  const [numerator = '', denominator = '1'] = diagram.weight.split('/');
  const legs = diagram.legs.map((leg) => `${leg.id}:${leg.field}:${leg.vertex ?? `leg ${leg.joinedTo ?? ''}`}`);
  return line([
    position,
    diagram.id,
    diagram.loops,
    diagram.symmetryFactor,
    numerator,
    denominator,
    diagram.pairings,
    diagram.connected ? 1 : 0,
    diagram.onePI ? 1 : 0,
    diagram.hasSelfContraction ? 1 : 0,
    diagram.hasTadpole ? 1 : 0,
    Object.entries(diagram.order)
      .map(([name, power]) => `${name}^${power}`)
      .join(' '),
    diagram.shape,
    diagram.vertices.map(({ id, kind }) => `${id}:${kind}`).join('; '),
    legs.join('; '),
    diagram.lines.map(({ from, to, field }) => `${from}-${to}:${field}`).join('; '),
  ]);
}

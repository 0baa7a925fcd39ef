import type { DrawingDTO, ModelPreview } from '#contract/api.ts';
import type { DiagramRequest, ExpansionRequest, ModelInput } from '#contract/request.ts';
import type {
  ConventionRecord,
  DiagramAnswer,
  DiagramDTO,
  LedgerDTO,
  RulesDTO,
  Summary,
  WorkingDTO,
} from '#contract/result.ts';
import { InputError } from '#engine/errors.ts';

export const ENGINE_VERSION = '0-interim';
export interface Prepared {
  names: { couplingLatex(name: string): string };
  request: ExpansionRequest;
  canonicalKey: string;
  rules: RulesDTO;
  conventions: ConventionRecord;
}
export interface CompactDiagram {
  position: number;
  body: string;
  label: string;
  loops: number;
  symmetryFactor: string;
  weight: string;
  pairings: string;
  order: string;
  shape: string;
  flags: number;
}
export interface RunEnd {
  summary: Summary;
  ledger: LedgerDTO;
}
export interface EngineEstimate {
  classes: number;
  quality: 'exact' | 'estimate';
  weight: string;
  seconds: number;
  bytes: number;
}
const rules: RulesDTO = { propagators: [], vertices: [] };
const conventions: ConventionRecord = {
  signature: '+---',
  dimension: '4',
  weight: 'e^{iS}',
  metric: '',
  fourier: '',
  couplings: '',
  generating: '',
  selfEnergy: '',
  vertexFunction: '',
  scheme: '',
};
export function previewModel(input: ModelInput): ModelPreview {
  const error = input.lagrangian?.includes('phi')
    ? null
    : { code: 'syntax' as const, message: 'interim', line: 1, column: 1 };
  return {
    ok: error === null,
    error,
    latex: 'x',
    mathml: '',
    normalText: 'x',
    normalLatex: 'x',
    fields: [],
    parameters: [],
    rules: { ...rules, mathml: { propagators: [], vertices: [] } },
    checks: [],
    notes: [],
  };
}
const countOf = (request: ExpansionRequest): number => {
  const { total } = request.order as { total?: number };
  return total === undefined ? 3 : 4 ** Number(total);
};
export function prepare(request: ExpansionRequest): Prepared {
  if (request.legs.includes('psi') || request.lagrangian === 'x')
    throw new InputError('syntax', 'interim', { line: 1, column: 1, length: 1 });
  return {
    names: { couplingLatex: (n) => n },
    request,
    canonicalKey: JSON.stringify([request.legs.length, request.order, request.keep]),
    rules,
    conventions,
  };
}
export function estimate(prepared: Prepared, _ms: number): EngineEstimate {
  return { classes: countOf(prepared.request), quality: 'exact', weight: '1', seconds: 0.1, bytes: 100 };
}
const ledger: LedgerDTO = {
  state: 'balanced',
  weight: '1',
  independentWeight: '1',
  pairings: '1',
  independentPairings: '1',
  rows: [],
  method: 'interim',
  uncut: null,
  identities: [],
};
export function* runExpansion(prepared: Prepared): Generator<CompactDiagram, RunEnd> {
  const n = countOf(prepared.request);
  for (let at = 1; at <= n; at++)
    yield {
      position: at,
      body: JSON.stringify({ n: at }),
      label: `1-${at}`,
      loops: at % 3,
      symmetryFactor: String(1 + (at % 7)),
      weight: `1/${1 + (at % 7)}`,
      pairings: '1',
      order: '1',
      shape: `s${at % 5}`,
      flags: at % 16,
    };
  return {
    summary: { state: n > 0 ? 'complete' : 'none', classes: n, weight: '1', pairings: '1', excluded: [] },
    ledger,
  };
}
export const renderDiagram = (_prepared: Prepared, c: CompactDiagram): DiagramDTO => ({
  id: c.label,
  bare: c.label,
  vertices: [],
  legs: [],
  lines: [],
  order: { lambda: c.order },
  loops: c.loops,
  symmetryFactor: c.symmetryFactor,
  weight: c.weight,
  pairings: c.pairings,
  connected: true,
  onePI: true,
  hasSelfContraction: false,
  hasTadpole: false,
  shape: c.shape,
});
export const renderLedger = (_prepared: Prepared, value: LedgerDTO): LedgerDTO => value;
export const drawingOf = (_prepared: Prepared, _c: CompactDiagram): DrawingDTO => ({
  width: 1,
  height: 1,
  paths: [],
  dots: '',
  labels: [],
});
export const workingOf = (_prepared: Prepared, _c: CompactDiagram): WorkingDTO => ({
  contractions: { steps: [], total: '1', divisor: '1', weight: '1' },
  automorphisms: { order: '1', generators: [], steps: [] },
  agree: true,
  coefficient: { coupling: '1', weight: '1', phases: '1', whole: '1', latex: '1' },
  description: '',
});
export function answerDiagram(_request: DiagramRequest): DiagramAnswer {
  throw new InputError('unsupported', 'interim');
}
export const renderSummary = (_prepared: Prepared, value: Summary): Summary => value;
export const FLAGS = { connected: 1, onePI: 2, selfContraction: 4, tadpole: 8 };
export const describeDiagram = (_p: Prepared, c: CompactDiagram): string => `diagram ${c.position}`;
export const rulesUsed = (p: Prepared, _c: CompactDiagram): RulesDTO => p.rules;

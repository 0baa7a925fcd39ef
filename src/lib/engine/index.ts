/**
 * The engine's one door. Everything above the engine imports from here, or from `errors.ts` and the exact numbers; nothing
 * reaches into its folders.
 *
 * The walk: `prepare` reads a request → `estimate` tells what it will cost → `runExpansion` streams compact diagrams and ends
 * with summary and ledger → `render…`, `drawingOf`, `workingOf` put a model's names back when something is shown.
 */
export { plainVertexNumber } from './answer/coefficient.ts';
export type { CompactDiagram } from './answer/compact.ts';
export { FLAGS } from './answer/compact.ts';
export { answerDiagram } from './answer/diagram.ts';
export { drawingOf, pictureOf } from './answer/drawing.ts';
export { type EngineEstimate, estimate } from './answer/estimate.ts';
export type { LedgerBody } from './answer/ledger.ts';
export { orderWords } from './answer/order.ts';
export { type Prepared, prepare } from './answer/prepare.ts';
export { type EnginePreview, previewModel } from './answer/preview.ts';
export {
  describeDiagram,
  expansionHead,
  renderDiagram,
  renderLedger,
  renderSummary,
  rulesUsed,
} from './answer/render.ts';
export { type RunEnd, runExpansion, type SummaryBody } from './answer/run.ts';
export { ENGINE, ENGINE_VERSION } from './answer/version.ts';
export { working, workingOf } from './answer/working.ts';
export type { DrawingDTO, Picture } from './drawing/types.ts';
export { svgOf } from './export/svg.ts';
export type { Model, VertexKind } from './lagrangian/model.ts';

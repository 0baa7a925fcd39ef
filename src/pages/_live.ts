import type { DrawingDTO } from '#contract/api.ts';
import { type ErrorObject, errorObject } from '#contract/errors.ts';
import { expansionRequestSchema } from '#contract/request.ts';
import type { DiagramDTO, LedgerDTO, RulesDTO, Summary } from '#contract/result.ts';
import { validate } from '#contract/validate.ts';
import {
  describeDiagram,
  drawingOf,
  estimate,
  type Prepared,
  prepare,
  renderDiagram,
  renderLedger,
  renderSummary,
  runExpansion,
} from '#engine/index.ts';
import { couplingsLatex, grouped, type Question, requestOf } from '#features/home/question.ts';
import { errorOf, isAnswer } from '#server/refusal.ts';
import { runtime } from '#server/runtime.ts';
import type { Viewer } from '#server/viewer.ts';

/** The live example computes inside the page's own request, so it stays small; larger questions go to an expansion. */
const MOST_DIAGRAMS = 48;
const MOST_MS = 250;
const ESTIMATE_MS = 20;
const PER_MINUTE = 60;

export interface LiveDiagram {
  readonly number: number;
  readonly dto: DiagramDTO;
  readonly drawing: DrawingDTO;
  readonly description: string;
}

export interface LivePlate {
  readonly latex: string;
  readonly diagrams: readonly LiveDiagram[];
}

export type LiveAnswer =
  | { readonly state: 'refused'; readonly error: ErrorObject }
  | { readonly state: 'large'; readonly classes: number; readonly quality: 'exact' | 'estimate' }
  | {
      readonly state: 'answered';
      readonly summary: Summary;
      readonly ledger: LedgerDTO;
      readonly rules: RulesDTO;
      readonly plates: readonly LivePlate[];
      readonly milliseconds: number;
    };

const KEPT = 64;
const answers = new Map<string, LiveAnswer>();

/** Answers a question of the live example, small ones whole; equal questions are answered from memory. */
export function liveAnswer(viewer: Viewer, question: Question): LiveAnswer {
  const key = JSON.stringify(question);
  const known = answers.get(key);
  if (known) return known;
  try {
    runtime().rates.take(`live ${viewer.address}`, PER_MINUTE, 60, 'Too many questions in a minute. Wait a little.');
    const answer = compute(question);
    const [oldest] = answers.keys();
    if (answers.size >= KEPT && oldest !== undefined) answers.delete(oldest);
    answers.set(key, answer);
    return answer;
  } catch (error) {
    const known = errorObject(error);
    if (!known && !isAnswer(error)) throw error;
    return { state: 'refused', error: known ?? errorOf(error) };
  }
}

function compute(question: Question): LiveAnswer {
  const started = performance.now();
  const request = validate(expansionRequestSchema, requestOf(question));
  const prepared = prepare(request);
  const expected = estimate(prepared, ESTIMATE_MS);
  const large = { state: 'large', classes: expected.classes, quality: expected.quality } as const;
  if (expected.classes > MOST_DIAGRAMS || expected.seconds * 1000 > MOST_MS) return large;
  const run = runExpansion(prepared);
  const diagrams: LiveDiagram[] = [];
  let step = run.next();
  for (; !step.done; step = run.next()) {
    if (diagrams.length >= MOST_DIAGRAMS || performance.now() - started > MOST_MS) return large;
    diagrams.push({
      number: step.value.position,
      dto: renderDiagram(prepared, step.value),
      drawing: drawingOf(prepared, step.value),
      description: describeDiagram(prepared, step.value),
    });
  }
  return {
    state: 'answered',
    summary: renderSummary(prepared, step.value.summary),
    ledger: renderLedger(prepared, step.value.ledger),
    rules: prepared.rules,
    plates: platesOf(prepared, diagrams),
    milliseconds: performance.now() - started,
  };
}

function platesOf({ model }: Prepared, diagrams: readonly LiveDiagram[]): readonly LivePlate[] {
  const names = new Map(model.parameters.map(({ name, latex }) => [name, latex]));
  return grouped(diagrams, ({ dto }) => JSON.stringify(dto.order)).map((members) => ({
    latex: couplingsLatex(members[0]!.dto.order, (name) => names.get(name) ?? name),
    diagrams: members,
  }));
}

import { parseJson } from '#contract/json.ts';
import { diagramRequestSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { answerDiagram } from '#engine/index.ts';
import { checkOptions, main, readInput, write } from './io.ts';

const USAGE =
  'Usage: npm run --silent diagram -- FILE|-: one diagram in JSON in, its label, factor and working in JSON out.';

main(() => {
  checkOptions([], USAGE);
  const request = validate(diagramRequestSchema, parseJson(readInput(USAGE)));
  write(`${JSON.stringify(answerDiagram(request), null, 1)}\n`);
});

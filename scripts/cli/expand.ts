import { parseJson } from '#contract/json.ts';
import { expansionRequestSchema } from '#contract/request.ts';
import { validate } from '#contract/validate.ts';
import { expansionHead, prepare, renderDiagram, runExpansion } from '#engine/index.ts';
import { checkOptions, main, readInput, write } from './io.ts';

const USAGE = 'Usage: npm run --silent expand -- FILE|- [--summary]: a request in JSON in, the expansion in JSON out.';

/** Summary and ledger stand first in the object, so the diagrams are kept, as text, until both are known. */
main(() => {
  checkOptions(['--summary'], USAGE);
  const summaryOnly = process.argv.includes('--summary');
  const prepared = prepare(validate(expansionRequestSchema, parseJson(readInput(USAGE))));
  const diagrams: string[] = [];
  const run = runExpansion(prepared);
  let step = run.next();
  while (!step.done) {
    if (!summaryOnly) diagrams.push(JSON.stringify(renderDiagram(prepared, step.value)));
    step = run.next();
  }
  const head = JSON.stringify(expansionHead(prepared, step.value));
  if (summaryOnly) {
    write(`${head}\n`);
    return;
  }
  write(`${head.slice(0, -1)},"diagrams":[`);
  for (let i = 0; i < diagrams.length; i += 1000)
    write(`${i === 0 ? '' : ',\n'}${diagrams.slice(i, i + 1000).join(',\n')}`);
  write(']}\n');
});

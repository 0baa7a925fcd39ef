/**
 * `node generate.mjs BUNDLE CASE`: generates the lists of some vertex contents with their factors and prints {classes, weight, CPU seconds}; CASE is JSON
 * {theory, legs, contents, options}. A process of its own, so that its CPU time can be measured from outside.
 */
import { pathToFileURL } from 'node:url';

const [bundle, text] = process.argv.slice(2);
const { theory, legs, contents, options } = JSON.parse(text);
const { enumerateContent } = await import(pathToFileURL(bundle).href);
const start = process.cpuUsage();
let classes = 0;
let weight = 0;
for (const content of contents)
  for (const { symmetryFactor } of enumerateContent(theory, legs, content, options)) {
    classes++;
    weight += 1 / Number(symmetryFactor);
  }
const { user, system } = process.cpuUsage(start);
console.log(JSON.stringify({ classes, weight, seconds: (user + system) / 1e6 }));

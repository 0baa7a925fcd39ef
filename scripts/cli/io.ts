import { readFileSync, writeSync } from 'node:fs';
import { errorObject, exitCode, Refusal } from '#contract/errors.ts';

/** Text of the file named, or of standard input for "-". @throws Refusal when there is none. */
export function readInput(usage: string): string {
  const file = process.argv.slice(2).find((argument) => !argument.startsWith('--'));
  if (file === undefined) throw new Refusal({ code: 'bad-request', message: usage, line: null, column: null });
  try {
    return readFileSync(file === '-' ? 0 : file, 'utf8');
  } catch {
    throw new Refusal({ code: 'bad-request', message: `The file ${file} cannot be read.`, line: null, column: null });
  }
}

/** Refuses options that the command does not have. */
export function checkOptions(known: readonly string[], usage: string): void {
  const unknown = process.argv.slice(2).find((argument) => argument.startsWith('--') && !known.includes(argument));
  if (unknown !== undefined)
    throw new Refusal({
      code: 'bad-request',
      message: `Unknown option ${unknown}. ${usage}`,
      line: null,
      column: null,
    });
}

/** Writes to standard output synchronously, in pieces: a result may be larger than a pipe's buffer. */
export function write(text: string): void {
  let bytes = Buffer.from(text);
  while (bytes.length > 0) {
    try {
      bytes = bytes.subarray(writeSync(1, bytes));
    } catch (error) {
      const { code } = error as NodeJS.ErrnoException;
      if (code === 'EPIPE') process.exit(0);
      if (code !== 'EAGAIN') throw error;
    }
  }
}

/** Runs a command: its error object goes to standard error as JSON, its kind into the exit code. */
export function main(command: () => void): void {
  try {
    command();
  } catch (thrown) {
    const known = errorObject(thrown);
    const error = known ?? {
      code: 'defect' as const,
      message: `A defect of the program: ${thrown instanceof Error ? thrown.message : String(thrown)}`,
      line: null,
      column: null,
    };
    process.stderr.write(`${JSON.stringify({ error })}\n`);
    process.exitCode = exitCode(known);
  }
}

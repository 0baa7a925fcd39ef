import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { type Config, projectRoot, readConfig } from '#server/config.ts';
import { drain, makeServer, type PageHandler } from '#server/http/server.ts';
import { staticFiles } from '#server/http/static.ts';
import { makeLog } from '#server/log.ts';
import { provide } from './provide.ts';

const GRACE_MS = 10_000;

/** What the pages' bundle keeps for the whole process: see #server/runtime.ts. */
const live = () =>
  (globalThis as Record<symbol, { close(): Promise<void> } | undefined>)[Symbol.for('wickwork.runtime')];

function settings(): Config {
  try {
    return readConfig(process.env);
  } catch (error) {
    console.error((error as Error).message);
    process.exit(2);
  }
}

const config = settings();
const log = makeLog(config.logLevel);
await provide(config, log);

const entry = join(projectRoot, 'dist', 'server', 'entry.mjs');
const { handler } = (await import(pathToFileURL(entry).href)) as { handler: PageHandler };
const server = makeServer({ config, log, files: staticFiles(join(projectRoot, 'dist', 'client')), handler });

let stopping = false;
async function stop(signal: string): Promise<void> {
  if (stopping) process.exit(1);
  stopping = true;
  log.info({ signal }, 'stopping');
  await drain(server, GRACE_MS);
  await live()?.close();
  process.exit(0);
}
process.on('SIGTERM', () => void stop('SIGTERM'));
process.on('SIGINT', () => void stop('SIGINT'));

server.on('error', (error: NodeJS.ErrnoException) => {
  const taken = error.code === 'EADDRINUSE' ? `Port ${config.port} is taken: set PORT to another.` : error.message;
  console.error(taken);
  process.exit(1);
});
server.listen(config.port, config.host, async () => {
  const address = server.address();
  const port = typeof address === 'object' && address ? address.port : config.port;
  const host = config.host.includes(':') ? `[${config.host}]` : config.host;
  // The first request starts the runtime: the jobs that a crash left are taken up now, not when somebody comes.
  await fetch(`http://${host}:${port}/readyz`).catch((error: unknown) => log.error({ err: error }, 'not ready'));
  console.log(`Wickwork is at http://${host}:${port}`);
});

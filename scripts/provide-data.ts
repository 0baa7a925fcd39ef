import { readConfig } from '#server/config.ts';
import { makeLog } from '#server/log.ts';
import { provide } from './provide.ts';

/** Migrations and demo for the development server, which has no entry of ours to do it. */
const config = readConfig(process.env);
await provide(config, makeLog(config.logLevel));

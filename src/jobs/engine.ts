export { prepare, runExpansion } from '../lib/server/engine-interim.ts';

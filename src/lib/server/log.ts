import pino, { type Logger } from 'pino';

/** JSON lines on standard output; never a password, cookie or token. */
export function makeLog(level: string): Logger {
  return pino({
    level,
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: { paths: ['*.password', '*.cookie', '*.authorization', 'headers'], remove: true },
  });
}

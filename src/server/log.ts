import pino from 'pino';

/** JSON lines on standard output. Passwords, tokens and cookies are never among what is logged. */
export const log = pino({
  level: process.env['LOG_LEVEL'] || (process.env['VITEST'] ? 'silent' : 'info'),
  base: null,
  timestamp: pino.stdTimeFunctions.isoTime,
});

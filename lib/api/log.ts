/** The one logger. Secrets and file contents never reach it: callers log ids, codes and counts. */
import pino from 'pino';

export const log = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  base: { process: process.env.OHMSTEAD_PROCESS ?? 'web' },
  redact: ['*.password', '*.token', '*.authorization', '*.cookie', '*.secret'],
});

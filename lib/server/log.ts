import 'server-only';
import pino from 'pino';
import { env } from './env';

/** Structured lines; secrets and addresses are blanked out before they reach a file. */
export const log = pino({
  level: env().LOG_LEVEL,
  base: null,
  redact: { paths: ['*.password', '*.token', '*.secret', '*.authorization', '*.email', '*.to'], censor: '[kept back]' },
});

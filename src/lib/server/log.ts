import { pino, type Logger } from 'pino';
import { config } from './config';

let logger: Logger | undefined;

/** Lines of JSON on standard output. What could be a secret or a person's own is struck out wherever it stands. */
export function log(): Logger {
  logger ??= pino({
    level: config().logLevel,
    base: { service: 'holdfast' },
    timestamp: pino.stdTimeFunctions.isoTime,
    redact: {
      paths: ['password', 'token', 'cookie', 'authorization', 'email', 'secret'].flatMap((name) => [
        name,
        `*.${name}`,
        `*.*.${name}`,
      ]),
      censor: '(left out)',
    },
  });
  return logger;
}

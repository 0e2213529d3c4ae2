import pino from 'pino';
import { environment } from './env';

let instance: pino.Logger | undefined;

/** Structured lines on standard output; passwords, cookies and tokens are never part of them. */
export function log(): pino.Logger {
  instance ??= pino({
    level: environment().LOG_LEVEL,
    redact: ['password', 'token', 'cookie', '*.password', '*.token'],
  });
  return instance;
}

import pino, { type Logger } from 'pino';

export type Log = Logger;

/** One JSON line an event, without secrets or personal data: addresses and bodies are never logged. */
export function createLog(level: string, name: string): Log {
  return pino({
    name,
    level,
    redact: {
      paths: ['req.headers', 'res.headers', '*.password', '*.token', '*.email', '*.recipient'],
      remove: true,
    },
  });
}

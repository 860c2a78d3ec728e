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
    serializers: { err: plainError },
  });
}

/** What Sequelize, PostgreSQL and Node.js add to their errors and may be told. */
interface Failed {
  code?: string;
  constraint?: string;
  parent?: Failed;
}

/**
 * What failed and where, and nothing of what it failed on: errors of the database carry the values
 * of the statement, those of the mail server the address.
 */
export function plainError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { message: 'something that is no error was thrown' };
  const { code, constraint } = (error as Failed).parent ?? (error as Failed);
  return {
    type: error.constructor.name,
    message: withoutAddresses(error.message),
    stack: withoutAddresses(error.stack ?? ''),
    ...(code === undefined ? {} : { code }),
    ...(constraint === undefined ? {} : { constraint }),
    ...(error.cause instanceof Error ? { cause: plainError(error.cause) } : {}),
  };
}

function withoutAddresses(text: string): string {
  return text.replace(/[^\s@<>"'(),:;]+@[^\s@<>"'(),:;]+\.[^\s@<>"'(),:;]+/g, '(an address)');
}

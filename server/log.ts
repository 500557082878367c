import { pino, type DestinationStream, type Logger } from 'pino';

/**
 * What may be known about an error in a log. A driver's message quotes the values of a
 * statement and a mail server's reply quotes addresses, so those two keep only their codes.
 * Of a stack only the places are kept: its first lines repeat the message.
 */
export function describeError(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { type: typeof error };
  const facts = error as Error & Record<string, unknown>;
  const fromDriver = 'query' in facts || 'severity' in facts || 'responseCode' in facts;
  return {
    type: error.name,
    ...(fromDriver
      ? {}
      : { message: error.message.replaceAll(/[^\s<>"']+@[^\s<>"']+/g, '[address]') }),
    ...pick(facts, ['code', 'constraint_name', 'table_name', 'routine', 'responseCode', 'syscall']),
    stack: error.stack
      ?.split('\n')
      .filter((line) => /^\s+at /.test(line))
      .slice(0, 12)
      .map((line) => line.trim()),
    ...(error.cause === undefined ? {} : { cause: describeError(error.cause) }),
  };
}

function pick(source: Record<string, unknown>, names: string[]): Record<string, unknown> {
  return Object.fromEntries(
    names.flatMap((name) => (source[name] === undefined ? [] : [[name, source[name]]])),
  );
}

/**
 * The server's log, JSON lines on stdout (or where a test wants them). Nothing here ever holds
 * an address, a cookie, a token, a body or a URL.
 */
export function createLog(level: string, destination?: DestinationStream): Logger {
  const options = { level, base: null, serializers: { err: describeError } };
  return destination ? pino(options, destination) : pino(options);
}

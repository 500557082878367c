import { DrizzleQueryError } from 'drizzle-orm/errors';

/**
 * SQLSTATE classes and codes (PostgreSQL manual, appendix A) that mean "the server is not there
 * for us now": 08 connection exception, 57P01 to 57P05 shutdown, crash, starting up, idle session,
 * 53300 too many connections, 57014 statement cancelled by its time limit.
 */
const awaySqlStates = /^(08...|57P0[1-5]|53300|57014)$/;

/** Codes of the driver and of Node.js for a connection that cannot be made or was lost. */
const awayCodes = new Set([
  'CONNECT_TIMEOUT',
  'CONNECTION_CLOSED',
  'CONNECTION_DESTROYED',
  'CONNECTION_ENDED',
  'ECONNREFUSED',
  'ECONNRESET',
  'EHOSTUNREACH',
  'ENETUNREACH',
  'ENOENT',
  'ENOTFOUND',
  'EAI_AGAIN',
  'EPIPE',
  'ETIMEDOUT',
]);

function driverError(error: unknown): Record<string, unknown> | null {
  const inner = error instanceof DrizzleQueryError ? error.cause : error;
  return inner instanceof Error ? (inner as unknown as Record<string, unknown>) : null;
}

/** Whether the database could not be reached, so that trying again later is right. */
export function isDatabaseAway(error: unknown): boolean {
  const code = driverError(error)?.code;
  return typeof code === 'string' && (awayCodes.has(code) || awaySqlStates.test(code));
}

/** Whether a statement failed on this unique constraint or index. */
export function violatesUnique(error: unknown, constraint: string): boolean {
  const driver = driverError(error);
  return driver?.code === '23505' && driver.constraint_name === constraint;
}

/**
 * Whether a text cannot be stored as jsonb although it is JSON: PostgreSQL refuses the
 * character U+0000 (22P05) and half of a surrogate pair (22P02).
 */
export function isTextNotStorable(error: unknown): boolean {
  const code = driverError(error)?.code;
  return code === '22P05' || code === '22P02' || code === '22021';
}

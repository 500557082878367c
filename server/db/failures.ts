import { DrizzleQueryError } from 'drizzle-orm/errors';

/**
 * SQLSTATE classes and codes of a server that goes away or is not there yet (PostgreSQL manual,
 * appendix A): 08 connection exception, 57P01 to 57P05 shutdown, crash, starting up, dropped
 * database, idle session.
 */
const lostSqlStates = /^(08...|57P0[1-5])$/;
/**
 * The same for one that has too much to do: 53300 connections, 57014 cut off at its time limit,
 * 40001 and 40P01 rolled back because of others.
 */
const busySqlStates = /^(53300|57014|40001|40P01)$/;

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
  'ENOTFOUND',
  'EAI_AGAIN',
  'EPIPE',
  'ETIMEDOUT',
]);

function driverError(error: unknown): Record<string, unknown> | null {
  const inner = error instanceof DrizzleQueryError ? error.cause : error;
  return inner instanceof Error ? (inner as unknown as Record<string, unknown>) : null;
}

/** Whether the connection could not be made, or broke while it was used. */
export function isConnectionLost(error: unknown): boolean {
  const { code, syscall } = driverError(error) ?? {};
  if (typeof code !== 'string') return false;
  // The socket of a local server that is not running is a missing file.
  if (code === 'ENOENT') return syscall === 'connect';
  return awayCodes.has(code) || lostSqlStates.test(code);
}

/** Whether the database cannot help now, so that trying again later is right. */
export function isDatabaseAway(error: unknown): boolean {
  const code = driverError(error)?.code;
  return isConnectionLost(error) || (typeof code === 'string' && busySqlStates.test(code));
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

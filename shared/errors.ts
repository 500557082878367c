/**
 * Expected failures that stop the work. They are data: they cross workers and HTTP unchanged,
 * and the interface chooses their words (src/app/error-text.ts). Something wrong with the
 * delivered files is never one of these, it is a finding. A bug is an ordinary exception.
 */

/** The closed list of codes, each with the HTTP status it travels under. */
export const appErrorStatus = {
  /** The body is not JSON, or not what the endpoint's contract says. details: { issues } */
  'invalid-request': 400,
  /** Nobody is signed in, or the session has ended. */
  'sign-in-required': 401,
  /** The address or the password is wrong; never says which. */
  'sign-in-failed': 401,
  /** Signed in, but this person may not do this. */
  'not-allowed': 403,
  /** An unsafe request that did not come from our own pages. */
  'wrong-origin': 403,
  /** There is nothing there, or nothing this person may know of. */
  'not-found': 404,
  /** The thing changed since it was read. details: { current } where it helps */
  conflict: 409,
  /** The name, slug or address is already in use. details: { field } */
  'already-taken': 409,
  /** A link from a mail that was used, replaced or is too old. */
  'link-expired': 410,
  /** The body is larger than the endpoint accepts. details: { limitBytes } */
  'too-large': 413,
  /** Too many tries. details: { retryAfterSeconds } */
  'too-many-tries': 429,
  /** A bug on the server. details: { requestId } */
  'server-error': 500,
  /** The database or another service does not answer; trying again later is right. */
  unavailable: 503,
  /** The server could not be reached (made by the client, never sent). */
  offline: 503,
  /** The person stopped the work. */
  cancelled: 499,
  /** The disk refused to take more. */
  'disk-full': 507,
  /** A file or folder could not be opened at all. details: { path } */
  'no-access': 403,
  /** A file changed after it was checked, so it cannot be packed. details: { path } */
  'file-changed': 409,
  /** The WebAssembly meters could not be loaded. details: { reason } */
  'engine-failed': 500,
  /** A zip that cannot be read safely. details: { reason, entry } */
  'zip-refused': 422,
  /** House rules JSON with errors. details: { issues: [{ path, message }] } */
  'rules-invalid': 422,
  /** Nothing to check: no folder, no file, or no audio in it. details: { path } */
  'nothing-to-check': 422,
} as const satisfies Record<string, number>;

export type AppErrorCode = keyof typeof appErrorStatus;

export type AppErrorData = { code: AppErrorCode; details?: Record<string, unknown> };

/** Thrown inside one process; crosses a boundary as AppErrorData. */
export class AppError extends Error implements AppErrorData {
  readonly code: AppErrorCode;
  readonly details: Record<string, unknown>;

  constructor(code: AppErrorCode, details: Record<string, unknown> = {}) {
    super(code);
    this.name = 'AppError';
    this.code = code;
    this.details = details;
  }

  toData(): AppErrorData {
    return { code: this.code, details: this.details };
  }
}

export function isAppErrorCode(value: unknown): value is AppErrorCode {
  return typeof value === 'string' && Object.hasOwn(appErrorStatus, value);
}

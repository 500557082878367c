/**
 * Something expected that stops the set-up (no rights, no room, a port taken). The message is one
 * or two sentences a person can act on; it is printed without a stack.
 *
 * @param {string} sentence
 * @param {unknown} [cause]
 */
export function setupFailure(sentence, cause) {
  const failure = new Error(sentence, { cause });
  failure.name = 'SetupFailure';
  return failure;
}

/** Text for the terminal: the sentence of an expected failure, the whole stack of a bug. */
export function describeFailure(/** @type {unknown} */ error) {
  if (!(error instanceof Error)) return String(error);
  return error.name === 'SetupFailure' ? error.message : (error.stack ?? error.message);
}

/** True where the system or a program's output says that the disk is full. */
export function saysDiskFull(/** @type {unknown} */ said) {
  const text = said instanceof Error ? `${said.message} ${errorCode(said)}` : String(said);
  return /No space left on device|Check free disk space|ENOSPC|Disk quota exceeded|EDQUOT/.test(
    text,
  );
}

/** The system's code of an error (`ENOENT`, `EADDRINUSE`), or an empty string. */
export function errorCode(/** @type {unknown} */ error) {
  const code = error instanceof Error && 'code' in error ? error.code : '';
  return typeof code === 'string' ? code : '';
}

/** The last lines of a program's output, for a sentence about why it failed. */
export function lastLines(/** @type {string} */ text, count = 3) {
  return text.trim().split('\n').slice(-count).join('\n').trim();
}

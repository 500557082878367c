import { AppError, type AppErrorCode } from '#shared/errors.ts';

export type ErrorText = {
  /** What happened, one sentence. */
  title: string;
  /** What to do about it. */
  advice: string;
};

type Details = Record<string, unknown>;

function numberOf(details: Details, key: string): number | undefined {
  const value = details[key];
  return typeof value === 'number' && Number.isFinite(value) ? value : undefined;
}

function textOf(details: Details, key: string): string | undefined {
  const value = details[key];
  return typeof value === 'string' && value !== '' ? value : undefined;
}

function waitWords(seconds: number | undefined): string {
  if (seconds === undefined) return 'Wait a while, then try again.';
  if (seconds <= 5) return 'Try again in a moment.';
  if (seconds < 90) return `Try again in ${String(Math.ceil(seconds))} seconds.`;
  if (seconds < 5400) return `Try again in ${String(Math.ceil(seconds / 60))} minutes.`;
  return `Try again in ${String(Math.ceil(seconds / 3600))} hours.`;
}

const zipOtherwise = 'It is damaged. Copy it again, or unpack it yourself and drop the folder.';

/** What to do about a refused zip, by the reason that came with it. */
const zipAdvice: Record<string, string | undefined> = {
  'not-a-zip': 'It is called a zip, but it is not a zip. Drop the folder instead.',
  'too-large': 'It unpacks to far more than a session holds. Drop the folder instead.',
  'too-many-entries': 'It holds more files than a session does. Drop the folder instead.',
  'several-parts': 'It is one part of several. Unpack them together and drop the folder instead.',
};

/** Words for every expected failure. A new code does not compile without its words. */
const texts: Record<AppErrorCode, (details: Details) => ErrorText> = {
  'invalid-request': () => ({
    title: 'The server did not understand what this page sent.',
    advice: 'Reload the page and try again; it may be older than the server.',
  }),
  'sign-in-required': () => ({
    title: 'You are signed out.',
    advice: 'Sign in again to go on. Nothing you had stored is lost.',
  }),
  'sign-in-failed': () => ({
    title: 'That address and password do not fit together.',
    advice: 'Check both, or ask for a link to set a new password.',
  }),
  'not-allowed': () => ({
    title: 'You may not do this here.',
    advice: 'Ask the engineer who owns the studio.',
  }),
  'wrong-origin': () => ({
    title: 'The request did not come from this page.',
    advice: 'Open Flightcase in its own tab and try again.',
  }),
  'not-found': () => ({
    title: 'There is nothing here, or nothing you may see.',
    advice: 'Check the address, or ask the person who sent it to you.',
  }),
  conflict: () => ({
    title: 'Somebody changed this in the meantime.',
    advice: 'Reload to see what it is now, then make your change again.',
  }),
  'already-taken': (details) => ({
    title:
      textOf(details, 'field') === 'email'
        ? 'This e-mail address already has an account.'
        : 'This is already in use.',
    advice:
      textOf(details, 'field') === 'email' ? 'Sign in with it first.' : 'Choose something else.',
  }),
  'link-expired': () => ({
    title: 'This link no longer works.',
    advice: 'It was used already, replaced by a newer one, or is too old. Ask for a new one.',
  }),
  'too-large': (details) => {
    const limit = numberOf(details, 'limitBytes');
    return {
      title: 'That is more than the server takes at once.',
      advice:
        limit === undefined
          ? 'Make it smaller and try again.'
          : `The most it takes is ${String(Math.floor(limit / 1024))} KB.`,
    };
  },
  'too-many-tries': (details) => ({
    title: 'Too many tries.',
    advice: waitWords(numberOf(details, 'retryAfterSeconds')),
  }),
  'server-error': () => ({
    title: 'Something broke on the server.',
    advice: 'It is not your doing. Try again; if it stays, tell us the request number.',
  }),
  unavailable: () => ({
    title: 'The server is not ready just now.',
    advice: 'It usually comes back by itself. Try again in a minute.',
  }),
  offline: () => ({
    title: 'The server could not be reached.',
    advice: 'Check your connection. What you have on this page stays here meanwhile.',
  }),
  cancelled: () => ({ title: 'Stopped.', advice: 'You can start again whenever you like.' }),
  'disk-full': () => ({
    title: 'The disk has no room left.',
    advice: 'Free some space or choose another disk, then save again.',
  }),
  'no-access': (details) => ({
    title: `“${textOf(details, 'path') ?? 'The file'}” could not be opened.`,
    advice: 'It may have moved, or another program holds it. Drop the folder again.',
  }),
  'file-changed': (details) => ({
    title: `“${textOf(details, 'path') ?? 'A file'}” changed after it was checked.`,
    advice: 'Check the folder again; nothing was saved.',
  }),
  'engine-failed': () => ({
    title: 'The part that measures the sound could not be loaded.',
    advice: 'Reload the page. If that does not help, update the browser.',
  }),
  'zip-refused': (details) => ({
    title: 'This zip cannot be opened safely.',
    advice: zipAdvice[textOf(details, 'reason') ?? ''] ?? zipOtherwise,
  }),
  'rules-invalid': () => ({
    title: 'These house rules have mistakes in them.',
    advice: 'The places are listed below.',
  }),
  'nothing-to-check': () => ({
    title: 'There is no audio in what you dropped.',
    advice: 'Drop the folder that your recording program exported.',
  }),
};

/** A page's script that could not be fetched: offline, or the server has a newer version. */
function isLoadFailure(error: unknown): boolean {
  return (
    error instanceof TypeError && /dynamically imported module|module script/i.test(error.message)
  );
}

/** The words for anything that was thrown; what is not an AppError is a bug and says so. */
export function errorText(error: unknown): ErrorText {
  if (error instanceof AppError) return texts[error.code](error.details);
  if (isLoadFailure(error))
    return {
      title: 'A part of this page could not be loaded.',
      advice: 'Check your connection and reload; there may also be a newer version.',
    };
  return {
    title: 'Something broke on this page.',
    advice: 'It is not your doing. Reload the page to go on.',
  };
}

/** The request number to quote when asking for help. */
export function requestIdOf(error: unknown): string | undefined {
  return error instanceof AppError ? textOf(error.details, 'requestId') : undefined;
}

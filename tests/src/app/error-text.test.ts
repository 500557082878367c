import { AppError, appErrorStatus, type AppErrorCode } from '#shared/errors.ts';
import { describe, expect, it } from 'vitest';
import { errorText, requestIdOf } from '../../../src/app/error-text.ts';

const codes = Object.keys(appErrorStatus) as AppErrorCode[];

describe('errorText', () => {
  it.each(codes)('says %s in sentences, without the code', (code) => {
    const { title, advice } = errorText(new AppError(code));
    for (const sentence of [title, advice]) {
      expect(sentence).toMatch(/^[A-Z“].*[.!?]$/);
      expect(sentence).not.toContain('undefined');
    }
    if (code.includes('-')) expect(`${title} ${advice}`).not.toContain(code);
  });

  it.each([
    [1, 'Try again in a moment.'],
    [60, 'Try again in 60 seconds.'],
    [600, 'Try again in 10 minutes.'],
    [7200, 'Try again in 2 hours.'],
  ])('counts %i seconds in the unit a person would use', (retryAfterSeconds, advice) => {
    expect(errorText(new AppError('too-many-tries', { retryAfterSeconds })).advice).toBe(advice);
  });

  it('survives details of the wrong kind', () => {
    const { advice } = errorText(new AppError('too-many-tries', { retryAfterSeconds: 'soon' }));
    expect(advice).toBe('Wait a while, then try again.');
  });

  it('does not show what a bug says', () => {
    const { title, advice } = errorText(new Error('x is not a function'));
    expect(`${title} ${advice}`).not.toContain('x is not a function');
  });

  it('explains a page script that could not be loaded', () => {
    const error = new TypeError('Failed to fetch dynamically imported module: /assets/a.js');
    expect(errorText(error).title).toBe('A part of this page could not be loaded.');
  });
});

describe('requestIdOf', () => {
  it('finds the number to quote', () => {
    expect(requestIdOf(new AppError('server-error', { requestId: 'r-1' }))).toBe('r-1');
    expect(requestIdOf(new AppError('offline'))).toBeUndefined();
    expect(requestIdOf(new Error('x'))).toBeUndefined();
  });
});

import { z } from 'zod';
import { isAppErrorCode, type AppErrorCode } from '../errors.ts';

/** The media type of an error answer (RFC 9457, section 3). */
export const problemMediaType = 'application/problem+json';

/**
 * An error answer (RFC 9457). `type` is `about:blank`, so `title` is the HTTP status phrase;
 * our own members are `code` (what the interface chooses its words by), `details` and
 * `requestId` (what the server's log knows the request by). Unknown members are kept out of
 * nobody's way: the standard says to ignore them.
 */
export const problemSchema = z.object({
  type: z.string().default('about:blank'),
  title: z.string(),
  status: z.number().int(),
  code: z.custom<AppErrorCode>(isAppErrorCode),
  details: z.record(z.string(), z.unknown()).default({}),
  requestId: z.string(),
});
export type Problem = z.output<typeof problemSchema>;

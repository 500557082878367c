import type { RequestHandler } from 'express';
import { safeMethods } from '#shared/api/endpoint.ts';
import { AppError } from '#shared/errors.ts';

/**
 * Refuses every request that could change something and was not made by our own pages
 * (cross-site request forgery): browsers send `Origin` with each of these, and a page cannot
 * choose it. Where the browser also says how the page and we are related (Fetch Metadata,
 * `Sec-Fetch-Site`), that must agree.
 */
export function refuseForeignOrigins(origin: string): RequestHandler {
  return (request, _response, next) => {
    if (!(safeMethods as readonly string[]).includes(request.method)) {
      const site = request.headers['sec-fetch-site'];
      const ours = request.headers.origin === origin && (!site || site === 'same-origin');
      if (!ours) throw new AppError('wrong-origin');
    }
    next();
  };
}

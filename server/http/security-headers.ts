import type { RequestHandler } from 'express';
import helmet from 'helmet';

/**
 * What a page of ours may do, sent with every answer, worker scripts among them (a worker goes
 * by the policy its own script came with). `wasm-unsafe-eval` lets the meters' WebAssembly be
 * compiled and nothing else be evaluated; headless components put styles into the page.
 */
export function securityHeaders(origin: string): RequestHandler[] {
  return [
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          'default-src': ["'self'"],
          'script-src': ["'self'", "'wasm-unsafe-eval'"],
          'script-src-attr': ["'none'"],
          'style-src': ["'self'", "'unsafe-inline'"],
          'worker-src': ["'self'"],
          'img-src': ["'self'", 'blob:', 'data:'],
          'media-src': ["'self'", 'blob:'],
          'connect-src': ["'self'"],
          'font-src': ["'self'"],
          'object-src': ["'none'"],
          'frame-ancestors': ["'none'"],
          'base-uri': ["'none'"],
          'form-action': ["'self'"],
        },
      },
      referrerPolicy: { policy: 'same-origin' },
      xFrameOptions: { action: 'deny' },
      strictTransportSecurity: origin.startsWith('https:') && { maxAge: 31_536_000 },
    }),
    (_request, response, next) => {
      response.setHeader(
        'Permissions-Policy',
        'camera=(), microphone=(), geolocation=(), payment=(), usb=(), serial=(), midi=()',
      );
      next();
    },
  ];
}

import path from 'node:path';
import express, { Router } from 'express';

/**
 * Serves the built client. Files in `assets/` carry a hash of their content in their name and
 * are kept by browsers for good; everything else is asked for again each time. Any other
 * address without a dot in its last part is a page of the client: it gets `index.html`.
 */
export function clientFiles(clientDir: string): Router {
  const root = path.resolve(clientDir);
  const router = Router();
  router.use(
    '/assets',
    express.static(path.join(root, 'assets'), {
      immutable: true,
      maxAge: '1y',
      index: false,
      fallthrough: false,
    }),
  );
  router.use(
    express.static(root, {
      index: false,
      redirect: false,
      setHeaders: (response) => response.setHeader('Cache-Control', 'no-cache'),
    }),
  );
  router.get('/{*page}', (request, response, next) => {
    if (path.basename(request.path).includes('.')) {
      next();
      return;
    }
    response.sendFile(
      'index.html',
      { root, cacheControl: false, headers: { 'Cache-Control': 'no-cache' } },
      // Called after success too, when there is nothing left for anybody to answer.
      (error) => {
        if (error) next(error);
      },
    );
  });
  return router;
}

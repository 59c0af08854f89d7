import express, { Router } from 'express';
import { existsSync } from 'node:fs';
import { join } from 'node:path';

const HASHED = /-[A-Z0-9]{8}\.\w+$/;

/** The built client: hashed files for a year, everything else checked each time, deep links answered by the page. */
export function serveClient(clientDir: string): Router {
  const router = Router();
  const page = join(clientDir, 'index.html');
  router.use(
    express.static(clientDir, {
      index: false,
      setHeaders(res, path) {
        res.setHeader(
          'Cache-Control',
          HASHED.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache',
        );
      },
    }),
  );
  router.get('/{*path}', (req, res, next) => {
    if (!req.accepts('html') || !existsSync(page)) {
      next();
      return;
    }
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(page, { root: '/' });
  });
  return router;
}

import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router } from 'express';
import { NotFound } from './problems.ts';

/**
 * The built portal. Its assets carry their digest in the name and never change; the page that names them is asked for
 * each time. A missing asset is 404 and never the page, which a browser would run as script.
 */
export function portalFiles(folder: string): Router {
  const router = Router();
  const page = join(folder, 'index.html');
  if (!existsSync(page)) return router;
  router.use(
    '/assets',
    express.static(join(folder, 'assets'), {
      index: false,
      immutable: true,
      maxAge: '365d',
      redirect: false,
    }),
    (_req, _res, next) => next(new NotFound('There is no such file.')),
  );
  router.use(
    express.static(folder, {
      index: false,
      redirect: false,
      maxAge: 0,
      dotfiles: 'ignore',
      setHeaders: hidden,
    }),
  );
  router.get('/{*any}', (req, res, next) => {
    // An address with a dot asks for a file, and the file is not there.
    if (req.path.startsWith('/api/') || req.path === '/api' || /\.[^/]*$/.test(req.path)) {
      next();
      return;
    }
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(page);
  });
  return router;
}

function hidden(res: { setHeader: (name: string, value: string) => void }): void {
  res.setHeader('Cache-Control', 'no-cache');
}

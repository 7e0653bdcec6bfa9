import { existsSync } from 'node:fs';
import { extname, join, sep } from 'node:path';

import { Router, type Request, type Response } from 'express';

const YEAR_MS = 365 * 86_400_000;
/** File names in these hold a hash of their content. */
const HASHED = ['/_expo/', '/assets/'];
const ENCODINGS = [
  { name: 'br', suffix: '.br' },
  { name: 'gzip', suffix: '.gz' },
];
const NOT_BUILT =
  '<!doctype html><title>Stillfield</title><p>The web application has not been built yet. <code>npm start</code> builds it.';

/** The exported web application: its files, and its one page for every address that is not a file. */
export function webApp(root: string): Router {
  const router = Router();
  router.get('/{*splat}', (req, res, next) => {
    const path = safePath(req.path);
    if (path === null) return next();
    const hashed = HASHED.some((prefix) => path.startsWith(prefix));
    if (extname(path) !== '' && existsSync(join(root, path))) return sendFile(req, res, root, path, hashed);
    // A script that is gone must not be answered with a page.
    if (hashed || extname(path) !== '') return next();
    if (existsSync(join(root, 'index.html'))) return sendFile(req, res, root, '/index.html', false);
    res.status(503).type('html').send(NOT_BUILT);
  });
  return router;
}

function safePath(raw: string): string | null {
  try {
    const path = decodeURIComponent(raw);
    return path.includes('\0') || path.split(/[/\\]/).includes('..') || path.includes(`${sep}.`)
      ? null
      : path;
  } catch {
    return null;
  }
}

function sendFile(req: Request, res: Response, root: string, path: string, hashed: boolean): void {
  const accepted = ENCODINGS.find(
    ({ name, suffix }) => existsSync(join(root, path + suffix)) && req.acceptsEncodings(name) === name,
  );
  res.vary('Accept-Encoding');
  res.type(extname(path));
  if (accepted) res.setHeader('Content-Encoding', accepted.name);
  const isPage = extname(path) === '.html';
  if (isPage) res.setHeader('Cache-Control', 'no-cache');
  res.sendFile(path + (accepted?.suffix ?? ''), {
    root,
    cacheControl: !isPage,
    maxAge: hashed ? YEAR_MS : 3_600_000,
    immutable: hashed,
  });
}

import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router, type Response } from 'express';
import { Problem } from './problem';
import { styleNonceOf } from './security-headers';

/** Names the build gives by content, as `main-ABCD1234.js`: what lies under one never changes. */
const hashed = /-[A-Z0-9]{8}\.[a-z0-9]+$/;

/** The built screens: files as they are, and the page itself for every address inside the application. */
export function clientFiles(folder: string): Router {
  const router = Router();
  const page = readPage(folder);
  // Before the files, among which it lies with its placeholder.
  router.get('/index.html', (_req, res) => sendPage(res, page()));
  router.use(
    express.static(folder, {
      index: false,
      redirect: false,
      setHeaders(res, path) {
        res.setHeader(
          'Cache-Control',
          hashed.test(path) ? 'public, max-age=31536000, immutable' : 'public, max-age=300',
        );
      },
    }),
  );
  router.get('/{*address}', (req, res) => {
    // A file that is not there must not look like a page: a browser would run it as a script and fail oddly.
    if (/\.[a-z0-9]+$/i.test(req.path)) throw new Problem(404, 'not-found', 'There is no such file.');
    sendPage(res, page());
  });
  return router;
}

/** The page names its nonce in a placeholder; each answer gets its own, so the page may never be kept. */
function sendPage(res: Response, page: string): void {
  res
    .set('Cache-Control', 'no-store')
    .type('html')
    .send(page.replaceAll('CSP_NONCE', styleNonceOf(res)));
}

/** Read once; again on each request while there is none yet, as under `npm run dev`. */
function readPage(folder: string): () => string {
  const file = join(folder, 'index.html');
  let known: string | undefined;
  return () => {
    if (known === undefined && existsSync(file)) known = readFileSync(file, 'utf8');
    if (known === undefined)
      throw new Problem(404, 'not-found', 'The screens have not been built: run `npm run build`.');
    return known;
  };
}

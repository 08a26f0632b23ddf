import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { static as serveFiles, type Express } from 'express';
import { Problem } from './problem';

const YEAR_SECONDS = 31_536_000;

/** Files whose name holds a hash of their content never change. */
const HASHED = /[-.][A-Za-z0-9]{8,}\.(js|css|woff2?|svg|png|webp|ico)$/;

/** Serves the built client: hashed files for good, all others to be asked for again, and the page at every address of its own. */
export function serveClient(app: Express, folder: string): void {
  app.use(
    serveFiles(folder, {
      index: false,
      setHeaders: (response, path) => {
        const caching = HASHED.test(path) ? `public, max-age=${YEAR_SECONDS}, immutable` : 'no-cache';
        response.setHeader('Cache-Control', caching);
      },
    }),
  );
  const page = join(folder, 'index.html');
  app.get('/{*path}', (request, response) => {
    const isFile = /\.[a-z0-9]+$/i.test(request.path);
    if (isFile || !request.accepts('html') || !existsSync(page)) {
      throw new Problem('not-found', 'There is nothing at this address.');
    }
    response.setHeader('Cache-Control', 'no-cache');
    response.sendFile(page);
  });
}

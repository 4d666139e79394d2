import path from 'node:path';
import express from 'express';
import type { Express } from 'express';

/** A dot in the last step of a path asks for a file, and so does all that stands under `/assets`; `/api` has no pages. */
const NEVER_A_PAGE = /\.[^/]*$|^\/(?:api|assets)(?:\/|$)/;

/**
 * The built pages. Assets carry a hash of their content in their name, so they may be kept for ever; the page itself is asked for anew
 * each time. Any other path is the page, which knows what to show there; a file that is missing is missing.
 */
export function mountClient(app: Express, directory: string): void {
  app.use(
    '/assets',
    express.static(path.join(directory, 'assets'), { index: false, redirect: false, immutable: true, maxAge: '365d' }),
  );
  app.use(express.static(directory, { index: false, redirect: false, cacheControl: false, setHeaders: askAnew }));
  app.get('/{*path}', (request, response, next) => {
    if (NEVER_A_PAGE.test(request.path)) {
      next();
      return;
    }
    response.sendFile('index.html', { root: directory, cacheControl: false, headers: { 'Cache-Control': 'no-cache' } }, (error) => {
      // A page that was never built is missing; a visitor who went away is nobody's fault.
      if (error && !response.headersSent) next();
    });
  });
}

function askAnew(response: express.Response): void {
  response.set('Cache-Control', 'no-cache');
}

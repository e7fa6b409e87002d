import { existsSync } from 'node:fs';
import { basename, join } from 'node:path';
import express, { Router, type RequestHandler, type Response } from 'express';
import { isPageAddress } from '#shared/domain/page-addresses.ts';
import { AppError } from '#shared/errors/app-error.ts';

const year = 'public, max-age=31536000, immutable';
const version = /^\d+(\.\d+\.\d+(\.schema)?)?\.json$/;
/** Files of a conformance vector; the index beside them grows. */
const vector = /[\\/]conformance[\\/]M\d+[\\/][a-z0-9-]+[\\/][a-z-]+\.json$/;

const schemaHeaders = (response: Response, path: string): void => {
  const name = basename(path);
  if (name.endsWith('.schema.json')) response.type('application/schema+json');
  else if (name.endsWith('.md')) response.type('text/markdown; charset=utf-8');
  // A published version never changes; examples and guides may be reworded.
  response.set({ 'cache-control': version.test(name) || vector.test(path) ? year : 'public, max-age=3600', 'access-control-allow-origin': '*', 'cross-origin-resource-policy': 'cross-origin' });
};

/** The open formats under the paths they have in the repository. */
export const schemaFiles = (root: string): RequestHandler => express.static(root, { index: false, redirect: false, dotfiles: 'ignore', cacheControl: false, setHeaders: schemaHeaders });

/** Addresses of the API, of sign-in, of built files and of published schemas; /schema itself is a page. */
const notAPage = /^\/(api|auth|assets)(\/|$)|^\/schema\/.*\.(json|md|txt)$/;

/** The built client: hashed assets for a year, the page itself always fresh. Every address gets the page, one that no page has with 404. */
export const clientFiles = (root: string): Router => {
  const router = Router();
  router.use('/assets', express.static(join(root, 'assets'), { index: false, redirect: false, fallthrough: true, cacheControl: false, setHeaders: (response) => response.set('cache-control', year) }));
  router.use(express.static(root, { index: false, redirect: false, dotfiles: 'ignore', maxAge: '1h' }));
  router.get('/{*path}', (request, response, next) => {
    if (notAPage.test(request.path) || !request.accepts('html')) return next();
    const page = join(root, 'index.html');
    if (!existsSync(page)) return next(new AppError('unavailable', 'The pages are not built yet. `npm run build` makes them; the API answers meanwhile.'));
    response.status(isPageAddress(request.path) ? 200 : 404).set('cache-control', 'no-cache').sendFile(page);
  });
  return router;
};

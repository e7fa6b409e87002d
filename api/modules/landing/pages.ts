import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { Router, type Request, type RequestHandler, type Response } from 'express';
import { AppError } from '#shared/errors/app-error.ts';
import { headOf, withHead } from '#shared/landing/head.ts';
import type { Landing } from '#shared/landing/landing.ts';
import { linkHeader } from '#shared/landing/links.ts';
import type { Deps } from '#api/lib/deps.ts';
import { readFeed } from './feed.ts';
import { preferredForm } from './negotiate.ts';
import { readLanding } from './read-landing.ts';
import { readEntryPages, readSitemapIndex, readStandingPages } from './sitemap.ts';

const versionPattern = /^[1-9]\d{0,6}$/;

const shellOf = async ({ config }: Pick<Deps, 'config'>): Promise<string> => {
  try {
    return await readFile(join(config.webRoot, 'index.html'), 'utf8');
  } catch (fault) {
    throw new AppError('unavailable', 'The pages are not built yet. `npm run build` makes them; the API answers meanwhile.', [], { cause: fault });
  }
};

/** Null for an entry that is not public; the page then tells the reader so, with status 404. */
const findLanding = async (deps: Deps, accession: string, version: string | null): Promise<Landing | null> => {
  if (version !== null && !versionPattern.test(version)) return null;
  try {
    return await readLanding(deps.orm.em.fork(), accession, version === null ? null : Number(version), deps.config.publicUrl);
  } catch (fault) {
    if (fault instanceof AppError && fault.code === 'not-found') return null;
    throw fault;
  }
};

/** An entry's page: for people the application with its marks for machines in the head, for machines the way to the form they ask for. */
const entryPage = (deps: Deps): RequestHandler => async (request: Request, response: Response) => {
  const { accession, version } = request.params;
  const landing = await findLanding(deps, String(accession), version === undefined ? null : String(version));
  response.set({ 'cache-control': 'no-cache', vary: 'Accept', 'access-control-allow-origin': '*', 'access-control-expose-headers': 'link, location' });
  if (!landing) return void response.status(404).type('html').send(await shellOf(deps));
  response.set('link', linkHeader(landing));
  const form = preferredForm(request.get('accept'), landing.record);
  if (form) return response.redirect(303, form);
  response.type('html').send(withHead(await shellOf(deps), headOf(landing)));
};

const document = (type: string, read: (request: Request) => Promise<string>, fixed = false): RequestHandler => async (request, response) => {
  const text = await read(request);
  response.set({ 'cache-control': fixed ? 'public, max-age=86400' : 'public, max-age=300', 'access-control-allow-origin': '*' }).type(type).send(text);
};

/** Addresses of pages and documents for machines outside the API: entries, feed, sitemaps, robots. They stand before the built client. */
export const landingPages = (deps: Deps, limit: RequestHandler): Router => {
  const { publicUrl } = deps.config;
  const em = () => deps.orm.em.fork();
  const router = Router({ strict: false });
  router.get('/entries/:accession', limit, entryPage(deps));
  router.get('/entries/:accession/v/:version', limit, entryPage(deps));
  router.get('/feed.atom', limit, document('application/atom+xml; charset=utf-8', () => readFeed(em(), null, publicUrl)));
  router.get(/^\/feed\/(\d{1,7})\.atom$/, limit, document('application/atom+xml; charset=utf-8', (request) => readFeed(em(), Number(request.params[0]), publicUrl), true));
  router.get('/sitemap.xml', limit, document('application/xml; charset=utf-8', () => readSitemapIndex(em(), publicUrl)));
  router.get('/sitemap/pages.xml', limit, document('application/xml; charset=utf-8', () => readStandingPages(em(), publicUrl)));
  router.get(/^\/sitemap\/entries-(\d{1,6})\.xml$/, limit, document('application/xml; charset=utf-8', (request) => readEntryPages(em(), Number(request.params[0]), publicUrl)));
  router.get('/robots.txt', document('text/plain; charset=utf-8', async () => `User-agent: *\nDisallow: /auth/\nDisallow: /desk\n\nSitemap: ${publicUrl}/sitemap.xml\n`));
  return router;
};

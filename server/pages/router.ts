import { Router } from 'express';

import { readCellPage, readCells } from '../cells/read';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { keptAnswer, type MadeAnswer, sendKept } from '../http/keptAnswers';
import { cellTypePage } from './cellTypePage';
import { escapeHtml } from './html';
import { lifetimesPage } from './lifetimesPage';
import { cellPicture, listPicture } from './picture';
import { plainPage, plainPaths } from './plainPages';
import type { PageMaker, PublicPage } from './publicPage';
import { type PageTemplate, renderPage } from './renderPage';

/** Each public page's maker; the first that knows an address makes it. */
const makers: readonly PageMaker[] = [lifetimesPage, cellTypePage, plainPage];

/**
 * Public pages with their own head, words and first data in the app's page; pictures for previews of links; and what
 * search engines ask for. Anything else is left to the app.
 */
export function publicPages(deps: Deps, template: PageTemplate | null): Router {
  const router = Router();
  const origin = deps.config.publicUrl.replace(/\/$/, '');
  const kept = (path: string, make: () => Promise<MadeAnswer>) =>
    router.get(path, async (req, res) => {
      sendKept(req, res, await keptAnswer(deps.db, `page ${req.path}`, make));
    });

  kept('/robots.txt', async () => ({ type: 'text/plain', content: robots(origin) }));
  kept('/sitemap.xml', async () => ({ type: 'application/xml', content: await sitemap(deps, origin) }));
  kept('/pictures/lifetimes.png', async () => ({
    type: 'image/png',
    content: await listPicture(await readCells(deps)),
  }));
  router.get('/pictures/cells/:name', async (req, res) => {
    const id = /^([\w-]+)\.png$/.exec(req.params.name)?.[1];
    if (id === undefined) throw new AppError('notFound');
    const answer = await keptAnswer(deps.db, `page ${req.path}`, async () => ({
      type: 'image/png',
      content: await cellPicture(await readCellPage(deps, id)),
    }));
    sendKept(req, res, answer);
  });
  if (template)
    router.get('/{*path}', async (req, res, next) => {
      // A band is asked for by its own request; the words and data of the whole would not be the page's.
      if (!isPublic(req.path) || 'band' in req.query) return next();
      const answer = await keptAnswer(deps.db, `page ${req.path}`, async () => {
        const page = await makePage(deps, req.path);
        return { type: 'text/html', status: page.status, content: renderPage(template, page, origin) };
      });
      sendKept(req, res, answer);
    });
  return router;
}

async function makePage(deps: Deps, path: string): Promise<PublicPage> {
  for (const maker of makers) {
    const page = await maker(deps, path);
    if (page) return page;
  }
  throw new AppError('notFound');
}

const isPublic = (path: string) => path === '/' || /^\/cells\/[^/]+$/.test(path) || plainPaths.includes(path);

const robots = (origin: string) =>
  `${['User-agent: *', ...privatePaths.map((path) => `Disallow: ${path}`), `Sitemap: ${origin}/sitemap.xml`].join('\n')}\n`;

const privatePaths = ['/banks', '/screening', '/steward', '/settings', '/outbox', '/api'];

async function sitemap(deps: Deps, origin: string): Promise<string> {
  const { cells, pool } = await readCells(deps);
  const paths = ['/', ...cells.map(({ cellType }) => `/cells/${cellType.id}`), ...plainPaths];
  const changed = pool.fittedAt === null ? '' : `<lastmod>${pool.fittedAt.slice(0, 10)}</lastmod>`;
  const entries = paths.map((path) => `<url><loc>${escapeHtml(`${origin}${path}`)}</loc>${changed}</url>`);
  return `<?xml version="1.0" encoding="UTF-8"?>\n<urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9">${entries.join('')}</urlset>\n`;
}

import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

import { Router } from 'express';
import expressStaticGzip from 'express-static-gzip';

import type { Deps } from '../deps';
import { readTemplate } from '../pages/renderPage';
import { publicPages } from '../pages/router';

const year = 365 * 24 * 3600;

/**
 * The built web app: hashed files (Expo puts them under /_expo and /assets) are kept for a year, the rest is asked
 * for again each time. Every other address gets the app's one page, which finds its route itself.
 */
export function webApp(deps: Deps): Router {
  const { webDir } = deps.config;
  const router = Router();
  const page = join(webDir, 'index.html');
  const isBuilt = existsSync(page);
  router.use(publicPages(deps, isBuilt ? readTemplate(readFileSync(page, 'utf8')) : null));
  if (!isBuilt) return router;
  router.use(
    expressStaticGzip(webDir, {
      enableBrotli: true,
      orderPreference: ['br', 'gz'],
      index: false,
      serveStatic: {
        index: false,
        setHeaders(res, path) {
          const isHashed = /[\\/](_expo|assets)[\\/]/.test(path);
          res.setHeader('Cache-Control', isHashed ? `public, max-age=${year}, immutable` : 'no-cache');
        },
      },
    }),
  );
  router.get('/{*path}', (req, res, next) => {
    if (/\.\w+$/.test(req.path)) return next();
    res.setHeader('Cache-Control', 'no-cache');
    // Only for those who were given the link.
    if (req.path.startsWith('/records/')) res.setHeader('X-Robots-Tag', 'noindex, nofollow');
    res.sendFile(page);
  });
  return router;
}

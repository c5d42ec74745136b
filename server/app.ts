import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express, Router } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';

import type { Deps } from './deps';
import { AppError } from './errors';
import { readActor } from './http/actor';
import { createCsrf } from './http/csrf';
import { devCors } from './http/devCors';
import { errorHandler } from './http/errorHandler';
import { createRateLimits } from './http/rateLimits';
import { authorizeRoute, type Route } from './http/route';
import { webApp } from './http/webApp';
import { readCors } from './publicApi/cors';
import { createRoutes } from './routes';

const bodyLimit = '256kb';

/** Builds the application on its dependencies; does not listen. */
export function createApp(deps: Deps): Express {
  const { config, logger } = deps;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustProxy);
  app.use(pinoHttp({ logger, autoLogging: false }));
  app.use(
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          // react-native-web writes its style sheet at run time.
          styleSrc: ["'self'", "'unsafe-inline'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          workerSrc: ["'self'"],
          upgradeInsecureRequests: config.hasSecureCookies ? [] : null,
        },
      },
      strictTransportSecurity: config.hasSecureCookies,
    }),
  );
  app.use(compression());
  if (config.devOrigin) app.use(devCors(config.devOrigin));
  app.use('/api', apiRouter(deps));
  app.use(webApp(deps));
  app.use((_req, _res, next) => next(new AppError('notFound')));
  app.use(errorHandler(logger));
  return app;
}

function apiRouter(deps: Deps): Router {
  const { config } = deps;
  const csrf = createCsrf(config);
  const limits = createRateLimits(config);
  const api = Router();
  api.use(cookieParser(), readActor(deps));
  api.use((_req, res, next) => {
    res.setHeader('Cache-Control', 'no-store');
    next();
  });
  api.use('/v1', readCors);
  for (const route of createRoutes(csrf)) mountRoute(api, route);
  api.use((_req, _res, next) => next(new AppError('notFound')));
  return api;

  function mountRoute(router: Router, route: Route) {
    router[route.method](
      route.path,
      authorizeRoute(route),
      ...(route.limit ? [limits[route.limit]] : []),
      ...(route.method === 'get' || route.isTokenBound ? [] : [csrf.protect]),
      ...(route.before ? [route.before(deps)] : [express.json({ limit: bodyLimit })]),
      (req, res) => route.run(deps, req, res),
    );
  }
}
